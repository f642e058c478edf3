/** Collecting area of a mirror with a central obstruction (linear), cm^2. */
export function collectingArea_cm2(aperture_m: number, obstruction: number): number {
  return (Math.PI / 4) * (100 * aperture_m) ** 2 * (1 - obstruction ** 2);
}

/**
 * Magnitude that gives one electron per second above the atmosphere: photon flux of magnitude 0
 * (photons/s/cm^2/Angstrom) x equivalent width x area x throughput. Without a measured frame good to 10-15 %:
 * the slope of the star's spectrum across the band is the main error.
 */
export function zeroPoint_mag(
  photonFlux_perSPerCm2PerAngstrom: number,
  width_nm: number,
  area_cm2: number,
  throughput: number,
): number {
  return 2.5 * Math.log10(photonFlux_perSPerCm2PerAngstrom * width_nm * 10 * area_cm2 * throughput);
}

/** Electrons per second of a star, through the air. */
export function countRate_ePerS(
  mag: number,
  zeroPoint: number,
  extinction_magPerAirmass: number,
  airmass: number,
): number {
  return 10 ** (-0.4 * (mag + extinction_magPerAirmass * airmass - zeroPoint));
}

/** Electrons per second of the sky in one pixel; the brightness is the one seen from the ground. */
export function skyRate_ePerSPerPixel(
  sky_magPerArcsec2: number,
  zeroPoint: number,
  pixel_arcsec2: number,
): number {
  return 10 ** (-0.4 * (sky_magPerArcsec2 - zeroPoint)) * pixel_arcsec2;
}
