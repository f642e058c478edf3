import type { Air } from './air.js';

/**
 * How much the air lifts a star, degrees, by its airless altitude: Saemundsson 1986, Sky & Telescope 72, 70, as in
 * Meeus 1998, Astronomical Algorithms, eq. 16.4, for 1010 hPa and 10 C. Good to 0.1 arcmin above -1 degree; NaN below.
 */
export function refraction_deg(trueAltitude_deg: number): number {
  if (!(trueAltitude_deg >= -1)) return Number.NaN;
  const angle_deg = trueAltitude_deg + 10.3 / (trueAltitude_deg + 5.11);
  return 1.02 / Math.tan((angle_deg * Math.PI) / 180) / 60;
}

/** Factor on the refraction for other air: Meeus 1998, chapter 16. */
export function refractionFactor(air: Air): number {
  return (air.pressure_hPa / 1010) * (283 / (273 + air.temperature_C));
}
