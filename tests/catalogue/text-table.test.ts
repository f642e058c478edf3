import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { LIMITS } from '../../src/catalogue/limits.js';
import { ProblemList } from '../../src/catalogue/problems.js';
import { readTextTable } from '../../src/catalogue/readers/text-table.js';
import { safeText } from '../../src/catalogue/safe-text.js';
import type { Sheet } from '../../src/catalogue/sheet.js';
import { bytesOf } from './input.js';

/** Reads with every column kept; columns whose name begins with 't' as text. */
function readAll(text: string): { sheet: Sheet | undefined; codes: string[] } {
  const problems = new ProblemList(safeText('table'));
  const sheet = readTextTable(
    bytesOf(text),
    { use: head => (head.name.startsWith('t') ? 'text' : 'value'), missing: ['-'] },
    problems,
  );
  return { sheet, codes: problems.all().map(problem => problem.code) };
}

/** Cells as numbers and texts, row by row. */
function cells(sheet: Sheet): (number | string)[][] {
  return Array.from({ length: sheet.rows }, (_, row) =>
    sheet.columns.map(column => (column.kind === 'number' ? column.values[row] : column.text(row))),
  );
}

const number = fc.double({ noNaN: true, noDefaultInfinity: true });
const word = fc.stringMatching(/^[ -~]{0,12}$/).map(text => text.trim());

function quoted(text: string): string {
  return `"${text.replaceAll('"', '""')}"`;
}

describe('text tables', () => {
  it.each([',', ';', '\t', ' '])('come back whole through separator %j', separator => {
    const row = fc.tuple(word, number, number);
    const lineEnd = fc.constantFrom('\n', '\r\n');
    fc.assert(
      fc.property(
        fc.array(row, { minLength: 1, maxLength: 30 }),
        lineEnd,
        fc.boolean(),
        (rows, end, closed) => {
          const lines = rows.map(([t, x, y]) => [quoted(t), String(x), String(y)].join(separator));
          const text = [['t', 'x', 'y'].join(separator), ...lines].join(end) + (closed ? end : '');
          const { sheet, codes } = readAll(text);
          expect(codes).toEqual([]);
          const expected = rows.map(([t, x, y]) => [t, Number(String(x)), Number(String(y))]);
          expect(cells(sheet as Sheet)).toEqual(expected);
        },
      ),
      { seed: 20261108, numRuns: 300 },
    );
  });

  it('never throw, whatever the bytes', () => {
    fc.assert(
      fc.property(fc.string({ unit: fc.constantFrom(...'ab,;\t \n\r"#12.-') }), text => {
        expect(() => readAll(text)).not.toThrow();
      }),
      { seed: 20261108, numRuns: 5000 },
    );
  });

  it('know the line of each row, across comments, blank lines and line ends in quotes', () => {
    const text = '# a\n\nt,x\n"two\nlines",1\n# between\n\nplain,2\n';
    const { sheet } = readAll(text);
    expect(cells(sheet as Sheet)).toEqual([
      ['two\ufffdlines', 1],
      ['plain', 2],
    ]);
    expect([...(sheet as Sheet).lines]).toEqual([4, 8]);
  });

  it('take empty cells behind the last column', () => {
    const { sheet, codes } = readAll('t,x\na,1,\nb,2,,\n');
    expect(codes).toEqual([]);
    expect(sheet?.rows).toBe(2);
  });

  it('take blanks around cells, runs of blanks and tabs, and blanks at the start of a line', () => {
    expect(cells(readAll('t , x\n a , 1 \n').sheet as Sheet)).toEqual([['a', 1]]);
    expect(cells(readAll('  t \t  x\n  a\t\t1\n').sheet as Sheet)).toEqual([['a', 1]]);
  });

  it('read missing words as missing, and other words as unreadable', () => {
    const { sheet } = readAll('t,x,y\na,1,1\nb,NaN,-\nc,null,\nd,oops,2\n');
    const [, x, y] = cells(sheet as Sheet)[3];
    expect(cells(sheet as Sheet).slice(1, 3)).toEqual([
      ['b', Number.NaN, Number.NaN],
      ['c', Number.NaN, Number.NaN],
    ]);
    expect([x, y]).toEqual([Number.POSITIVE_INFINITY, 2]);
    expect(sheet?.unreadable).toEqual([{ row: 3, column: 'x', seen: 'oops' }]);
  });

  it('read header keywords in all their forms, the first of a keyword', () => {
    const text =
      "#FILTER = 'V  ' / the filter\n# EXPTIME 60\n## DATE-OBS: 2026-11-08T21:14:03\n# FILTER = B\n# free text\nt,x\na,1\n";
    const header = readAll(text).sheet?.header;
    expect(Object.fromEntries(header ?? [])).toEqual({
      FILTER: 'V',
      EXPTIME: '60',
      'DATE-OBS': '2026-11-08T21:14:03',
      FREE: 'text',
    });
  });

  it('take names with units, and a line of units', () => {
    const heads = (text: string) => readAll(text).sheet?.columns.map(({ name, unit }) => [name, unit]);
    expect(heads('tid,parallax [mas],E(B-V)\na,1,2\n')).toEqual([
      ['tid', ''],
      ['parallax', 'mas'],
      ['E(B-V)', ''],
    ]);
    expect(heads('tid,ra,pm\n,[deg],mas/yr\na,1,2\n')).toEqual([
      ['tid', ''],
      ['ra', 'deg'],
      ['pm', 'mas/yr'],
    ]);
  });

  it('keep nothing of the columns that are not asked for', () => {
    const problems = new ProblemList(safeText('table'));
    const options = { use: () => 'skip' as const, missing: [] };
    const sheet = readTextTable(bytesOf('a,b\n1,oops\n2,3\n'), options, problems);
    expect(sheet?.columns).toEqual([]);
    expect(sheet?.names).toEqual(['a', 'b']);
    expect(sheet?.rows).toBe(2);
    expect(problems.all()).toEqual([]);
  });
});

