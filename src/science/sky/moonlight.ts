import { skyPath } from './night-sky.js';
import { magnitudeOfNanolambert, nanolambert } from './surface-brightness.js';

const RADIAN = Math.PI / 180;
/** Nearer to the Moon the formula runs away; no target is ever suggested there. */
const NEAREST_DEG = 0.5;

/** Where the Moon stands as seen from a target. */
export interface MoonGeometry {
  /** 0 full, 180 new. */
  readonly phaseAngle_deg: number;
  readonly separation_deg: number;
  readonly moonZenithDistance_deg: number;
  readonly targetZenithDistance_deg: number;
}

/**
 * V brightness of the sky that moonlight adds, nanolambert: Krisciunas & Schaefer 1991, PASP 103, 1033, eqs. 15,
 * 18-21, stated to 8-23 %. None while the Moon is below the horizon.
 */
export function moonlight_nL(moon: MoonGeometry, extinctionV_magPerAirmass: number): number {
  if (moon.moonZenithDistance_deg >= 90) return 0;
  const alpha = Math.abs(moon.phaseAngle_deg);
  const illuminance = 10 ** (-0.4 * (3.84 + 0.026 * alpha + 4e-9 * alpha ** 4));
  const absorbed = 10 ** (-0.4 * extinctionV_magPerAirmass * skyPath(moon.moonZenithDistance_deg));
  const scattered = 1 - 10 ** (-0.4 * extinctionV_magPerAirmass * skyPath(moon.targetZenithDistance_deg));
  return scatteringFunction(moon.separation_deg) * illuminance * absorbed * scattered;
}

/** Rayleigh and Mie scattering at an angle from the Moon (eqs. 18-21). */
export function scatteringFunction(separation_deg: number): number {
  const rho = Math.max(NEAREST_DEG, separation_deg);
  const rayleigh = 10 ** 5.36 * (1.06 + Math.cos(rho * RADIAN) ** 2);
  const mie = rho >= 10 ? 10 ** (6.15 - rho / 40) : 6.2e7 * rho ** -2;
  return rayleigh + mie;
}

/** How much brighter moonlight makes a V sky of the given dark brightness, magnitudes. */
export function moonBrightening_mag(
  darkV_magPerArcsec2: number,
  moon: MoonGeometry,
  extinctionV_magPerAirmass: number,
): number {
  const moonlight = moonlight_nL(moon, extinctionV_magPerAirmass);
  return darkV_magPerArcsec2 - magnitudeOfNanolambert(nanolambert(darkV_magPerArcsec2) + moonlight);
}

/** Effective wavelength -> how strongly moonlight brightens the sky there, V = 1. */
const COLOUR: readonly (readonly [number, number])[] = [
  [366, 16.2],
  [438, 3.7],
  [545, 1],
  [641, 0.475],
  [798, 0.291],
  [893, 0.2],
];

/**
 * The same in another band: moonlight is blue, and the dark sky is red. Factors from the half to full Moon rows of
 * Walker 1987 (NOAO Newsletter 10, 16), by logarithmic interpolation in wavelength; the last one by judgement. It
 * returns Walker's table to 0.2 mag in BVRI and 0.5 in U.
 */
export function brighteningInBand_mag(brighteningV_mag: number, wavelength_nm: number): number {
  return 2.5 * Math.log10(1 + moonColour(wavelength_nm) * (10 ** (0.4 * brighteningV_mag) - 1));
}

function moonColour(wavelength_nm: number): number {
  const last = COLOUR[COLOUR.length - 1];
  if (wavelength_nm <= COLOUR[0][0]) return COLOUR[0][1];
  if (wavelength_nm >= last[0]) return last[1];
  const i = COLOUR.findIndex(([wavelength]) => wavelength > wavelength_nm);
  const [x0, y0] = COLOUR[i - 1];
  const [x1, y1] = COLOUR[i];
  return y0 * (y1 / y0) ** ((wavelength_nm - x0) / (x1 - x0));
}
