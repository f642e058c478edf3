import { LIMITS } from '../limits.js';
import type { ProblemList } from '../problems.js';
import { type SafeText, safeText } from '../safe-text.js';
import {
  CellPlaces,
  type ColumnHead,
  type ReadOptions,
  type Sheet,
  type SheetColumn,
  UNREADABLE,
  type UnreadableCell,
} from '../sheet.js';
import type { Layout } from './layout.js';
import { missingWords } from './missing-words.js';
import { asciiText, parseNumber } from './parse-number.js';
import { RowScanner } from './row-scanner.js';

/** Rows looked at to tell number columns from text columns. */
const SAMPLE_ROWS = 200;

/** Longest word that may stand for "no value". */
const WORD_BYTES = 24;

interface KeptColumn {
  readonly index: number;
  readonly head: ColumnHead;
  readonly cells: Float64Array | CellPlaces;
}

/** Reads the data rows of one table into columns. */
export class RowReader {
  private readonly unreadable: UnreadableCell[] = [];
  private readonly missing: ReadonlySet<string>;

  constructor(
    private readonly bytes: Uint8Array,
    private readonly layout: Layout,
    private readonly options: ReadOptions,
    private readonly problems: ProblemList,
  ) {
    this.missing = missingWords(options.missing);
  }

  read(header: ReadonlyMap<string, SafeText>): Sheet | undefined {
    const { bytes, layout, problems } = this;
    const capacity = Math.min(LIMITS.rows, countLines(bytes, layout.start));
    const kept = this.keepColumns(capacity);
    const lines = new Uint32Array(capacity);
    const scanner = this.scanner();
    let rows = 0;
    let seen = 0;
    for (; scanner.next(); seen++) {
      if (!this.isWhole(scanner)) continue;
      if (rows === LIMITS.rows) {
        problems.add('too-large', scanner.line, `rows beyond the first ${LIMITS.rows} are not read`, 'row');
        break;
      }
      for (const column of kept) this.readCell(column, scanner, rows);
      lines[rows++] = scanner.line;
    }
    if (seen === 0) {
      problems.add('empty-file', 0, 'there is a header, but no row below it');
      return undefined;
    }
    return {
      rows,
      columns: kept.map(column => finished(column, rows)),
      names: layout.heads.map(head => head.name),
      header,
      lines: lines.subarray(0, rows),
      unreadable: this.unreadable,
    };
  }

  private scanner(): RowScanner {
    return new RowScanner(this.bytes, this.layout.separator, this.layout.start, this.layout.line);
  }

  private isWhole(scanner: RowScanner): boolean {
    const { problems } = this;
    if (scanner.fault === 'open-quote') {
      problems.add('open-quote', scanner.line, 'a quote is opened and never closed');
      return false;
    }
    if (scanner.fault === 'too-large') {
      const seen = `a line of more than ${LIMITS.line_bytes} bytes or ${LIMITS.columns} cells`;
      problems.add('too-large', scanner.line, seen, 'row');
      return false;
    }
    const width = this.layout.heads.length;
    let count = scanner.count;
    while (count > width && scanner.starts[count - 1] === scanner.ends[count - 1]) count--;
    if (count === width) return true;
    problems.add('row-width', scanner.line, `${scanner.count} cells where the header has ${width}`);
    return false;
  }

  /** Decides between numbers and text from the first rows, so that each cell is read once. */
  private keepColumns(capacity: number): KeptColumn[] {
    const uses = this.layout.heads.map(head => this.options.use(head));
    const numbers = new Uint32Array(uses.length);
    const words = new Uint32Array(uses.length);
    const scanner = this.scanner();
    for (let row = 0; row < SAMPLE_ROWS && scanner.next(); row++) {
      for (let i = 0; i < Math.min(scanner.count, uses.length); i++) {
        if (uses[i] !== 'value') continue;
        const start = scanner.starts[i];
        const end = scanner.ends[i];
        if (!Number.isNaN(parseNumber(this.bytes, start, end))) numbers[i]++;
        else if (!this.isMissing(start, end)) words[i]++;
      }
    }
    const kept: KeptColumn[] = [];
    this.layout.heads.forEach((head, index) => {
      if (uses[index] === 'skip') return;
      const isText = uses[index] === 'text' || words[index] > numbers[index];
      const cells = isText ? new CellPlaces(this.bytes, capacity) : new Float64Array(capacity);
      kept.push({ index, head, cells });
    });
    return kept;
  }

  private readCell({ index, head, cells }: KeptColumn, scanner: RowScanner, row: number): void {
    const start = scanner.starts[index];
    const end = scanner.ends[index];
    if (cells instanceof CellPlaces) {
      cells.set(row, start, end, scanner.doubled[index] === 1);
      return;
    }
    cells[row] = parseNumber(this.bytes, start, end);
    if (!Number.isNaN(cells[row]) || this.isMissing(start, end)) return;
    cells[row] = UNREADABLE;
    if (this.unreadable.length === LIMITS.unreadableCells) return;
    const seen = new TextDecoder().decode(this.bytes.subarray(start, Math.min(end, start + 40)));
    this.unreadable.push({ row, column: head.name, seen: safeText(seen) });
  }

  private isMissing(start: number, end: number): boolean {
    if (start === end) return true;
    if (end - start > WORD_BYTES) return false;
    return this.missing.has(asciiText(this.bytes, start, end).toLowerCase());
  }
}

function finished({ head, cells }: KeptColumn, rows: number): SheetColumn {
  if (cells instanceof CellPlaces) return { ...head, kind: 'text', text: row => cells.text(row) };
  return { ...head, kind: 'number', values: cells.subarray(0, rows) };
}

function countLines(bytes: Uint8Array, start: number): number {
  let lines = 1;
  for (let p = bytes.indexOf(10, start); p >= 0; p = bytes.indexOf(10, p + 1)) lines++;
  return lines;
}
