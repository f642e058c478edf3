import type { ProblemList } from '../problems.js';
import type { Sheet, SheetColumn } from '../sheet.js';

/** Cells of a quality column that speak for the row, in lower case. */
const GOOD_WORDS = new Set([
  '',
  '0',
  'ok',
  'good',
  'clean',
  'false',
  'f',
  'no',
  'n',
  '-',
  '--',
  '---',
  'none',
  'nan',
]);

/** A share of marked rows that rather looks like a column read the wrong way round. */
const SUSPICIOUS_SHARE = 0.9;

/** 1 where any quality column has something against the row: a number other than 0, or a word. */
export function readSuspect(sheet: Sheet, flags: readonly SheetColumn[], problems: ProblemList): Uint8Array {
  const suspect = new Uint8Array(sheet.rows);
  for (const column of flags) {
    let marked = 0;
    for (let row = 0; row < sheet.rows; row++) {
      const isMarked =
        column.kind === 'number'
          ? Number.isFinite(column.values[row]) && column.values[row] !== 0
          : !GOOD_WORDS.has(column.text(row).trim().toLowerCase());
      if (!isMarked) continue;
      suspect[row] = 1;
      marked++;
    }
    if (marked > SUSPICIOUS_SHARE * sheet.rows && sheet.rows > 1) {
      problems.add('all-suspect', 0, `'${column.name}' speaks against ${marked} of ${sheet.rows} rows`);
    }
  }
  return suspect;
}
