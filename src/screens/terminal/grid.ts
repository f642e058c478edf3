import { charWidth } from './char-width.js';
import type { Look } from './look.js';
import { type Style, sgrOf } from './palette.js';

/** A picture made of cells, drawn without knowing any terminal. Cells outside are silently left out. */
export class Grid {
  private readonly characters: string[];
  private readonly styles: (Style | undefined)[];

  constructor(
    readonly width: number,
    readonly height: number,
  ) {
    this.characters = new Array<string>(width * height).fill(' ');
    this.styles = new Array<Style | undefined>(width * height).fill(undefined);
  }

  /** Puts text from (x, y) to the right; x = 0, y = 0 is the top left cell. */
  put(x: number, y: number, text: string, style?: Style): void {
    let column = x;
    for (const character of text) {
      const width = charWidth(character.codePointAt(0) as number);
      if (width === 0) continue;
      this.set(column, y, character, style);
      // The second half of a wide character is no cell of its own.
      if (width === 2) this.set(column + 1, y, '', style);
      column += width;
    }
  }

  set(x: number, y: number, character: string, style?: Style): void {
    if (x < 0 || y < 0 || x >= this.width || y >= this.height) return;
    this.characters[y * this.width + x] = character;
    this.styles[y * this.width + x] = style;
  }

  at(x: number, y: number): string {
    return x < 0 || y < 0 || x >= this.width || y >= this.height ? '' : this.characters[y * this.width + x];
  }

  styleAt(x: number, y: number): Style | undefined {
    return this.styles[y * this.width + x];
  }

  /** Copies another grid into this one, its top left cell at (x, y). */
  paste(x: number, y: number, other: Grid): void {
    for (let row = 0; row < other.height; row++) {
      for (let column = 0; column < other.width; column++) {
        this.set(x + column, y + row, other.at(column, row), other.styleAt(column, row));
      }
    }
  }

  /** One string a row, with the escape sequences of the look. */
  toLines(look: Look): string[] {
    return Array.from({ length: this.height }, (_, y) => {
      let line = '';
      let current = '';
      for (let x = 0; x < this.width; x++) {
        const character = this.shownAt(x, y);
        const style = this.styleAt(x, y);
        // A blank nobody styled stays the terminal's own, so that the writer can erase to the end of the line.
        const sgr = character === ' ' && style === undefined ? '' : sgrOf(style, look);
        if (sgr !== current) {
          line += sgr === '' ? '\x1b[0m' : `\x1b[0;${sgr}m`;
          current = sgr;
        }
        line += character;
      }
      return current === '' ? line : `${line}\x1b[0m`;
    });
  }

  /** The characters alone, trailing blanks cut: what a test compares. */
  toPlainText(): string {
    const rows = Array.from({ length: this.height }, (_, y) =>
      Array.from({ length: this.width }, (_, x) => this.shownAt(x, y))
        .join('')
        .trimEnd(),
    );
    return rows.join('\n');
  }

  /** What is drawn at a cell: a wide character that lost one of its halves is a blank, so that rows keep their width. */
  private shownAt(x: number, y: number): string {
    const character = this.at(x, y);
    if (character === '') return x > 0 && isWide(this.at(x - 1, y)) ? '' : ' ';
    if (!isWide(character)) return character;
    return x + 1 < this.width && this.at(x + 1, y) === '' ? character : ' ';
  }
}

function isWide(character: string): boolean {
  // No wide character comes before the Hangul letters.
  return character >= '\u1100' && charWidth(character.codePointAt(0) as number) === 2;
}
