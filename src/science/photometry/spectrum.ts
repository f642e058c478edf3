/** Telescope and spectrograph as one spectral pixel sees them. */
export interface SpectralPixel {
  readonly area_cm2: number;
  /** Telescope to electron without slit losses, 0 to 1. */
  readonly throughput: number;
  readonly width_Angstrom: number;
}

/**
 * Electrons per second of a star in one spectral pixel: photon flux at the ground (photons/s/cm^2/Angstrom) x area x
 * throughput x share of the light through the slit x width of the pixel.
 */
export function spectralRate_ePerSPerPixel(flux: number, slitShare: number, pixel: SpectralPixel): number {
  return flux * slitShare * pixel.area_cm2 * pixel.throughput * pixel.width_Angstrom;
}

/**
 * Electrons per second of the sky in one pixel: it fills the slit, so nothing is lost, and its brightness
 * (photons/s/cm^2/Angstrom/arcsec^2) is the one seen from the ground, so nothing is absorbed.
 */
export function slitSkyRate_ePerSPerPixel(
  skyFlux_perArcsec2: number,
  slit_arcsec: number,
  row_arcsec: number,
  pixel: SpectralPixel,
): number {
  return (
    skyFlux_perArcsec2 * slit_arcsec * row_arcsec * pixel.area_cm2 * pixel.throughput * pixel.width_Angstrom
  );
}
