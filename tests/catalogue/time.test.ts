import { describe, expect, it } from 'vitest';
import { safeText } from '../../src/catalogue/safe-text.js';
import { exposureOf, msOfDayNumber, msOfIsoDate, msOfJd, msOfMjd } from '../../src/catalogue/time.js';
import { parseTable, type Row } from '../../src/science/table.js';
import checks from '../published/data/checks_time.csv';

/** Calendar (Fliegel & Van Flandern 1968) and FITS rows of the published checks, against another library. */
const rows = parseTable(checks).rows.filter(row => ['calendar', 'fits'].includes(row.text('topic')));

const DAY_MS = 86_400_000;

function header(keywords: Readonly<Record<string, string>>) {
  return new Map(Object.entries(keywords).map(([key, value]) => [key, safeText(value)]));
}

function error(row: Row): number {
  const inputs = new Map(
    row
      .text('inputs')
      .split(';')
      .map(pair => pair.split('=') as [string, string]),
  );
  const expected = row.text('expected');
  switch (row.text('function')) {
    case 'iso_to_mjd':
    case 'stored_header_example':
      return (msOfIsoDate(inputs.get('utc') ?? '') - msOfMjd(Number(expected))) / DAY_MS;
    case 'iso_to_jd':
      return (msOfIsoDate(inputs.get('utc') ?? '') - msOfJd(Number(expected))) / DAY_MS;
    case 'mjd_to_iso':
      return (msOfMjd(Number(inputs.get('mjd'))) - msOfIsoDate(expected)) / 1000;
    case 'mid_exposure': {
      const { mid_ms } = exposureOf(
        header({ 'DATE-OBS': inputs.get('DATE_OBS') ?? '', EXPTIME: inputs.get('EXPTIME') ?? '' }),
      );
      return (mid_ms - msOfIsoDate(expected)) / 1000;
    }
    default:
      throw new Error(`no function for ${row.text('function')}`);
  }
}

describe('times against checks_time.csv', () => {
  it('has its rows', () => expect(rows).toHaveLength(31));

  it.each(rows.map(row => [`${row.text('id')} ${row.text('inputs')}`, row] as const))('%s', (_, row) => {
    expect(Math.abs(error(row))).toBeLessThanOrEqual(Number.parseFloat(row.text('tol')));
  });
});

describe('time of a frame', () => {
  const start = Date.UTC(2026, 10, 8, 21, 14, 0);

  it.each([
    ['a beginning and the exposure', { 'DATE-OBS': '2026-11-08T21:14:00', EXPTIME: '60' }, start + 30_000],
    ['a middle that is given', { 'DATE-AVG': '2026-11-08T21:14:00', EXPTIME: '60' }, start],
    [
      'the middle before the beginning',
      { 'DATE-AVG': '2026-11-08T21:14:00', 'DATE-BEG': '2026-11-08T21:00:00' },
      start,
    ],
    ['MJD before the date', { 'MJD-OBS': '61352.884722222222', 'DATE-OBS': '2026-11-08T20:00:00' }, start],
    ['a date and a clock', { 'DATE-OBS': '2026-11-08', 'TIME-OBS': '21:14:00' }, start],
    ['TT', { 'DATE-OBS': '2026-11-08T21:15:09.184', TIMESYS: 'TT' }, start],
    ['the last century', { 'DATE-OBS': '08/11/96', UT: '21:14:00' }, Date.UTC(1996, 10, 8, 21, 14, 0)],
  ])('%s', (_, keywords, expected) => {
    const exposure = exposureOf(header(keywords));
    expect(exposure.mid_ms).toBe(expected);
    expect(exposure.refused).toBe('');
  });

  it.each([
    ['a bare date', { 'DATE-OBS': '2026-11-08' }],
    ['month 13', { 'DATE-OBS': '2026-13-08T21:14:00' }],
    ['30 February', { 'DATE-OBS': '2026-02-30T21:14:00' }],
    ['hour 24', { 'DATE-OBS': '2026-11-08T24:14:00' }],
    ['an unknown scale', { 'DATE-OBS': '2026-11-08T21:14:00', TIMESYS: 'LOCAL' }],
    ['a number that is no day', { MJD: '12' }],
  ])('is refused for %s', (_, keywords) => {
    const exposure = exposureOf(header(keywords));
    expect(exposure.mid_ms).toBeNaN();
    expect(exposure.refused).not.toBe('');
  });

  it('is not known, without complaint, when nothing is said', () => {
    expect(exposureOf(header({}))).toEqual({ mid_ms: Number.NaN, exposure_s: Number.NaN, refused: '' });
  });

  it('tells JD from MJD', () => {
    expect(msOfDayNumber(2_461_353.5)).toBe(msOfJd(2_461_353.5));
    expect(msOfDayNumber(61_353)).toBe(msOfJd(2_461_353.5));
    expect(msOfDayNumber(2026)).toBeNaN();
  });
});
