/** Median of the empirical coefficient over many sites (Osborn et al. 2015, MNRAS 452, 1707). */
const COEFFICIENT = 1.5;
/** Scale height of the turbulence, m. */
const SCALE_HEIGHT_M = 8000;

/**
 * Scintillation as relative variance times exposure time, seconds: Osborn et al. 2015, eq. 7 (a corrected form of
 * Young 1967, AJ 72, 747). For exposures longer than about a second.
 */
export function scintillation_s(aperture_m: number, airmass: number, height_m: number): number {
  return (
    1e-5 *
    COEFFICIENT ** 2 *
    aperture_m ** (-4 / 3) *
    airmass ** 3 *
    Math.exp((-2 * height_m) / SCALE_HEIGHT_M)
  );
}
