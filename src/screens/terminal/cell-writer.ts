import type { Overlay } from './canvas.js';
import { charWidth } from './char-width.js';
import { SgrTable } from './sgr-state.js';

const BLANK = 0x20;
/** Stands in the second cell of a wide character. */
const WIDE_REST = 0;
const ESCAPE = 0x1b;
/** Unchanged cells up to this many are written again rather than jumped over. */
const SHORT_GAP = 4;

/**
 * Turns whole frames (lines of text with colours) into the smallest update it can find cheaply: frames are compared
 * cell by cell, and only cells that changed are written. After `forget` the next frame is written whole.
 */
export class CellWriter {
  private readonly sgr = new SgrTable();
  private shown!: Screen;
  private wanted!: Screen;
  private dirty!: Uint8Array;
  private lastLines: readonly string[] = [];
  private isKnown = false;
  private hasWide = false;
  private out = '';
  /** Where the terminal's cursor is; -1 = not known (after the last column it is in between). */
  private x = -1;
  private y = -1;
  private style = 0;

  constructor(
    private columns: number,
    private rows: number,
  ) {
    this.resize(columns, rows);
  }

  resize(columns: number, rows: number): void {
    this.columns = columns;
    this.rows = rows;
    this.shown = new Screen(columns * rows);
    this.wanted = new Screen(columns * rows);
    this.dirty = new Uint8Array(columns);
    this.forget();
  }

  /** Nothing is known of what the terminal shows. */
  forget(): void {
    this.isKnown = false;
    this.lastLines = [];
  }

  /** The bytes that make the terminal show this frame with its overlays; '' when it already does. */
  frame(text: string, overlays: Iterable<Overlay> = []): string {
    const lines = text.split('\n');
    const placed = [...overlays];
    const keys = this.lineKeys(lines, placed);
    this.out = '';
    this.x = -1;
    this.y = -1;
    if (!this.isKnown) this.clear();
    for (let y = 0; y < this.rows; y++) {
      if (this.isKnown && keys[y] === this.lastLines[y]) continue;
      this.takeLine(lines[y] ?? '', y, 0, true);
      for (const overlay of placed) {
        const line = overlay.lines[y - overlay.y];
        if (line !== undefined) this.takeLine(line, y, overlay.x, false);
      }
      if (this.findDirty(y)) this.writeLine(y);
    }
    this.setStyle(0);
    this.lastLines = keys;
    this.isKnown = true;
    return this.out;
  }

  private clear(): void {
    this.out = '\x1b[0m\x1b[H\x1b[2J';
    this.style = 0;
    this.x = 0;
    this.y = 0;
    this.shown.blank();
  }

  /** A line with everything laid over it, as one text: equal texts need no look at their cells. */
  private lineKeys(lines: readonly string[], overlays: readonly Overlay[]): string[] {
    const keys = Array.from({ length: this.rows }, (_, y) => lines[y] ?? '');
    for (const overlay of overlays) {
      overlay.lines.forEach((line, i) => {
        if (overlay.y + i < this.rows) keys[overlay.y + i] += `\0${overlay.x},${line}`;
      });
    }
    return keys;
  }

  private takeLine(line: string, y: number, start: number, fill: boolean): void {
    const base = y * this.columns;
    let x = start;
    let style = 0;
    // Half a wide character would shift the row: what is laid over one half takes the other with it.
    if (x > 0 && x < this.columns && this.wanted.code[base + x] === WIDE_REST) {
      this.wanted.set(base + x - 1, BLANK, 0);
    }
    for (let i = 0; i < line.length; ) {
      const codePoint = line.codePointAt(i) as number;
      if (codePoint === ESCAPE) {
        const end = sequenceEnd(line, i);
        if (line[end - 1] === 'm' && line[i + 1] === '[')
          style = this.sgr.apply(style, line.slice(i + 2, end - 1));
        i = end;
        continue;
      }
      i += codePoint > 0xffff ? 2 : 1;
      const width = charWidth(codePoint);
      if (width === 0 || x + width > this.columns) continue;
      this.wanted.set(base + x++, codePoint, style);
      if (width === 2) {
        this.hasWide = true;
        this.wanted.set(base + x++, WIDE_REST, style);
      }
    }
    if (fill) this.wanted.blank(base + x, base + this.columns);
    else if (x < this.columns && this.wanted.code[base + x] === WIDE_REST) {
      this.wanted.set(base + x, BLANK, 0);
    }
  }

