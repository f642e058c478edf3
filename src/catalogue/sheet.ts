import { LIMITS } from './limits.js';
import { type SafeText, safeText } from './safe-text.js';

/** What a file says of a column; empty where it says nothing. */
export interface ColumnHead {
  readonly name: SafeText;
  readonly unit: SafeText;
  /** Unified content descriptor, where the format carries one. */
  readonly ucd: SafeText;
}

export interface NumberColumn extends ColumnHead {
  readonly kind: 'number';
  /** NaN: the cell is empty. UNREADABLE: it holds something that is not a number. */
  readonly values: Float64Array;
}

export interface TextColumn extends ColumnHead {
  readonly kind: 'text';
  readonly text: (row: number) => SafeText;
}

export type SheetColumn = NumberColumn | TextColumn;

/** Stands in a number column for a cell that is no number: no real measurement is infinite. */
export const UNREADABLE = Number.POSITIVE_INFINITY;

/** A table as read, before anything is known of its meaning. */
export interface Sheet {
  readonly rows: number;
  /** The columns that were asked for, in the order of the file. */
  readonly columns: readonly SheetColumn[];
  /** The names of all columns of the file. */
  readonly names: readonly SafeText[];
  /** Header keywords in capitals, with their values. */
  readonly header: ReadonlyMap<string, SafeText>;
  /** Line of the file on which each row begins, 1-based; 0 in formats without lines. */
  readonly lines: Uint32Array;
  /** Text of the first unreadable cells, for messages. */
  readonly unreadable: readonly UnreadableCell[];
}

export interface UnreadableCell {
  readonly row: number;
  readonly column: SafeText;
  readonly seen: SafeText;
}

/** Whether a reader keeps a column, and as what: 'value' lets the cells decide between numbers and text. */
export type ColumnUse = 'skip' | 'text' | 'value';

/** What every reader has to be told. */
export interface ReadOptions {
  /** Which columns to keep, by what the file says of them. */
  readonly use: (head: ColumnHead) => ColumnUse;
  /** Words that mean "no value", beyond the usual ones. */
  readonly missing: readonly string[];
}

const DOUBLED_QUOTES = 0x8000;

/** Cells of one text column as places in the file's own bytes: nothing is decoded before it is asked for. */
export class CellPlaces {
  private readonly starts: Uint32Array;
  /** Length in bytes; the top bit marks a quoted cell with doubled quotes in it. */
  private readonly lengths: Uint16Array;
  private readonly cells = new CellDecoder();

  constructor(
    private readonly bytes: Uint8Array,
    rows: number,
  ) {
    this.starts = new Uint32Array(rows);
    this.lengths = new Uint16Array(rows);
  }

  set(row: number, start: number, end: number, doubledQuotes: boolean): void {
    this.starts[row] = start;
    this.lengths[row] = Math.min(end - start, LIMITS.cell_bytes) | (doubledQuotes ? DOUBLED_QUOTES : 0);
  }

  text(row: number): SafeText {
    const start = this.starts[row];
    const length = this.lengths[row] & ~DOUBLED_QUOTES;
    const raw = this.cells.text(this.bytes, start, length);
    return safeText(this.lengths[row] & DOUBLED_QUOTES ? raw.replaceAll('""', '"') : raw);
  }
}

/** Raw text of cells; what it gives has still to be made safe. */
export class CellDecoder {
  private readonly decoder = new TextDecoder();

  text(bytes: Uint8Array, start: number, length: number): string {
    return shortAscii(bytes, start, length) ?? this.decoder.decode(bytes.subarray(start, start + length));
  }
}

const SHORT_BYTES = 40;

/** Short plain cells, which nearly all are, several times as fast as the decoder does them. */
function shortAscii(bytes: Uint8Array, start: number, length: number): string | undefined {
  if (length > SHORT_BYTES) return undefined;
  let text = '';
  for (let i = start; i < start + length; i++) {
    if (bytes[i] > 0x7e) return undefined;
    text += String.fromCharCode(bytes[i]);
  }
  return text;
}
