import { Grid } from '../terminal/grid.js';

/** Signs that have a plain stand-in of the same width; anything else outside ASCII becomes '?'. */
const STAND_INS: Readonly<Record<string, string>> = {
  '…': '~',
  '─': '-',
  '│': '|',
  '┌': '+',
  '┬': '+',
  '┐': '+',
  '├': '+',
  '┼': '+',
  '┤': '+',
  '└': '+',
  '┴': '+',
  '┘': '+',
};

/** Text for a terminal that shows ASCII only: names in files may hold anything. */
export function asciiText(text: string): string {
  return text.replace(/[^\x20-\x7e]/gu, sign => STAND_INS[sign] ?? '?');
}

/** The same for a whole picture. */
export function asciiOnly(grid: Grid): Grid {
  const plain = new Grid(grid.width, grid.height);
  for (let y = 0; y < grid.height; y++) {
    for (let x = 0; x < grid.width; x++) {
      const character = grid.at(x, y);
      plain.set(x, y, character === '' ? ' ' : asciiText(character), grid.styleAt(x, y));
    }
  }
  return plain;
}
