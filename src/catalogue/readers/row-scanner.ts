import { LIMITS } from '../limits.js';

const NEWLINE = 10;
const RETURN = 13;
const TAB = 9;
const BLANK = 32;
const QUOTE = 34;
const HASH = 35;

/** Cells are separated by this byte, or by any run of blanks and tabs. */
export type Separator = ',' | ';' | '\t' | ' ';

export type RowFault = '' | 'open-quote' | 'too-large';

/**
 * Walks the rows of a text table and finds the cells of each: comma, semicolon, tab or blank separated, quoted
 * cells with doubled quotes and line ends in them (RFC 4180), either line end, '#' comments, blank lines.
 * Nothing is copied: the public arrays hold places in the bytes and are overwritten by the next row.
 */
export class RowScanner {
  readonly starts = new Uint32Array(LIMITS.columns + 1);
  readonly ends = new Uint32Array(LIMITS.columns + 1);
  /** 1 where a quoted cell has doubled quotes in it. */
  readonly doubled = new Uint8Array(LIMITS.columns + 1);
  /** Cells of the row. */
  count = 0;
  /** Line on which the row begins, 1-based. */
  line = 0;
  fault: RowFault = '';
  /** Where the row begins in the bytes. */
  rowStart = 0;
  private readonly separatorByte: number;
  private readonly byBlanks: boolean;

  constructor(
    private readonly bytes: Uint8Array,
    separator: Separator,
    private position: number,
    private nextLine: number,
  ) {
    this.byBlanks = separator === ' ';
    this.separatorByte = separator.charCodeAt(0);
  }

  /** Moves to the next row; false at the end of the bytes. */
  next(): boolean {
    const { bytes } = this;
    while (this.position < bytes.length) {
      const start = this.position;
      const found = bytes.indexOf(NEWLINE, start);
      const lineEnd = found < 0 ? bytes.length : found;
      this.line = this.nextLine++;
      this.position = lineEnd + 1;
      const first = skipBlanks(bytes, start, lineEnd);
      if (first === lineEnd || bytes[first] === HASH || bytes[first] === RETURN) continue;
      this.rowStart = start;
      this.fault = '';
      this.count = 0;
      if (lineEnd - start > LIMITS.line_bytes) this.fault = 'too-large';
      else this.split(start, lineEnd);
      return true;
    }
    return false;
  }

  private split(start: number, firstLineEnd: number): void {
    const { bytes, separatorByte, byBlanks } = this;
    let lineEnd = firstLineEnd;
    let end = contentEnd(bytes, start, lineEnd);
    let p = start;
    for (;;) {
      p = byBlanks ? skipBlanks(bytes, p, end) : skipSpaces(bytes, p, end);
      if (byBlanks && p >= end) return;
      if (p < end && bytes[p] === QUOTE) {
        const close = this.closingQuote(p + 1);
        if (close < 0) {
          this.fault = 'open-quote';
          return;
        }
        this.keep(p + 1, close);
        if (close >= lineEnd) {
          this.nextLine += countNewlines(bytes, lineEnd, close);
          const found = bytes.indexOf(NEWLINE, close);
          lineEnd = found < 0 ? bytes.length : found;
          end = contentEnd(bytes, close, lineEnd);
          this.position = lineEnd + 1;
        }
        p = close + 1;
        // Anything between the closing quote and the separator is dropped.
        while (p < end && !this.isSeparator(bytes[p])) p++;
      } else {
        const cell = p;
        if (byBlanks) while (p < end && bytes[p] !== BLANK && bytes[p] !== TAB) p++;
        else while (p < end && bytes[p] !== separatorByte) p++;
        let cellEnd = p;
        while (cellEnd > cell && bytes[cellEnd - 1] === BLANK) cellEnd--;
        this.doubled[this.count] = 0;
        this.starts[this.count] = cell;
        this.ends[this.count] = cellEnd;
        this.count++;
      }
      if (this.count > LIMITS.columns) {
        this.fault = 'too-large';
        return;
      }
      if (p >= end) return;
      p++;
    }
  }

  private isSeparator(byte: number): boolean {
    return byte === this.separatorByte || (this.byBlanks && byte === TAB);
  }

  private keep(start: number, end: number): void {
    let doubled = 0;
    for (let i = start; i < end; i++) if (this.bytes[i] === QUOTE) doubled = 1;
    this.doubled[this.count] = doubled;
    this.starts[this.count] = start;
    this.ends[this.count] = end;
    this.count++;
  }

  /** Place of the quote that closes a cell; -1 when there is none within the longest line. */
  private closingQuote(from: number): number {
    const { bytes } = this;
    const limit = Math.min(bytes.length, from + LIMITS.line_bytes);
    for (let i = from; i < limit; i++) {
      if (bytes[i] !== QUOTE) continue;
      if (bytes[i + 1] !== QUOTE) return i;
      i++;
    }
    return -1;
  }
}

function skipBlanks(bytes: Uint8Array, from: number, end: number): number {
  let p = from;
  while (p < end && (bytes[p] === BLANK || bytes[p] === TAB)) p++;
  return p;
}

function skipSpaces(bytes: Uint8Array, from: number, end: number): number {
  let p = from;
  while (p < end && bytes[p] === BLANK) p++;
  return p;
}

function contentEnd(bytes: Uint8Array, start: number, lineEnd: number): number {
  return lineEnd > start && bytes[lineEnd - 1] === RETURN ? lineEnd - 1 : lineEnd;
}

function countNewlines(bytes: Uint8Array, from: number, to: number): number {
  let count = 0;
  for (let i = from; i < to; i++) if (bytes[i] === NEWLINE) count++;
  return count;
}
