import type { ProblemList } from '../problems.js';
import type { ReadOptions, Sheet } from '../sheet.js';
import { isFits } from './file-kind.js';
import { readFits } from './fits/read-fits.js';
import { readTextTable } from './text-table.js';

/** Reads a table of any known format, told by its first bytes. */
export async function readSheet(
  bytes: Uint8Array,
  options: ReadOptions,
  problems: ProblemList,
): Promise<Sheet | undefined> {
  if (isFits(bytes)) return readFits(bytes, options, problems);
  return readTextTable(bytes, options, problems);
}
