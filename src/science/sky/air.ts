/** What bends the light at a site. */
export interface Air {
  readonly pressure_hPa: number;
  readonly temperature_C: number;
  readonly vapour_hPa: number;
}

/** Usual on a mountain; dispersion changes by less than 1 % between dry and moist air (Filippenko 1982). */
const USUAL_VAPOUR_HPA = 8;

/** Air of the standard atmosphere at a height up to 11 km: U.S. Standard Atmosphere 1976, eqs 23 and 33a. */
export function standardAir(height_m: number): Air {
  const temperature_K = 288.15 - 0.0065 * height_m;
  return {
    pressure_hPa: 1013.25 * (temperature_K / 288.15) ** 5.25588,
    temperature_C: temperature_K - 273.15,
    vapour_hPa: USUAL_VAPOUR_HPA,
  };
}
