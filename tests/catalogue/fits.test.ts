import { readdirSync, readFileSync } from 'node:fs';
import { gunzipSync } from 'node:zlib';
import { describe, expect, it } from 'vitest';
import { ProblemList } from '../../src/catalogue/problems.js';
import { parseAsciiFormat, parseBinaryFormat } from '../../src/catalogue/readers/fits/formats.js';
import { readHeader } from '../../src/catalogue/readers/fits/header.js';
import { readFits } from '../../src/catalogue/readers/fits/read-fits.js';
import { safeText } from '../../src/catalogue/safe-text.js';
import type { ColumnUse, Sheet } from '../../src/catalogue/sheet.js';
import { UNREADABLE } from '../../src/catalogue/sheet.js';
import { bytesOf } from './input.js';

const FOLDER = new URL('../samples/', import.meta.url);
type Cells = Readonly<Record<string, readonly (number | string | null)[]>>;

function expectedCells(name: string): Cells {
  const text = readFileSync(new URL(name.replace(/(\.\w+)+$/, '.json'), FOLDER), 'utf8');
  return (JSON.parse(text) as { cells?: Cells }).cells ?? {};
}

const SAMPLES = readdirSync(FOLDER)
  .filter(name => name.endsWith('.fits'))
  .map(name => [name, expectedCells(name)] as const)
  .filter(([, cells]) => Object.keys(cells).length > 0);

function sheetOf(bytes: Uint8Array, use: (name: string) => ColumnUse = () => 'value') {
  const problems = new ProblemList(safeText('table.fits'));
  const sheet = readFits(bytes, { use: head => use(head.name), missing: [] }, problems);
  return { sheet, problems: problems.all() };
}

function cellsOf(sheet: Sheet | undefined, name: string): (number | string)[] {
  const column = sheet?.columns.find(candidate => candidate.name === name);
  if (column === undefined || sheet === undefined) throw new Error(`no column ${name}`);
  if (column.kind === 'number') return [...column.values];
  return Array.from({ length: sheet.rows }, (_, row) => column.text(row));
}

/** A file of one table from its cards and its rows. */
function fits(
  cards: readonly string[],
  data: Uint8Array | string,
  primary: readonly string[] = [],
): Uint8Array {
  const block = (text: string, filling: string) => text.padEnd(Math.ceil(text.length / 2880) * 2880, filling);
  const header = (lines: readonly string[]) =>
    block([...lines, 'END'].map(line => line.padEnd(80)).join(''), ' ');
  const latin = typeof data === 'string' ? data : String.fromCharCode(...data);
  const text =
    header(['SIMPLE  =                    T', 'BITPIX  =                    8', 'NAXIS   = 0', ...primary]) +
    header(cards) +
    block(latin, '\0');
  return Uint8Array.from(text, character => character.charCodeAt(0));
}

function tableCards(kind: string, rowBytes: number, rows: number, ...formats: readonly string[]): string[] {
  return [
    `XTENSION= '${kind}'`,
    ...['BITPIX  = 8', 'NAXIS   = 2', `NAXIS1  = ${rowBytes}`, `NAXIS2  = ${rows}`, 'PCOUNT  = 0'],
    `TFIELDS = ${formats.length}`,
    ...formats.flatMap((format, i) => [
      `TFORM${i + 1}  = '${format}'`,
      `TTYPE${i + 1}  = '${'abcdefgh'[i]}'`,
    ]),
  ];
}

describe.each(SAMPLES)('cells of %s', (name, expected) => {
  const bytes = readFileSync(new URL(name, FOLDER));
  it.each(Object.entries(expected))('%s, as Astropy 5.2 reads it', (column, values) => {
    const isText = values.some(value => typeof value === 'string');
    const { sheet } = sheetOf(bytes, seen => (seen === column && isText ? 'text' : 'value'));
    const actual = cellsOf(sheet, column);
    // Single precision and whole numbers come out as the same double, to the last bit.
    values.forEach((value, row) => {
      expect(actual[row]).toBe(value === null ? Number.NaN : value);
    });
  });
});

