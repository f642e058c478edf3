import { RowScanner, type Separator } from './row-scanner.js';

/** In this order where several fit equally well. */
const CANDIDATES: readonly Separator[] = ['\t', ';', ',', ' '];

const SAMPLE_ROWS = 30;

/**
 * Finds the separator from the content: the one that splits the first rows most often into as many cells as
 * the first of them. Undefined when none gives at least two cells. `start` and `line` are the place of the
 * first row that is not a comment.
 */
export function detectSeparator(bytes: Uint8Array, start: number, line: number): Separator | undefined {
  let best: Separator | undefined;
  let bestShare = 0;
  for (const candidate of CANDIDATES) {
    const share = sameWidthShare(new RowScanner(bytes, candidate, start, line));
    if (share > bestShare) {
      best = candidate;
      bestShare = share;
    }
  }
  return best;
}

function sameWidthShare(scanner: RowScanner): number {
  if (!scanner.next() || scanner.fault !== '' || scanner.count < 2) return 0;
  const width = scanner.count;
  let rows = 1;
  let same = 1;
  while (rows < SAMPLE_ROWS && scanner.next()) {
    rows++;
    if (scanner.fault === '' && scanner.count === width) same++;
  }
  return same / rows;
}

/** Does some separator split the first row into more columns than are read? */
export function isTooWide(bytes: Uint8Array, start: number, line: number): boolean {
  return CANDIDATES.some(candidate => {
    const scanner = new RowScanner(bytes, candidate, start, line);
    return scanner.next() && scanner.fault === 'too-large';
  });
}
