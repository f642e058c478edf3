/**
 * Moffat profile of a star's image (Moffat 1969, A&A 3, 455; forms as in Trujillo et al. 2001, MNRAS 328, 977).
 * beta 2.5 suits small telescopes, 4.765 is the Kolmogorov value.
 */
export const SMALL_TELESCOPE_BETA = 2.5;

/** Core width a for a full width at half maximum of 1. */
function coreWidth(beta: number): number {
  return 1 / (2 * Math.sqrt(2 ** (1 / beta) - 1));
}

/** Share of the light within a radius given in FWHM. */
export function enclosedFraction(radius_fwhm: number, beta: number): number {
  return 1 - (1 + (radius_fwhm / coreWidth(beta)) ** 2) ** (1 - beta);
}

/** Share of the light in the brightest pixel, the star centred on it; pixel side in FWHM. */
export function peakPixelFraction(pixel_fwhm: number, beta: number): number {
  const a = coreWidth(beta);
  const norm = (beta - 1) / (Math.PI * a * a);
  return 4 * norm * squareIntegral(pixel_fwhm / 2, (x, y) => (1 + (x * x + y * y) / (a * a)) ** -beta);
}

/** Share of the light through a long slit of a width in FWHM, the star centred: integral across the slit. */
export function slitFraction(width_fwhm: number, beta: number): number {
  const a = coreWidth(beta);
  // Summed along the slit, a Moffat profile of beta is one of beta - 1/2 across it, of the same core width;
  // the substitution x = a tan(phi) leaves an integrand without poles.
  const across = (limit: number) => panels(0, Math.atan(limit / a), phi => Math.cos(phi) ** (2 * beta - 3));
  return across(width_fwhm / 2) / across(Number.POSITIVE_INFINITY);
}

/** Nodes and weights of the five-point Gauss-Legendre rule on [-1, 1] (Abramowitz & Stegun 1964, table 25.4). */
const GAUSS = [
  [0, 0.5688888888888889],
  [-0.5384693101056831, 0.4786286704993665],
  [0.5384693101056831, 0.4786286704993665],
  [-0.906179845938664, 0.2369268850561891],
  [0.906179845938664, 0.2369268850561891],
] as const;

function panels(from: number, to: number, f: (x: number) => number, count = 8): number {
  const half = (to - from) / count / 2;
  let sum = 0;
  for (let i = 0; i < count; i++) {
    const centre = from + (2 * i + 1) * half;
    for (const [x, weight] of GAUSS) sum += weight * f(centre + half * x);
  }
  return sum * half;
}

function squareIntegral(side: number, f: (x: number, y: number) => number): number {
  return panels(0, side, y => panels(0, side, x => f(x, y), 3), 3);
}
