/** Absolute bolometric magnitude of one solar luminosity (IAU 2015 Resolution B2). */
const SOLAR_BOLOMETRIC_MAG = 4.74;
/** Nominal solar effective temperature (IAU 2015 Resolution B3). */
const SOLAR_TEFF_K = 5772;

/** Decimal logarithm of the luminosity in Suns of an absolute bolometric magnitude. */
export function logLuminosity(bolometric_mag: number): number {
  return -0.4 * (bolometric_mag - SOLAR_BOLOMETRIC_MAG);
}

/** Radius in solar radii, with its error, from L = 4 pi R^2 sigma T^4; NaN where either is not known. */
export function stellarRadius(star: {
  readonly logLuminosity: number;
  readonly logLuminositySigma: number;
  readonly teff_K: number;
  readonly teffSigma_K: number;
}): { readonly radius_Rsun: number; readonly sigma_Rsun: number } {
  const { teff_K, teffSigma_K } = star;
  const radius_Rsun = 10 ** (star.logLuminosity / 2) * (SOLAR_TEFF_K / teff_K) ** 2;
  const relative = Math.hypot((Math.LN10 / 2) * star.logLuminositySigma, (2 * teffSigma_K) / teff_K);
  return { radius_Rsun, sigma_Rsun: radius_Rsun * relative };
}
