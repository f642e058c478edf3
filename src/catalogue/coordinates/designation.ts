/**
 * Names of sources made from their position, after the IAU recommendations for designations: coordinates are
 * cut off, never rounded, both toward zero.
 *
 * The guard keeps a coordinate that is an exact multiple of the last unit, and whose double lies a hair below
 * it, from losing one unit.
 */
const GUARD = 1e-6;

function cut(value: number): number {
  return Math.floor(value + GUARD);
}

function digits(value: number, width: number): string {
  return String(value).padStart(width, '0');
}

/** 'HHMMSS.ss' or 'DDMMSS.s' from a count of units of the last decimal of the seconds. */
function packed(total: number, decimals: number): string {
  const units = 10 ** decimals;
  const whole = Math.floor(total / units);
  const fraction = decimals > 0 ? `.${digits(total % units, decimals)}` : '';
  const parts = [Math.floor(whole / 3600), Math.floor(whole / 60) % 60, whole % 60];
  return parts.map(part => digits(part, 2)).join('') + fraction;
}

function signOf(angle_deg: number): string {
  return angle_deg < 0 ? '-' : '+';
}

/** JHHMMSS.ss+DDMMSS.s for ICRS or J2000 positions. */
export function designation(ra_deg: number, dec_deg: number, raDecimals = 2, decDecimals = 1): string {
  const ra = cut(ra_deg * 240 * 10 ** raDecimals);
  const dec = cut(Math.abs(dec_deg) * 3600 * 10 ** decDecimals);
  return `J${packed(ra, raDecimals)}${signOf(dec_deg)}${packed(dec, decDecimals)}`;
}
