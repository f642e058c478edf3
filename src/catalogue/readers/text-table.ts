import { LIMITS } from '../limits.js';
import type { ProblemList } from '../problems.js';
import type { ReadOptions, Sheet } from '../sheet.js';
import { byteOrderMarkLength, foreignKind } from './file-kind.js';
import { readHeaderLines } from './header-lines.js';
import { readLayout } from './layout.js';
import { RowReader } from './row-reader.js';
import { detectSeparator, isTooWide } from './separator.js';

/**
 * Reads a text table: comma, semicolon, tab or blank separated, found from the content. A row that cannot be
 * read costs only itself; a file that is no table gives undefined and one problem of cost 'file'.
 */
export function readTextTable(
  bytes: Uint8Array,
  options: ReadOptions,
  problems: ProblemList,
): Sheet | undefined {
  if (bytes.length > LIMITS.file_bytes) {
    problems.add('too-large', 0, `${bytes.length} bytes where at most ${LIMITS.file_bytes} are read`);
    return undefined;
  }
  const foreign = foreignKind(bytes);
  if (foreign !== '') {
    problems.add('not-a-table', 0, `this looks like ${foreign}, not like a text table`);
    return undefined;
  }
  const top = readHeaderLines(bytes, byteOrderMarkLength(bytes));
  if (top.rowStart >= bytes.length) {
    problems.add('empty-file', 0, 'there are no rows and no column names');
    return undefined;
  }
  const separator = detectSeparator(bytes, top.rowStart, top.rowLine);
  if (separator === undefined && isTooWide(bytes, top.rowStart, top.rowLine)) {
    const seen = `the first line has more than ${LIMITS.columns} columns or ${LIMITS.line_bytes} bytes`;
    problems.add('too-large', top.rowLine, seen);
    return undefined;
  }
  if (separator === undefined) {
    const seen = 'nothing splits the first line into columns: no commas, semicolons, tabs or blanks';
    problems.add('not-a-table', top.rowLine, seen);
    return undefined;
  }
  const layout = readLayout(bytes, separator, top);
  if (layout === undefined) {
    problems.add('no-header', top.rowLine, 'the first line holds numbers, not column names');
    return undefined;
  }
  return new RowReader(bytes, layout, options, problems).read(top.keywords);
}