describe('FITS tables', () => {
  it('keep the columns that are asked for, name all, and tell of unreadable ones among those asked for', () => {
    const bytes = readFileSync(new URL('all-types.fits', FOLDER));
    const { sheet, problems } = sheetOf(bytes, name => (name === 'V' || name === 'ra' ? 'value' : 'skip'));
    expect(sheet?.columns.map(({ name, unit }) => [name, unit])).toEqual([
      ['ra', 'deg'],
      ['V', 'mag'],
    ]);
    expect(sheet?.names).toContain('complexes');
    expect(problems).toEqual([]);
    expect(sheetOf(bytes).problems.map(({ text }) => text.split(',')[0])).toEqual([
      "'complex' is of complex numbers",
      "'complexes' is of complex numbers",
      "'singles' is an array of 3",
    ]);
  });

  it('take descriptors from either keyword', () => {
    const cards = [
      ...tableCards('BINTABLE', 8, 1, 'E', 'E'),
      "TUCD1   = 'pos.eq.ra'",
      "TBUCD2  = 'pos.eq.dec'",
    ];
    const { sheet } = sheetOf(fits(cards, new Uint8Array(8)));
    expect(sheet?.columns.map(({ ucd }) => ucd)).toEqual(['pos.eq.ra', 'pos.eq.dec']);
  });

  it('put the keywords of the table before those of the file, and clean them', () => {
    const primary = ["FILTER  = 'B       '", 'EXPTIME = 6.0D1 / seconds', "OBJECT  = 'a\u001b[31mb'"];
    const cards = [...tableCards('BINTABLE', 2, 1, 'B', 'B'), "FILTER  = 'V'", 'HIERARCH Long Name = 7 / x'];
    const { sheet } = sheetOf(fits(cards, 'ab', primary));
    const { header } = sheet as Sheet;
    expect(header.get('FILTER')).toBe('V');
    expect(header.get('EXPTIME')).toBe('6.0E1');
    expect(header.get('OBJECT')).toBe('ab');
    expect(header.get('LONG NAME')).toBe('7');
  });

  it('of letters: implied decimal points, empty and missing cells, exponents with D, rubbish', () => {
    const rows = ['12345', ' 1.25', '     ', '-9999', '1.5D1', '0x123'];
    const cards = [...tableCards('TABLE', 6, rows.length, 'F5.2', 'A1'), "TNULL1  = '-9999'"];
    const places = ['TBCOL1  = 1', 'TBCOL2  = 6'];
    const { sheet } = sheetOf(fits([...cards, ...places], rows.map(row => `${row}x`).join('')));
    const nothing = Number.NaN;
    expect(cellsOf(sheet, 'a')).toEqual([123.45, 1.25, nothing, nothing, 15, UNREADABLE]);
    expect(sheet?.unreadable).toEqual([{ row: 5, column: 'a', seen: '0x123' }]);
    expect(cellsOf(sheet, 'b')).toEqual(rows.map(() => 'x'));
  });

  it('whose columns lie over each other are refused: they would cost more than the file has bytes', () => {
    const cards = [...tableCards('TABLE', 4, 1, 'A3', 'A3'), 'TBCOL1  = 1', 'TBCOL2  = 2'];
    const { sheet, problems } = sheetOf(fits(cards, 'abcd'));
    expect(sheet).toBeUndefined();
    expect(problems.map(({ code }) => code)).toEqual(['damaged']);
  });

  it.each(['TBCOL2  = 0', 'TBCOL2  = -1', 'COMMENT'])(
    'of letters need the place of each column: %s',
    place => {
      const cards = [...tableCards('TABLE', 4, 1, 'A1', 'A1'), 'TBCOL1  = 1', place];
      const { sheet, problems } = sheetOf(fits(cards, 'abcd'));
      expect(sheet).toBeUndefined();
      expect(problems[0].text).toMatch(/^TBCOL2 is '[-0-9]*', expected the place of a column/);
    },
  );

  it('of which the first holds lists only are passed over for one with values', () => {
    const lists = fits(tableCards('BINTABLE', 16, 1, '2E', 'PE(9)'), '');
    const values = fits(tableCards('BINTABLE', 2, 1, 'B', 'B'), 'ab').subarray(2880);
    const { sheet, problems } = sheetOf(Buffer.concat([lists, Buffer.alloc(2880), values]));
    expect([sheet?.rows, problems]).toEqual([1, []]);
    expect(cellsOf(sheet, 'a')).toEqual([97]);
  });

  it('mask what fills up the last byte of a bit column, and know a logical cell that is neither', () => {
    const cards = tableCards('BINTABLE', 3, 2, '9X', 'L');
    const { sheet } = sheetOf(fits(cards, Uint8Array.of(0x80, 0xff, 0x54, 0, 0x7f, 0)));
    expect(cellsOf(sheet, 'a')).toEqual([2, 0]);
    expect(cellsOf(sheet, 'b')).toEqual([1, Number.NaN]);
  });

  it('end strings at a zero byte', () => {
    const cards = tableCards('BINTABLE', 6, 1, '5A', 'B');
    expect(cellsOf(sheetOf(fits(cards, 'a b\0cd')).sheet, 'a')).toEqual(['a b']);
  });

  it('skip what follows the last part and is none', () => {
    const bytes = fits(tableCards('BINTABLE', 2, 1, 'B', 'B'), 'ab');
    const { sheet, problems } = sheetOf(Buffer.concat([bytes, Buffer.alloc(2880, 'special records')]));
    expect([sheet?.rows, problems]).toEqual([1, []]);
  });

  it('need no filling behind their last row', () => {
    const bytes = fits(tableCards('BINTABLE', 2, 1, 'B', 'B'), 'ab');
    const { sheet, problems } = sheetOf(bytes.subarray(0, -2878));
    expect([sheet?.rows, problems]).toEqual([1, []]);
  });
});

