import type { SafeText } from './safe-text.js';

const MS_PER_DAY = 86_400_000;
const MJD_OF_UNIX_EPOCH = 40_587;

/** TT - UTC since 2017-01-01: 37 leap seconds and 32.184 s. */
const TT_MINUS_UTC_MS = 69_184;
const TAI_MINUS_UTC_MS = 37_000;

/** Unix time of a Modified Julian Date, to the nearest ms. */
export function msOfMjd(mjd: number): number {
  return Math.round((mjd - MJD_OF_UNIX_EPOCH) * MS_PER_DAY);
}

/** A double holds a Julian Date to 0.04 ms only; so does this. */
export function msOfJd(jd: number): number {
  return msOfMjd(jd - 2_400_000.5);
}

const ISO = /^(\d{4})-(\d{2})-(\d{2})[T ](\d{2}):(\d{2})(?::(\d{2}(?:\.\d+)?))?Z?$/;
const CLOCK = /^(\d{1,2}):(\d{2})(?::(\d{2}(?:\.\d+)?))?$/;

/**
 * Unix time of a FITS date, 'YYYY-MM-DDThh:mm:ss[.s]' (FITS Standard 4.0, 9.1), to the nearest ms. NaN for a
 * bare date, which cannot be ordered, and for anything that is no date, such as month 13.
 */
export function msOfIsoDate(text: string): number {
  const match = ISO.exec(text.trim());
  if (match === null) return Number.NaN;
  const [year, month, day, hour, minute] = match.slice(1, 6).map(Number);
  const second = Number(match[6] ?? 0);
  // A leap second cannot be represented: second 60 counts as the next minute.
  if (hour > 23 || minute > 59 || second >= 61) return Number.NaN;
  const date = Date.UTC(year, month - 1, day);
  const back = new Date(date);
  if (back.getUTCMonth() !== month - 1 || back.getUTCDate() !== day) return Number.NaN;
  return date + (hour * 60 + minute) * 60_000 + Math.round(second * 1000);
}

/** The old form DD/MM/YY, always of the 1900s (FITS Standard 4.0, 9.1.2), as YYYY-MM-DD; else the text. */
function modernDate(text: string): string {
  return text.replace(/^(\d{2})\/(\d{2})\/(\d{2})/, '19$3-$2-$1');
}

/** When a frame was exposed. */
export interface Exposure {
  /** Unix ms; NaN when the header does not say, or not so that it can be used. */
  readonly mid_ms: number;
  /** NaN when not given. */
  readonly exposure_s: number;
  /** Why a time that is given cannot be used; '' otherwise. */
  readonly refused: string;
}

type Header = ReadonlyMap<string, SafeText>;

const EXPOSURE_KEYS = ['EXPTIME', 'EXPOSURE', 'EXP_TIME', 'EXPOSURE_S', 'XPOSURE', 'ITIME', 'TEXP'];
const MIDDLE_KEYS = ['MJD-AVG', 'MJD-MID', 'MJDMID', 'DATE-AVG', 'DATE-MID', 'JD-MID', 'MIDTIME'];
const START_KEYS = ['MJD-BEG', 'DATE-BEG', 'MJD-OBS', 'MJD', 'DATE-OBS', 'DATE_OBS', 'JD', 'JD-OBS'];
const CLOCK_KEYS = ['TIME-OBS', 'TIME_OBS', 'UTSTART', 'UTC-OBS', 'UT', 'UTC', 'UT-OBS'];

/**
 * Middle of the exposure (Rots et al. 2015, A&A 574, A36; FITS Standard 4.0): a middle that is given, else a
 * beginning plus half the exposure. The standard leaves open what DATE-OBS marks; the beginning is assumed, as
 * is common. MJD counts before the date where both are there. Times are UTC unless TIMESYS says TT or TAI.
 */
export function exposureOf(header: Header): Exposure {
  const exposure_s = firstNumber(header, EXPOSURE_KEYS);
  const middle = firstTime(header, MIDDLE_KEYS);
  const start = middle === undefined ? firstTime(header, START_KEYS) : undefined;
  const given = middle ?? start;
  if (given === undefined) return { mid_ms: Number.NaN, exposure_s, refused: '' };
  const offset = scaleOffset_ms(header.get('TIMESYS') ?? 'UTC');
  if (Number.isNaN(offset)) {
    const refused = `TIMESYS is '${header.get('TIMESYS')}', expected UTC, TT or TAI`;
    return { mid_ms: Number.NaN, exposure_s, refused };
  }
  if (Number.isNaN(given.time_ms)) {
    const refused = `${given.key} is '${header.get(given.key)}', expected a date with a time`;
    return { mid_ms: Number.NaN, exposure_s, refused };
  }
  const half_ms = middle === undefined && exposure_s > 0 ? exposure_s * 500 : 0;
  return { mid_ms: given.time_ms - offset + half_ms, exposure_s, refused: '' };
}

/** Number at the start of a header value, such as '60' or '2.1 arcsec'; NaN when there is none. */
export function headerNumber(text: string | undefined): number {
  return text === undefined ? Number.NaN : Number.parseFloat(text);
}

export function firstNumber(header: Header, keys: readonly string[]): number {
  return headerNumber(header.get(keys.find(key => header.has(key)) ?? ''));
}

function firstTime(header: Header, keys: readonly string[]): { key: string; time_ms: number } | undefined {
  const key = keys.find(candidate => header.has(candidate));
  if (key === undefined) return undefined;
  return { key, time_ms: timeOf(header, header.get(key) ?? '') };
}

function timeOf(header: Header, text: string): number {
  if (/^[\d.]+$/.test(text)) return msOfDayNumber(Number(text));
  const date = modernDate(text);
  const iso = msOfIsoDate(date);
  if (!Number.isNaN(iso)) return iso;
  const clock = CLOCK_KEYS.map(key => header.get(key) ?? '').find(value => CLOCK.test(value));
  return clock === undefined ? Number.NaN : msOfIsoDate(`${date}T${clock.padStart(8, '0')}`);
}

/** JD and MJD cannot be confused: MJD stays below 100,000 until the year 2132. NaN for what is neither. */
export function msOfDayNumber(days: number): number {
  if (days > 2_400_000 && days < 2_500_000) return msOfJd(days);
  return days > 10_000 && days < 100_000 ? msOfMjd(days) : Number.NaN;
}

function scaleOffset_ms(scale: string): number {
  switch (scale.trim().toUpperCase()) {
    case 'UTC':
    case 'UT':
    case 'UT1':
      return 0;
    case 'TAI':
      return TAI_MINUS_UTC_MS;
    case 'TT':
    case 'TDT':
    case 'ET':
      return TT_MINUS_UTC_MS;
    default:
      return Number.NaN;
  }
}
