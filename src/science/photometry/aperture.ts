const SMALLEST_FWHM = 0.3;
const LARGEST_FWHM = 3;

/**
 * Radius of an aperture, in FWHM, at which a merit with a single maximum is largest: golden section between 0.3 and 3.
 * With enclosed / radius as merit (background alone) it is 0.751 for a Moffat profile of beta 2.5 and 0.673 for a
 * Gaussian (Pritchet & Kline 1981, AJ 86, 1859; Howell 1989, PASP 101, 616); brighter stars want more.
 */
export function bestRadius_fwhm(merit: (radius_fwhm: number) => number): number {
  const golden = (Math.sqrt(5) - 1) / 2;
  let low = SMALLEST_FWHM;
  let high = LARGEST_FWHM;
  while (high - low > 1e-5) {
    const a = high - golden * (high - low);
    const b = low + golden * (high - low);
    if (merit(a) > merit(b)) high = b;
    else low = a;
  }
  return (low + high) / 2;
}
