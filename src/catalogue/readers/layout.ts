import { bareUnit, isUnitsLine, splitNameAndUnit } from '../columns/units.js';
import { LIMITS } from '../limits.js';
import { safeText } from '../safe-text.js';
import type { ColumnHead } from '../sheet.js';
import type { HeaderLines } from './header-lines.js';
import { parseNumber } from './parse-number.js';
import { RowScanner, type Separator } from './row-scanner.js';

/** How a text table is laid out. */
export interface Layout {
  readonly separator: Separator;
  readonly heads: readonly ColumnHead[];
  /** Place and line of the first data row; the length of the bytes when there is none. */
  readonly start: number;
  readonly line: number;
}

/**
 * Column names from the first row, or from the comment above it where that row is already data; then units.
 * Undefined when no line names the columns.
 */
export function readLayout(bytes: Uint8Array, separator: Separator, top: HeaderLines): Layout | undefined {
  const scanner = new RowScanner(bytes, separator, top.rowStart, top.rowLine);
  scanner.next();
  if (looksLikeData(bytes, scanner)) {
    const names = commentedNames(top.lastComment, separator, scanner.count);
    if (names === undefined) return undefined;
    return { separator, heads: makeHeads(names, []), start: top.rowStart, line: top.rowLine };
  }
  const names = cellTexts(bytes, scanner);
  let units: readonly string[] = [];
  while (scanner.next()) {
    const cells = cellTexts(bytes, scanner);
    const isRule = cells.every(cell => /^-*$/.test(cell)) && cells.some(cell => cell.length > 2);
    if (isRule) continue;
    if (units.length > 0 || cells.length !== names.length || !isUnitsLine(cells)) {
      return { separator, heads: makeHeads(names, units), start: scanner.rowStart, line: scanner.line };
    }
    units = cells;
  }
  return { separator, heads: makeHeads(names, units), start: bytes.length, line: scanner.line };
}

function commentedNames(comment: string, separator: Separator, width: number): string[] | undefined {
  const bytes = new TextEncoder().encode(comment);
  const scanner = new RowScanner(bytes, separator, 0, 1);
  if (!scanner.next() || scanner.count !== width || looksLikeData(bytes, scanner)) return undefined;
  return cellTexts(bytes, scanner);
}

function makeHeads(names: readonly string[], units: readonly string[]): ColumnHead[] {
  return names.map((cell, i) => {
    const { name, unit } = splitNameAndUnit(cell.trim());
    return {
      name: safeText(name, LIMITS.identifier_characters),
      unit: safeText(unit === '' ? bareUnit(units[i] ?? '') : unit, LIMITS.unit_characters),
      ucd: safeText(''),
    };
  });
}

/** Names are not numbers; data rows are numbers for the better part. */
function looksLikeData(bytes: Uint8Array, scanner: RowScanner): boolean {
  let numbers = 0;
  for (let i = 0; i < scanner.count; i++) {
    if (!Number.isNaN(parseNumber(bytes, scanner.starts[i], scanner.ends[i]))) numbers++;
  }
  return numbers * 2 >= scanner.count;
}

function cellTexts(bytes: Uint8Array, scanner: RowScanner): string[] {
  const decoder = new TextDecoder();
  const cells: string[] = [];
  for (let i = 0; i < scanner.count; i++) {
    const end = Math.min(scanner.ends[i], scanner.starts[i] + LIMITS.cell_bytes);
    const text = decoder.decode(bytes.subarray(scanner.starts[i], end));
    cells.push(scanner.doubled[i] ? text.replaceAll('""', '"') : text);
  }
  return cells;
}
