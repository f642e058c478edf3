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

/** BHHMMm+DDMM for B1950 positions: tenths of a minute of time, whole minutes of arc. */
export function designationB1950(ra_deg: number, dec_deg: number): string {
  const ra = cut(ra_deg * 40);
  const dec = cut(Math.abs(dec_deg) * 60);
  const hours = digits(Math.floor(ra / 600), 2) + digits(ra % 600, 3);
  return `B${hours}${signOf(dec_deg)}${digits(Math.floor(dec / 60), 2)}${digits(dec % 60, 2)}`;
}

/** GLLL.l+BB.b for galactic positions. */
export function designationGalactic(l_deg: number, b_deg: number): string {
  const tenths = (angle: number, width: number) => `${digits(Math.floor(angle / 10), width)}.${angle % 10}`;
  return `G${tenths(cut(l_deg * 10), 3)}${signOf(b_deg)}${tenths(cut(Math.abs(b_deg) * 10), 2)}`;
}

/** Where a name points: the middle of its cell, and half the cell. */
export interface NamedPosition {
  readonly ra_deg: number;
  readonly dec_deg: number;
  /** In right ascension: multiply by cos(dec) for the sky. */
  readonly halfCellRa_arcsec: number;
  readonly halfCellDec_arcsec: number;
}

const J_NAME = /^J(\d{2})(\d{2})(\d{2}(?:\.\d+)?)?([+-])(\d{2})(\d{2})(\d{2}(?:\.\d+)?)?$/;

/** The position in a name such as J195740.55+333827.9 or J1234-0123; undefined for any other text. */
export function positionOfName(name: string): NamedPosition | undefined {
  const match = J_NAME.exec(name.trim());
  if (match === null) return undefined;
  const [, h, m, s, sign, d, minutes, seconds] = match;
  const halfRa_s = halfUnit(s);
  const halfDec_arcsec = halfUnit(seconds);
  const ra_s = Number(h) * 3600 + Number(m) * 60 + Number(s ?? 0) + halfRa_s;
  const dec_arcsec = Number(d) * 3600 + Number(minutes) * 60 + Number(seconds ?? 0) + halfDec_arcsec;
  return {
    ra_deg: ra_s / 240,
    dec_deg: ((sign === '-' ? -1 : 1) * dec_arcsec) / 3600,
    halfCellRa_arcsec: halfRa_s * 15,
    halfCellDec_arcsec: halfDec_arcsec,
  };
}

/** Half of the last unit of the seconds; half a minute where there are none. */
function halfUnit(seconds: string | undefined): number {
  if (seconds === undefined) return 30;
  return 0.5 * 10 ** -(seconds.split('.')[1]?.length ?? 0);
}
