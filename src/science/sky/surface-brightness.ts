/** Surface brightnesses add as light: mag/arcsec^2 of all of them together. */
export function together_magPerArcsec2(...brightnesses: readonly number[]): number {
  return -2.5 * Math.log10(brightnesses.reduce((sum, mag) => sum + 10 ** (-0.4 * mag), 0));
}

/** V surface brightness in nanolambert: Krisciunas & Schaefer 1991, PASP 103, 1033, eq. 1. */
export function nanolambert(v_magPerArcsec2: number): number {
  return 34.08 * Math.exp(20.7233 - 0.92104 * v_magPerArcsec2);
}

/** The inverse of `nanolambert`. */
export function magnitudeOfNanolambert(brightness_nL: number): number {
  return (20.7233 - Math.log(brightness_nL / 34.08)) / 0.92104;
}
