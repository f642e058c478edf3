import type { Air } from './air.js';

const ARCSEC_PER_RADIAN = 206_265;
const MMHG_PER_HPA = 0.750062;

/**
 * How far higher light of a wavelength is seen than light of another, arcsec: Filippenko 1982, PASP 94, 715, eqs 1-4,
 * with Edlen's refractive index; for a plane atmosphere, good to 2 % at zenith distances up to 75 degrees.
 */
export function dispersion_arcsec(
  wavelength_nm: number,
  reference_nm: number,
  zenithDistance_deg: number,
  air: Air,
): number {
  const lift = refractivity(wavelength_nm, air) - refractivity(reference_nm, air);
  return ARCSEC_PER_RADIAN * lift * Math.tan((zenithDistance_deg * Math.PI) / 180);
}

/** Refractive index less one. */
function refractivity(wavelength_nm: number, air: Air): number {
  const s = (1000 / wavelength_nm) ** 2;
  const standard = 64.328 + 29_498.1 / (146 - s) + 255.4 / (41 - s);
  const pressure_mmHg = air.pressure_hPa * MMHG_PER_HPA;
  const warmth = 1 + 0.003661 * air.temperature_C;
  const dry =
    (standard * pressure_mmHg * (1 + (1.049 - 0.0157 * air.temperature_C) * 1e-6 * pressure_mmHg)) /
    (720.883 * warmth);
  const vapour = (air.vapour_hPa * MMHG_PER_HPA * (0.0624 - 0.00068 * s)) / warmth;
  return (dry - vapour) * 1e-6;
}