describe('limits', () => {
  it('of columns: the last allowed is read, one more is refused', () => {
    const table = (columns: number) => {
      const names = Array.from({ length: columns }, (_, i) => `x${i}`).join(',');
      return readAll(`${names}\n${names.replaceAll('x', '')}\n`);
    };
    expect(table(LIMITS.columns).sheet?.columns).toHaveLength(LIMITS.columns);
    expect(table(LIMITS.columns + 1)).toEqual({ sheet: undefined, codes: ['too-large'] });
  });

  it('of a line: a longer one costs itself', () => {
    const long = 'x'.repeat(LIMITS.line_bytes);
    const { sheet, codes } = readAll(`t,x\na,1\n${long},2\nb,3\n`);
    expect(codes).toEqual(['too-large']);
    expect(cells(sheet as Sheet)).toEqual([
      ['a', 1],
      ['b', 3],
    ]);
  });

  it('of a cell: text is cut', () => {
    const { sheet } = readAll(`t,x\n${'y'.repeat(LIMITS.cell_bytes + 1)},1\n`);
    expect(cells(sheet as Sheet)[0][0]).toHaveLength(LIMITS.text_characters);
  });

  it('of a file: refused without being looked at', () => {
    const problems = new ProblemList(safeText('table'));
    const huge = { length: LIMITS.file_bytes + 1 } as Uint8Array;
    expect(readTextTable(huge, { use: () => 'skip', missing: [] }, problems)).toBeUndefined();
    expect(problems.all().map(problem => problem.code)).toEqual(['too-large']);
  });

  it('of quotes: a file of stray quotes is read once, not once a line', () => {
    const text = `t,x\n${'"a,1\n'.repeat(50_001)}`;
    expect(() => readAll(text)).not.toThrow();
  });
});
