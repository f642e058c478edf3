import { textWidth } from '../terminal/char-width.js';
import { Grid } from '../terminal/grid.js';
import type { Style } from '../terminal/palette.js';

/** A stretch of text in one style. */
export interface Part {
  readonly text: string;
  readonly style?: Style;
}

export type Line = readonly Part[];

export const title = (text: string): Part => ({ text, style: { colour: 'title', bold: true } });
export const dim = (text: string): Part => ({ text, style: { colour: 'dim' } });
export const plain = (text: string): Part => ({ text });

/** Writes the parts one after the other; returns the column after the last. */
export function putParts(grid: Grid, x: number, y: number, parts: Line): number {
  let column = x;
  for (const { text, style } of parts) {
    grid.put(column, y, text, style);
    column += textWidth(text);
  }
  return column;
}

export function widthOf(parts: Line): number {
  return parts.reduce((sum, part) => sum + textWidth(part.text), 0);
}

/** Writes the parts so that they end at the right edge. */
export function putRight(grid: Grid, y: number, parts: Line): void {
  putParts(grid, grid.width - widthOf(parts), y, parts);
}

/** A picture of whole lines, at least `height` high. */
export function pageOf(lines: readonly Line[], width: number, height = 0): Grid {
  const grid = new Grid(width, Math.max(height, lines.length));
  lines.forEach((line, y) => {
    putParts(grid, 0, y, line);
  });
  return grid;
}

/** Part of a picture: `height` rows from a row on. */
export function rowsOf(page: Grid, from: number, height: number): Grid {
  const grid = new Grid(page.width, height);
  grid.paste(0, -from, page);
  return grid;
}
