import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { PROBLEM_CODES } from '../../src/catalogue/problem-codes.js';
import { formatProblem } from '../../src/catalogue/problems.js';
import { readFrame } from '../../src/catalogue/read-frame.js';
import { INPUT } from './input.js';

/** One file for each way to break; its name begins with the code that it has to give. */
const FOLDER = new URL('../broken/', import.meta.url);

/** What is still read of the file (rows), and what the observer has to see. */
const BROKEN: Readonly<Record<string, readonly [rows: number, ...phrases: string[]]>> = {
  'empty-file.no-rows.csv': [0, 'no rows and no column names'],
  'empty-file.header-only.csv': [0, 'no row below it'],
  'not-a-table.binary': [0, 'looks like a binary file'],
  'not-a-table.xml': [0, 'looks like an XML'],
  'not-a-table.one-column.txt': [0, 'nothing splits the first line'],
  'not-a-table.image.fits': [0, 'this FITS file holds an image or nothing, expected a table extension'],
  'not-a-table.images.fits': [0, 'this FITS file holds 2 images'],
  'empty-file.table.fits': [0, 'the table has no rows'],
  'cut-short.header.fits': [0, 'the header of part 2 has no END'],
  'cut-short.rows.fits': [2, 'the table declares 6 rows, the file has 2 of them'],
  'cut-short.part.fits': [6, 'part 3 declares 3600 bytes of data, the file has 2880 of them'],
  'cut-short.absurd.fits': [120, 'the table declares 9999999999999 rows, the file has 120 of them'],
  'cut-short.csv.gz': [0, 'the gzip stream stops before its end', 'read anew as soon as it changes'],
  'damaged.csv.gz': [0, 'the gzip stream cannot be unpacked, or not to what it was'],
  'damaged.format.fits': [0, "TFORM3 is '8Y', expected the format of a column"],
  'damaged.width.fits': [0, 'column 3 ends at byte 400012 of a row, expected at most 24 (NAXIS1)'],
  'damaged.size.fits': [0, 'the header of part 2 does not say how long its data are'],
  'too-large.columns.fits': [0, 'a table of 999 columns, at most 512 are read'],
  'many-values.fits': [6, "'B' is an array of 3, expected one value a row"],
  'more-tables.fits': [6, "'FIRST' is read, and not extension 2, 'LAST'"],
  'no-header.csv': [0, 'no-header.csv:1: ', 'holds numbers, not column names'],
  'no-position.csv': [0, 'among the columns x, y, V, e_V', 'ra = "ALPHA"'],
  'no-data.csv': [0, 'among the columns id, ra, dec, x, y'],
  'no-band.csv': [0, 'band = "V" under [input]'],
  'unknown-band.header.csv': [0, "FILTER is 'Halpha', expected one of U B V"],
  'unknown-band.johnson-or-cousins.csv': [0, "FILTER is 'R'", 'Johnson or Cousins', '"mag.Rc" = "R"'],
  'ambiguous-column.johnson-or-cousins.csv': [1, "'R' may be Johnson or Cousins", '"mag.Rc" = "R"'],
  'ambiguous-column.two-of-a-kind.csv': [0, "'V' and 'Vmag' both look like mag.V", '"mag.V" = "V"'],
  'ambiguous-column.capitals.csv': [1, "'GMAG' may be mag.G or mag.g"],
  'unknown-unit.csv': [1, "'V' is in 'Jy', expected one of mag, mmag"],
  'text-column.decimal-comma.csv': [2, "begins with '12,5'", 'decimal point'],
  'row-width.csv': [2, 'row-width.csv:3: ', '4 cells where the header has 5', 'row-width.csv:4: ', '6 cells'],
  'open-quote.csv': [2, 'open-quote.csv:3: ', 'never closed'],
  'bad-number.csv': [2, "bad-number.csv:3: bad-number V is '1e999'", "V is '0x10'"],
  'bad-position.degrees.csv': [1, 'RA 400 and Dec 20 degrees', 'Dec -91 degrees'],
  'bad-position.sexagesimal.csv': [1, "ra is '12:60:00': the minutes are 60", 'beyond the pole'],
  'repeated-star.csv': [2, 'repeated-star.csv:4: ', "a second row for 'b'"],
  'repeated-ids.csv': [3, '3 rows share 1 identifiers', 'matched by position'],
  'no-errors.csv': [1, 'V: no errors; 0.05 mag is assumed'],
  'all-suspect.csv': [3, "'flag' speaks against 3 of 3 rows"],
  'bad-time.csv': [1, "DATE-OBS is '2026-11-08', expected a date with a time"],
  'missing-column.csv': [1, "no 'QUALITY' (flag in the profile)"],
};

/** Given elsewhere: by the folder watcher. */
const NOT_HERE = ['unreadable', 'not-regular'];

describe('broken files', () => {
  it('are all in the table', () => {
    expect(readdirSync(FOLDER).sort()).toEqual(Object.keys(BROKEN).sort());
  });

  it('cover every code', () => {
    const covered = new Set(Object.keys(BROKEN).map(name => name.split('.')[0]));
    expect(Object.keys(PROBLEM_CODES).filter(code => !covered.has(code))).toEqual(NOT_HERE);
  });

  it.each(Object.entries(BROKEN))('%s', async (name, [rows, ...phrases]) => {
    const input = name.startsWith('missing-column') ? { ...INPUT, columns: { flag: 'QUALITY' } } : INPUT;
    const { frame, problems } = await readFrame(name, readFileSync(new URL(name, FOLDER)), input);
    expect(frame?.rows ?? 0).toBe(rows);
    if (frame === undefined) expect(problems.some(problem => problem.cost === 'file')).toBe(true);
    expect(problems.map(problem => problem.code)).toContain(name.split('.')[0]);
    const seen = problems.map(formatProblem).join('\n');
    for (const phrase of phrases) expect(seen).toContain(phrase);
  });
});
