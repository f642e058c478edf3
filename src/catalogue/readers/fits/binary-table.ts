import { LIMITS } from '../../limits.js';
import type { ProblemList } from '../../problems.js';
import { type SafeText, safeText } from '../../safe-text.js';
import { CellDecoder, type ReadOptions, type SheetColumn } from '../../sheet.js';
import { BATCH_ROWS, type FillRows, fillBits, filler, fillLogical } from './binary-numbers.js';
import { type BinaryFormat, hasOneValue } from './formats.js';
import type { BinaryLayout, FitsColumn } from './layout.js';

type Column = FitsColumn<BinaryFormat>;

interface Filling {
  readonly column: Column;
  readonly values: Float64Array;
  readonly fill: FillRows;
}

/** Reads the columns that are wanted of a binary table (FITS Standard 4.0, 7.3). */
export class BinaryTableReader {
  private readonly cells = new CellDecoder();
  private readonly view: DataView;

  constructor(
    private readonly bytes: Uint8Array,
    private readonly layout: BinaryLayout,
    private readonly rows: number,
  ) {
    this.view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  }

  read(options: ReadOptions, problems: ProblemList): SheetColumn[] {
    const columns: SheetColumn[] = [];
    const fillings: Filling[] = [];
    for (const column of this.layout.columns) {
      const use = options.use(column.head);
      if (use === 'skip' || column.format.repeat === 0) continue;
      const { head, format } = column;
      if (!hasOneValue(format)) {
        problems.add('many-values', 0, `'${head.name}' is ${describe(format)}, expected one value a row`);
      } else if (format.type === 'A') {
        columns.push({ ...head, kind: 'text', text: row => this.word(column, row) });
      } else if (format.type === 'K' && use === 'text') {
        columns.push({ ...head, kind: 'text', text: row => this.wholeNumber(column, row) });
      } else {
        const values = new Float64Array(this.rows);
        fillings.push({ column, values, fill: this.fillerOf(format, values) });
        if (use === 'value') columns.push({ ...head, kind: 'number', values });
        else columns.push({ ...head, kind: 'text', text: row => numberText(values[row]) });
      }
    }
    this.fill(fillings);
    return columns;
  }

  /** Batch by batch through all columns, so that the table's bytes are fetched from memory once. */
  private fill(fillings: readonly Filling[]): void {
    for (let from = 0; from < this.rows; from += BATCH_ROWS) {
      const to = Math.min(this.rows, from + BATCH_ROWS);
      for (const { column, values, fill } of fillings) {
        fill(from, to, this.place(column, from), this.layout.rowBytes);
        makeValues(column, values, from, to);
      }
    }
  }

  private fillerOf({ type, repeat }: BinaryFormat, out: Float64Array): FillRows {
    if (type === 'L') return fillLogical(this.bytes, out, repeat);
    if (type === 'X') return fillBits(this.bytes, out, repeat);
    return filler(type as 'B', this.view, out);
  }

  private place({ start }: Column, row: number): number {
    return this.layout.unit.dataStart + row * this.layout.rowBytes + start;
  }

  /** A string ends at its first zero byte; blanks at its end fill it up. */
  private word(column: Column, row: number): SafeText {
    const start = this.place(column, row);
    const width = Math.min(column.format.bytes, LIMITS.cell_bytes);
    let length = 0;
    while (length < width && this.bytes[start + length] !== 0) length++;
    return safeText(this.cells.text(this.bytes, start, length).trimEnd());
  }

  /** All digits of a 64-bit number, as an identifier needs them. */
  private wholeNumber(column: Column, row: number): SafeText {
    const { scale, zero, missing } = column;
    const stored = this.view.getBigInt64(this.place(column, row));
    if (missing !== '' && String(stored) === missing) return safeText('');
    if (scale === 1 && Number.isInteger(zero)) return safeText(String(stored + BigInt(zero)));
    return numberText(Number(stored) * scale + zero);
  }
}

function describe({ type, repeat }: BinaryFormat): string {
  if (type === 'P' || type === 'Q') return 'a list of varying length';
  if (type === 'C' || type === 'M') return 'of complex numbers';
  return `an array of ${repeat}`;
}

/** What is stored becomes a value: none where it is set aside for that or not finite, else scaled. */
function makeValues(
  { format, scale, zero, missing }: Column,
  values: Float64Array,
  from: number,
  to: number,
) {
  if (missing !== '' && 'BIJK'.includes(format.type)) {
    const none = Number(missing);
    for (let row = from; row < to; row++) if (values[row] === none) values[row] = Number.NaN;
  }
  if ((scale === 1 && zero === 0) || !'BIJKED'.includes(format.type)) return;
  for (let row = from; row < to; row++) {
    const value = values[row] * scale + zero;
    values[row] = Number.isFinite(value) ? value : Number.NaN;
  }
}

function numberText(value: number): SafeText {
  return safeText(Number.isNaN(value) ? '' : String(value));
}
