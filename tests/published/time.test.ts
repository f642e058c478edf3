import { describe, expect, it } from 'vitest';
import { safeText } from '../../src/catalogue/safe-text.js';
import { exposureOf, msOfIsoDate } from '../../src/catalogue/time.js';
import { parseTable } from '../../src/science/table.js';
import text from './data/checks_time.csv';

/** How each topic of the file is dealt with; calendar and FITS rows run in tests/catalogue/time.test.ts. */
const CHECKED_IN_CATALOGUE = ['calendar', 'fits'];
const NOT_OURS: Readonly<Record<string, string>> = {
  tdb_minus_tt: 'times are UTC: TDB is never shown',
  barycentric_correction: 'times are those of the observatory: no light-time correction is made',
  heliocentric_correction: 'times are those of the observatory: no light-time correction is made',
  bjd_tdb: 'times are those of the observatory: no light-time correction is made',
};

describe('time scales', () => {
  const rows = parseTable(text).rows;
  it('reads every row of the file', () => expect(rows).toHaveLength(97));

  for (const row of rows.filter(each => !CHECKED_IN_CATALOGUE.includes(each.text('topic')))) {
    const name = row.text('function');
    const utc = /utc=([^;]+)/.exec(row.text('inputs'))?.[1] ?? '';
    if (name in NOT_OURS) {
      it.skip(`${row.text('id')} ${name}: ${NOT_OURS[name]}`, () => {});
    } else if (utc < '2017') {
      it.skip(`${row.text('id')} ${name}: leap seconds before 2017 are not in use`, () => {});
    } else {
      it(`${row.text('id')} ${name} at ${utc}`, () => {
        expect(name).toBe('tt_minus_utc');
        const header = new Map([
          ['DATE-OBS', safeText(utc)],
          ['TIMESYS', safeText('TT')],
        ]);
        const difference_s = (msOfIsoDate(utc) - exposureOf(header).mid_ms) / 1000;
        expect(Math.abs(difference_s - row.number('expected'))).toBeLessThanOrEqual(row.number('tol'));
      });
    }
  }
});
