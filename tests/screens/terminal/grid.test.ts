import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { textWidth } from '../../../src/screens/terminal/char-width.js';
import { Grid } from '../../../src/screens/terminal/grid.js';
import type { Look } from '../../../src/screens/terminal/look.js';

const DARK: Look = { palette: 'dark', glyphs: 'braille', depth: 'true' };
const plain = (line: string) => line.replace(/\x1b\[[0-9;]*m/g, '');

describe('Grid', () => {
  it('puts text where it belongs and leaves out what lies outside', () => {
    const grid = new Grid(6, 2);
    grid.put(-2, 0, 'abcd');
    grid.put(4, 1, 'xyz');
    grid.put(0, 2, 'below');
    expect(grid.toPlainText()).toBe('cd\n    xy');
  });

  it('takes neither controls nor marks for characters', () => {
    const grid = new Grid(6, 1);
    grid.put(0, 0, 'a\x1b[31m\x9bb\u0301');
    expect(grid.toPlainText()).toBe('a[31mb');
  });

  it('a style begins and ends where it should, and plain blanks stay plain', () => {
    const grid = new Grid(8, 1);
    grid.put(1, 0, 'ab', { bold: true });
    grid.put(4, 0, 'c', { inverse: true });
    expect(grid.toLines(DARK)).toEqual([' \x1b[0;1mab\x1b[0m \x1b[0;7mc\x1b[0m   ']);
  });

  it('in the red palette also unstyled text is red', () => {
    const grid = new Grid(4, 1);
    grid.put(0, 0, 'ab');
    expect(grid.toLines({ ...DARK, palette: 'red' })).toEqual(['\x1b[0;38;2;215;0;0mab\x1b[0m  ']);
  });

  it('pastes another grid with its styles', () => {
    const inner = new Grid(2, 1);
    inner.put(0, 0, 'in', { bold: true });
    const outer = new Grid(4, 2);
    outer.paste(1, 1, inner);
    expect(outer.toPlainText()).toBe('\n in');
    expect(outer.styleAt(2, 1)).toEqual({ bold: true });
  });

  it('rows keep their width, wherever wide characters are cut or covered', () => {
    const place = fc.record({
      x: fc.integer({ min: -3, max: 11 }),
      text: fc.constantFrom('中', '文a', 'b', '中文', '\u{1f52d}', ' '),
    });
    fc.assert(
      fc.property(fc.array(place, { maxLength: 8 }), fc.integer({ min: -4, max: 8 }), (places, shift) => {
        const grid = new Grid(10, 1);
        for (const { x, text } of places) grid.put(x, 0, text);
        const other = new Grid(10, 1);
        other.paste(shift, 0, grid);
        for (const each of [grid, other]) expect(textWidth(plain(each.toLines(DARK)[0]))).toBe(10);
      }),
      { numRuns: 500, seed: 5 },
    );
  });
});
