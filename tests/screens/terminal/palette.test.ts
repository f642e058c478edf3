import { describe, expect, it } from 'vitest';
import type { ColourDepth, PaletteName } from '../../../src/screens/terminal/look.js';
import { type Style, sgrOf, type Token } from '../../../src/screens/terminal/palette.js';

const TOKENS: readonly Token[] = [
  'text',
  'dim',
  'title',
  'accent',
  'good',
  'warning',
  'alarm',
  'track',
  'flagged',
  'fresh',
  'selected',
];
const TEFFS_K = [1000, 2600, 3300, 4500, 5772, 7000, 9500, 15_000, 30_000, 80_000, Number.NaN];
const STYLES: readonly Style[] = [
  {},
  ...TOKENS.map(colour => ({ colour })),
  ...TEFFS_K.map(teff_K => ({ colour: { teff_K } })),
];
const DEPTHS: readonly ColourDepth[] = ['none', '16', '256', 'true'];

const sgr = (style: Style, palette: PaletteName, depth: ColourDepth) =>
  sgrOf(style, { palette, depth, glyphs: 'braille' });

/** The colour of a style, 0-255 each; undefined where the terminal's own is left. */
function rgbOf(style: Style, palette: PaletteName): readonly [number, number, number] | undefined {
  const match = /38;2;(\d+);(\d+);(\d+)/.exec(sgr(style, palette, 'true'));
  return match === null ? undefined : [Number(match[1]), Number(match[2]), Number(match[3])];
}

/** Relative luminance and contrast ratio: Web Content Accessibility Guidelines 2.2, "Terms". */
function luminance(rgb: readonly number[]): number {
  const [r, g, b] = rgb.map(value => {
    const share = value / 255;
    return share <= 0.04045 ? share / 12.92 : ((share + 0.055) / 1.055) ** 2.4;
  });
  return 0.2126 * r + 0.7152 * g + 0.0722 * b;
}
function contrast(a: readonly number[], b: readonly number[]): number {
  const [high, low] = [luminance(a), luminance(b)].sort((x, y) => y - x);
  return (high + 0.05) / (low + 0.05);
}

describe('palettes', () => {
  it('no palette touches the background, in any depth', () => {
    for (const palette of ['dark', 'light', 'red', 'mono'] as const)
      for (const depth of DEPTHS)
        for (const style of STYLES) {
          const rest = sgr(style, palette, depth).replace(/38;(5;\d+|2;\d+;\d+;\d+)/, '');
          expect(rest).not.toMatch(/\b(4[0-9]|10[0-7])\b/);
        }
  });

  it('no colour at all without depth, and in mono', () => {
    for (const style of STYLES) {
      for (const palette of ['dark', 'light', 'red', 'mono'] as const)
        expect(sgr(style, palette, 'none')).toMatch(/^1?$/);
      for (const depth of DEPTHS) expect(sgr(style, 'mono', depth)).toMatch(/^1?$/);
    }
  });

  it('inverse, bold, dim and underline stay without colour', () => {
    const style: Style = { colour: 'warning', bold: true, dim: true, inverse: true, underline: true };
    expect(sgr(style, 'dark', 'none')).toBe('1;2;4;7');
    for (const colour of ['flagged', 'selected', 'alarm'] as const)
      expect(sgr({ colour }, 'mono', 'none')).toBe('1');
  });

  it.each([
    ['16', '93;'],
    ['256', '38;5;'],
    ['true', '38;2;'],
  ] as const)('depth %s', (depth, start) => {
    expect(`${sgr({ colour: 'flagged' }, 'dark', depth).replace('1;', '')};`.startsWith(start)).toBe(true);
  });

  it.each([
    ['dark', [0, 0, 0]],
    ['light', [255, 255, 255]],
  ] as const)(
    '%s can be read: contrast of at least 4.5, of what lies behind at least 2',
    (palette, ground) => {
      for (const colour of TOKENS) {
        const rgb = rgbOf({ colour }, palette);
        if (rgb === undefined) continue;
        expect(contrast(rgb, ground), colour).toBeGreaterThanOrEqual(colour === 'track' ? 2 : 4.5);
      }
      for (const teff_K of TEFFS_K) {
        const rgb = rgbOf({ colour: { teff_K } }, palette);
        if (rgb !== undefined) expect(contrast(rgb, ground), `${teff_K} K`).toBeGreaterThanOrEqual(3);
      }
    },
  );

  it('red is nothing but red light', () => {
    // The pure reds of the 256 colours.
    const pure = [52, 88, 124, 160, 196];
    for (const style of STYLES) {
      const rgb = rgbOf(style, 'red');
      expect(rgb?.slice(1)).toEqual([0, 0]);
      expect(rgb?.[0]).toBeGreaterThan(100);
      expect(sgr(style, 'red', '16')).toMatch(/^(1;)?(2;)?[39]1$/);
      expect(pure).toContain(Number(/38;5;(\d+)/.exec(sgr(style, 'red', '256'))?.[1]));
    }
  });

  it('a star is the bluer the hotter it is', () => {
    const blueness = TEFFS_K.slice(0, -1).map(teff_K => {
      const [r, , b] = rgbOf({ colour: { teff_K } }, 'dark')!;
      return b / r;
    });
    for (let i = 1; i < blueness.length; i++) expect(blueness[i]).toBeGreaterThanOrEqual(blueness[i - 1]);
    expect(blueness[0]).toBeLessThan(0.5);
    expect(blueness.at(-1)).toBeGreaterThan(1.5);
  });

  it('no star is white on white paper', () => {
    for (const teff_K of TEFFS_K) expect(sgr({ colour: { teff_K } }, 'light', '16')).not.toMatch(/37|97/);
  });
});
