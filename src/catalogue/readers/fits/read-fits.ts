import { LIMITS } from '../../limits.js';
import type { ProblemList } from '../../problems.js';
import { type SafeText, safeText } from '../../safe-text.js';
import type { ReadOptions, Sheet } from '../../sheet.js';
import { AsciiTableReader } from './ascii-table.js';
import { BinaryTableReader } from './binary-table.js';
import { hasOneValue } from './formats.js';
import { type AsciiLayout, type BinaryLayout, layoutOf } from './layout.js';
import { type FitsFault, type FitsUnit, readUnits } from './units.js';

type Layout = BinaryLayout | AsciiLayout;

/**
 * Reads a table of a FITS file (FITS Standard 4.0): the first with columns that can be used. A file without one
 * gives undefined and a problem of cost 'file'; a file that ends early gives the rows that are there.
 */
export function readFits(bytes: Uint8Array, options: ReadOptions, problems: ProblemList): Sheet | undefined {
  const { units, fault } = readUnits(bytes);
  const { layouts, faults } = layoutsOf(units, bytes.length);
  const useful = layouts.filter(layout => isUseful(layout, options));
  const layout = useful[0] ?? layouts.find(({ rows }) => rows > 0) ?? layouts[0];
  if (layout === undefined) {
    const { code, seen } = faults[0] ?? fault ?? imagesOnly(units);
    problems.add(code, 0, seen, 'file');
    return undefined;
  }
  // The table that is read tells itself what is missing of it.
  const others = layout.unit === units.at(-1) && fault?.code === 'cut-short' ? faults : [...faults, fault];
  for (const other of others) if (other !== undefined) problems.add(other.code, 0, other.seen, 'nothing');
  if (useful.length > 1) {
    const names = useful.map(({ unit }) => nameOf(unit, units));
    problems.add('more-tables', 0, `${names[0]} is read, and not ${names.slice(1).join(', ')}`);
  }
  return readTable(bytes, layout, headerOf(units[0], layout.unit), options, problems);
}

function layoutsOf(units: readonly FitsUnit[], fileBytes: number) {
  const layouts: Layout[] = [];
  const faults: FitsFault[] = [];
  for (const unit of units) {
    if (unit.kind === 'image') continue;
    const layout = layoutOf(unit, fileBytes);
    if ('code' in layout) faults.push(layout);
    else layouts.push(layout);
  }
  return { layouts, faults };
}

/** A star needs a value, and an identifier or a position beside it: one column alone is no table of stars. */
function isUseful(layout: Layout, options: ReadOptions): boolean {
  const columns =
    layout.kind === 'ascii' ? layout.columns : layout.columns.filter(({ format }) => hasOneValue(format));
  const uses = columns.map(({ head }) => options.use(head)).filter(use => use !== 'skip');
  return layout.rows > 0 && uses.length > 1 && uses.includes('value');
}

function imagesOnly(units: readonly FitsUnit[]) {
  const parts = units.length === 1 ? 'an image or nothing' : `${units.length} images`;
  return { code: 'not-a-table', seen: `this FITS file holds ${parts}, expected a table extension` } as const;
}

/** Keywords of the file and of the table, the table's where both have one. */
function headerOf(primary: FitsUnit, table: FitsUnit): ReadonlyMap<string, SafeText> {
  const header = new Map<string, SafeText>();
  for (const { values } of [primary.header, table.header]) {
    for (const [key, value] of values) header.set(safeText(key), safeText(value));
  }
  return header;
}

function nameOf(unit: FitsUnit, units: readonly FitsUnit[]): string {
  const name = unit.header.text('EXTNAME');
  return name === '' ? `extension ${units.indexOf(unit)}` : `'${name}'`;
}

function readTable(
  bytes: Uint8Array,
  layout: Layout,
  header: ReadonlyMap<string, SafeText>,
  options: ReadOptions,
  problems: ProblemList,
): Sheet | undefined {
  const { declaredRows } = layout;
  if (layout.rows < declaredRows) {
    const seen = `the table declares ${declaredRows} rows, the file has ${layout.rows} of them`;
    problems.add('cut-short', 0, seen, layout.rows > 0 ? 'row' : 'file');
  } else if (declaredRows === 0) problems.add('empty-file', 0, 'the table has no rows');
  if (layout.rows === 0) return undefined;
  const rows = Math.min(layout.rows, LIMITS.rows);
  if (rows < layout.rows)
    problems.add('too-large', 0, `rows beyond the first ${LIMITS.rows} are not read`, 'row');
  const reader =
    layout.kind === 'ascii'
      ? new AsciiTableReader(bytes, layout, rows)
      : new BinaryTableReader(bytes, layout, rows);
  return {
    rows,
    columns: reader.read(options, problems),
    names: layout.columns.map(({ head }) => head.name),
    header,
    lines: new Uint32Array(rows),
    unreadable: reader instanceof AsciiTableReader ? reader.unreadable : [],
  };
}
