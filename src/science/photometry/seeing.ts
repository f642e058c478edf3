/**
 * Seeing away from the zenith and at another wavelength: FWHM x X^0.6 (lambda / 500 nm)^-0.2 (Fried 1966;
 * Roddier 1981, Progress in Optics 19, 281; from memory).
 */
export function seeing_arcsec(zenith500_arcsec: number, airmass: number, wavelength_nm: number): number {
  return zenith500_arcsec * airmass ** 0.6 * (wavelength_nm / 500) ** -0.2;
}

/** The zenith value at 500 nm behind a measured FWHM. */
export function zenithSeeing_arcsec(measured_arcsec: number, airmass: number, wavelength_nm: number): number {
  return measured_arcsec / seeing_arcsec(1, airmass, wavelength_nm);
}