  private findDirty(y: number): boolean {
    const base = y * this.columns;
    let any = false;
    for (let x = 0; x < this.columns; x++) {
      const changed = !this.wanted.equals(this.shown, base + x);
      this.dirty[x] = changed ? 1 : 0;
      any ||= changed;
    }
    if (any && this.hasWide) this.joinWide(base);
    return any;
  }

  /** Both halves of a wide character change together, on the old screen and on the new one. */
  private joinWide(base: number): void {
    for (let again = true; again; ) {
      again = false;
      for (let x = 1; x < this.columns; x++) {
        const half = this.shown.code[base + x] === WIDE_REST || this.wanted.code[base + x] === WIDE_REST;
        if (half && this.dirty[x] !== this.dirty[x - 1]) {
          this.dirty[x] = 1;
          this.dirty[x - 1] = 1;
          again = true;
        }
      }
    }
  }

  private writeLine(y: number): void {
    const { columns, wanted, shown, dirty } = this;
    const base = y * columns;
    let last = columns - 1;
    while (last >= 0 && wanted.code[base + last] === BLANK && wanted.style[base + last] === 0) last--;
    for (let x = 0; x < columns; ) {
      if (dirty[x] === 0) {
        x++;
        continue;
      }
      this.moveTo(x, y);
      if (x > last) {
        this.setStyle(0);
        this.out += '\x1b[K';
        shown.blank(base + x, base + columns);
        return;
      }
      let isWide = false;
      while (x <= last && dirty[x] === 1 && !isWide) {
        const code = wanted.code[base + x];
        this.setStyle(wanted.style[base + x]);
        this.out += String.fromCodePoint(code);
        shown.set(base + x, code, wanted.style[base + x]);
        x++;
        isWide = x < columns && wanted.code[base + x] === WIDE_REST;
        if (isWide) {
          shown.set(base + x, WIDE_REST, wanted.style[base + x]);
          x++;
        }
      }
      // After the last column the cursor is in between; after a wide character terminals do not agree where it is.
      this.x = isWide || x >= columns ? -1 : x;
      this.y = this.x < 0 ? -1 : y;
    }
  }

  private moveTo(x: number, y: number): void {
    if (this.y === y && this.x >= 0 && x >= this.x) this.moveRight(x, y);
    else if (x === 0 && this.y >= 0 && y === this.y + 1) this.out += '\r\n';
    else if (x === 0) this.out += y === 0 ? '\x1b[H' : `\x1b[${y + 1}H`;
    else this.out += `\x1b[${y + 1};${x + 1}H`;
    this.x = x;
    this.y = y;
  }

  private moveRight(x: number, y: number): void {
    const gap = x - this.x;
    if (gap === 0) return;
    const base = y * this.columns;
    let repeat = gap <= SHORT_GAP;
    for (let k = this.x; repeat && k < x; k++) {
      const code = this.wanted.code[base + k];
      repeat = this.wanted.style[base + k] === this.style && code >= BLANK && code <= 0x7e;
    }
    if (repeat) for (let k = this.x; k < x; k++) this.out += String.fromCharCode(this.wanted.code[base + k]);
    else this.out += gap === 1 ? '\x1b[C' : `\x1b[${gap}C`;
  }

  private setStyle(style: number): void {
    this.out += this.sgr.sequence(this.style, style);
    this.style = style;
  }
}

/** The cells of a whole screen. */
class Screen {
  readonly code: Uint32Array;
  readonly style: Uint16Array;

  constructor(cells: number) {
    this.code = new Uint32Array(cells).fill(BLANK);
    this.style = new Uint16Array(cells);
  }

  set(cell: number, code: number, style: number): void {
    this.code[cell] = code;
    this.style[cell] = style;
  }

  equals(other: Screen, cell: number): boolean {
    return this.code[cell] === other.code[cell] && this.style[cell] === other.style[cell];
  }

  blank(from = 0, to = this.code.length): void {
    this.code.fill(BLANK, from, to);
    this.style.fill(0, from, to);
  }
}

/** End of the escape sequence that begins at i; a lone escape is passed over. */
function sequenceEnd(line: string, i: number): number {
  if (line[i + 1] !== '[') return i + 1;
  let end = i + 2;
  while (end < line.length && !/[@-~]/.test(line[end])) end++;
  return Math.min(line.length, end + 1);
}
