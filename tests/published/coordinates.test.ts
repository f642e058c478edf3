import { describe, expect, it } from 'vitest';
import { designation } from '../../src/catalogue/coordinates/designation.js';
import { formatDec, formatRa } from '../../src/catalogue/coordinates/format-angle.js';
import { parseDec, parseRa } from '../../src/catalogue/coordinates/parse-angle.js';
import { moved } from '../../src/catalogue/coordinates/proper-motion.js';
import { parseTable, type Row } from '../../src/science/table.js';
import checks from './data/checks_coords.csv';

/** Rules and examples of checks_coords.csv: IAU and CDS designation examples, exact fractions elsewhere. */
const rows = parseTable(checks).rows;

/** 'a;key=value;...' or 'key=value;...' as its parts. */
function options(input: string): Map<string, string> {
  return new Map(input.split(/[; ]/).map(part => part.split('=') as [string, string]));
}

function option(input: string, key: string): number {
  return Number(options(input).get(key));
}

/** 'ra dec;options' with a blank between the two. */
function pairOf(input: string): { ra: number; dec: number } {
  const [ra, dec] = input.split(';')[0].split(' ');
  return { ra: parseRa(ra).deg, dec: parseDec(dec).deg };
}

function result(row: Row): string | number {
  const input = row.text('input');
  const output = row.text('output');
  const isRa = output.startsWith('ra_deg');
  switch (row.text('kind')) {
    case 'parse_ra': {
      const ra = parseRa(input);
      return ra.refused === '' ? ra.deg : 'error';
    }
    case 'parse_dec': {
      const dec = parseDec(input);
      return dec.refused === '' ? dec.deg : 'error';
    }
    case 'format_ra':
      return formatRa(Number(input.split(';')[0]), option(input, 'decimals'));
    case 'format_dec':
      return formatDec(Number(input.split(';')[0]), option(input, 'decimals'));
    case 'designation':
    case 'designation_float_trap': {
      const { ra, dec } = pairOf(input);
      return designation(ra, dec, option(input, 'ra_decimals'), option(input, 'dec_decimals'));
    }
    case 'proper_motion': {
      const o = (key: string) => option(input, key);
      const years = o('to') - o('epoch');
      const end = moved(o('ra'), o('dec'), o('pm_ra_cosdec_mas_yr'), o('pm_dec_mas_yr'), years);
      return isRa ? end.ra_deg : end.dec_deg;
    }
    default:
      throw new Error(`no function for ${row.text('kind')}`);
  }
}

/** A position comes from two columns, and names are made, not read. */
const NOT_OURS = ['parse_pair', 'designation_b1950', 'designation_gal', 'name_to_position'];
const isOurs = (row: Row) => !NOT_OURS.includes(row.text('kind'));

describe('coordinates against checks_coords.csv', () => {
  it('has all rows', () => expect(rows).toHaveLength(120));

  it.each(
    rows
      .filter(isOurs)
      .map(row => [`${row.text('id')} ${row.text('kind')} ${row.text('input')}`, row] as const),
  )('%s', (_, row) => {
    const expected = row.text('expected');
    const actual = result(row);
    if (row.text('tol_kind') === 'exact') expect(actual).toBe(expected);
    else expect(Math.abs(Number(actual) - Number(expected))).toBeLessThanOrEqual(row.number('tol'));
  });

  it.skip.each(rows.filter(row => !isOurs(row)).map(row => [row.text('id'), row.text('kind')]))(
    '%s %s: not used by the program',
    () => {},
  );
});
