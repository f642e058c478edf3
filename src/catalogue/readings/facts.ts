import { median } from '../../science/statistics.js';
import type { Assignment } from '../columns/assign.js';
import type { FrameFacts } from '../frame.js';
import type { ProblemList } from '../problems.js';
import { type SafeText, safeText } from '../safe-text.js';
import type { Sheet } from '../sheet.js';
import { exposureOf, firstNumber, msOfDayNumber, msOfIsoDate } from '../time.js';

/** Header keywords, the first that a file has counts. */
export const FACT_KEYS = {
  fwhm_arcsec: ['FWHM', 'FWHM_ARCSEC', 'SEEING'],
  zeroPoint_mag: ['ZEROPT', 'ZEROPOINT', 'ZP', 'MAGZPT', 'MAGZERO', 'MAG_ZP', 'PHOTZP'],
  sky_magPerArcsec2: ['SKYMAG', 'SKY_MAG', 'SKYSB', 'SKY_SB', 'SKYBRIGHT'],
  airmass: ['AIRMASS', 'SECZ'],
  object: ['OBJECT', 'FIELD', 'TARGET'],
} as const;

const ONE_HOUR_MS = 3_600_000;

/** What the header, and a time column, say of the exposure. */
export function readFacts(
  file: SafeText,
  sheet: Sheet,
  columns: Assignment,
  problems: ProblemList,
): FrameFacts {
  const { header } = sheet;
  const exposure = exposureOf(header);
  if (exposure.refused !== '') problems.add('bad-time', 0, exposure.refused);
  const mid_ms = Number.isNaN(exposure.mid_ms) ? timeOfRows(sheet, columns, problems) : exposure.mid_ms;
  const object = FACT_KEYS.object.find(key => header.has(key));
  return {
    name: file,
    mid_ms,
    exposure_s: exposure.exposure_s,
    fwhm_arcsec: firstNumber(header, FACT_KEYS.fwhm_arcsec),
    zeroPoint_mag: firstNumber(header, FACT_KEYS.zeroPoint_mag),
    sky_magPerArcsec2: firstNumber(header, FACT_KEYS.sky_magPerArcsec2),
    airmass: firstNumber(header, FACT_KEYS.airmass),
    object: object === undefined ? safeText('') : (header.get(object) ?? safeText('')),
  };
}

/** Median time of the rows: JD, MJD or ISO dates, each row at mid-exposure. NaN without a time column. */
function timeOfRows(sheet: Sheet, columns: Assignment, problems: ProblemList): number {
  const column = columns.get('time')?.column;
  if (column === undefined) return Number.NaN;
  const times: number[] = [];
  let refused = '';
  for (let row = 0; row < sheet.rows; row++) {
    const seen = column.kind === 'number' ? String(column.values[row]) : column.text(row);
    const time = column.kind === 'number' ? msOfDayNumber(column.values[row]) : msOfIsoDate(seen);
    if (!Number.isNaN(time)) times.push(time);
    else if (seen !== '' && seen !== 'NaN') refused = seen;
  }
  if (times.length === 0) {
    if (refused !== '') {
      problems.add(
        'bad-time',
        0,
        `'${column.name}' holds '${refused}', expected JD, MJD or a date with a time`,
      );
    }
    return Number.NaN;
  }
  const first = times.reduce((a, b) => Math.min(a, b));
  const last = times.reduce((a, b) => Math.max(a, b));
  if (last - first > ONE_HOUR_MS) {
    const span_h = ((last - first) / ONE_HOUR_MS).toFixed(1);
    problems.add(
      'bad-time',
      0,
      `the rows span ${span_h} h, expected one exposure; their median time is used`,
    );
  }
  return median(times);
}