describe('FITS headers', () => {
  const read = (...cards: string[]) => {
    const text = [...cards, 'END'].map(card => card.padEnd(80)).join('');
    const reading = readHeader(bytesOf(text), 0);
    return reading.kind === 'whole' ? Object.fromEntries(reading.header.values) : reading.kind;
  };

  it('join texts over several cards, and keep an ampersand that joins nothing', () => {
    expect(
      read("A       = 'one &'", "CONTINUE  'two&'", "CONTINUE  ' three' / remark", "B       = 'R&'"),
    ).toEqual({
      A: 'one two three',
      B: 'R&',
    });
  });

  it('take a quote from two, a slash within quotes, and the first of two equal keywords', () => {
    expect(read("A       = 'it''s / here' / remark", 'A       = 2', 'B       =   4 / remark')).toEqual({
      A: "it's / here",
      B: '4',
    });
  });

  it('pass over comments, and over cards without a value', () => {
    expect(read('COMMENT = 5', 'HISTORY x', '', 'HIERARCH nothing', 'KEY', 'CONTINUE lost')).toEqual({});
  });
});

describe('formats of columns (FITS Standard 4.0, tables 15 and 18)', () => {
  it.each([
    ['E', { type: 'E', repeat: 1, bytes: 4 }],
    ['20A', { type: 'A', repeat: 20, bytes: 20 }],
    ['60A12', { type: 'A', repeat: 60, bytes: 60 }],
    ['11X', { type: 'X', repeat: 11, bytes: 2 }],
    ['1PE(120)', { type: 'P', repeat: 1, bytes: 8 }],
    ['QD', { type: 'Q', repeat: 1, bytes: 16 }],
    ['2M', { type: 'M', repeat: 2, bytes: 32 }],
    ['0J', { type: 'J', repeat: 0, bytes: 0 }],
    ['1Z', undefined],
    ['', undefined],
    ['-1E', undefined],
  ])('%s', (text, format) => expect(parseBinaryFormat(text)).toEqual(format));

  it.each([
    ['A12', { type: 'A', bytes: 12, decimals: 0 }],
    ['F8.3', { type: 'F', bytes: 8, decimals: 3 }],
    ['I6', { type: 'I', bytes: 6, decimals: 0 }],
    ['F', undefined],
    ['8F', undefined],
  ])('%s in letters', (text, format) => expect(parseAsciiFormat(text)).toEqual(format));
});

it('the compressed sample is a FITS file inside', () => {
  const bytes = gunzipSync(readFileSync(new URL('header-facts.fits.gz', FOLDER)));
  expect(sheetOf(bytes).sheet?.header.get('ESO DET WIN1 STRX')).toBe('17');
});
