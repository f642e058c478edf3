import { LIMITS } from '../../limits.js';
import { safeText } from '../../safe-text.js';
import {
  CellDecoder,
  type ReadOptions,
  type SheetColumn,
  UNREADABLE,
  type UnreadableCell,
} from '../../sheet.js';
import { asciiText, parseNumber } from '../parse-number.js';
import type { AsciiFormat } from './formats.js';
import type { AsciiLayout, FitsColumn } from './layout.js';

type Column = FitsColumn<AsciiFormat>;

const BLANK = 32;
const POINT = 46;

/** Reads the columns that are wanted of an ASCII table (FITS Standard 4.0, 7.2). */
export class AsciiTableReader {
  readonly unreadable: UnreadableCell[] = [];
  private readonly cells = new CellDecoder();

  constructor(
    private readonly bytes: Uint8Array,
    private readonly layout: AsciiLayout,
    private readonly rows: number,
  ) {}

  read(options: ReadOptions): SheetColumn[] {
    const columns: SheetColumn[] = [];
    for (const column of this.layout.columns) {
      const use = options.use(column.head);
      if (use === 'skip' || column.format.bytes === 0) continue;
      if (use === 'text' || column.format.type === 'A') {
        columns.push({ ...column.head, kind: 'text', text: row => safeText(this.word(column, row)) });
      } else {
        columns.push({ ...column.head, kind: 'number', values: this.numbers(column) });
      }
    }
    return columns;
  }

  private place({ start }: Column, row: number): number {
    return this.layout.unit.dataStart + row * this.layout.rowBytes + start;
  }

  private word(column: Column, row: number): string {
    const width = Math.min(column.format.bytes, LIMITS.cell_bytes);
    const text = this.cells.text(this.bytes, this.place(column, row), width).trim();
    return text === column.missing ? '' : text;
  }

  private numbers(column: Column): Float64Array {
    const values = new Float64Array(this.rows);
    for (let row = 0; row < this.rows; row++) values[row] = this.number(column, row);
    return values;
  }

  /** An empty cell is none, though the standard has it as zero: a star of magnitude 0 would come of it. */
  private number(column: Column, row: number): number {
    const { bytes } = this;
    let start = this.place(column, row);
    let end = start + column.format.bytes;
    while (start < end && bytes[start] === BLANK) start++;
    while (end > start && bytes[end - 1] === BLANK) end--;
    if (start === end) return Number.NaN;
    if (column.missing !== '' && asciiText(bytes, start, end) === column.missing) return Number.NaN;
    const stored = parseNumber(bytes, start, end);
    if (!Number.isNaN(stored)) {
      const value = withPoint(stored, bytes, start, end, column.format) * column.scale + column.zero;
      return Number.isFinite(value) ? value : Number.NaN;
    }
    const seen = asciiText(bytes, start, Math.min(end, start + 40));
    if (/^[+-]?(nan|inf)/i.test(seen)) return Number.NaN;
    if (this.unreadable.length < LIMITS.unreadableCells) {
      this.unreadable.push({ row, column: column.head.name, seen: safeText(seen) });
    }
    return UNREADABLE;
  }
}

/** Digits without a decimal point have it in front of the last `decimals` of them (FITS Standard 4.0, 7.2.5). */
function withPoint(
  stored: number,
  bytes: Uint8Array,
  start: number,
  end: number,
  { type, decimals }: AsciiFormat,
): number {
  if (type === 'I' || decimals === 0) return stored;
  for (let p = start; p < end; p++) if (bytes[p] === POINT) return stored;
  return stored / 10 ** decimals;
}
