import { describe, expect, it } from 'vitest';
import { charWidth, textWidth } from '../../../src/screens/terminal/char-width.js';
import { glyphsOf } from '../../../src/screens/terminal/glyphs.js';
import { GLYPH_NAMES } from '../../../src/screens/terminal/look.js';

describe('the width of characters', () => {
  // East_Asian_Width and General_Category as the Unicode Character Database 16.0 gives them.
  it.each([
    ['U+0041 Na', 0x41, 1],
    ['U+00B1 A', 0xb1, 1],
    ['U+03B1 A', 0x3b1, 1],
    ['U+0300 Mn', 0x300, 0],
    ['U+0591 Mn', 0x591, 0],
    ['U+0940 Mc', 0x940, 1],
    ['U+0941 Mn', 0x941, 0],
    ['U+200B Cf', 0x200b, 0],
    ['U+202E Cf', 0x202e, 0],
    ['U+FEFF Cf', 0xfeff, 0],
    ['U+001B Cc', 0x1b, 0],
    ['U+009B Cc', 0x9b, 0],
    ['U+1100 W', 0x1100, 2],
    ['U+1160, joins a syllable', 0x1160, 0],
    ['U+231A W', 0x231a, 2],
    ['U+231C N', 0x231c, 1],
    ['U+2728 W', 0x2728, 2],
    ['U+2B50 W', 0x2b50, 2],
    ['U+303F N', 0x303f, 1],
    ['U+4E2D W', 0x4e2d, 2],
    ['U+AC00 W', 0xac00, 2],
    ['U+FF21 F', 0xff21, 2],
    ['U+FF71 H', 0xff71, 1],
    ['U+1F1E6 N', 0x1f1e6, 1],
    ['U+1F52D W', 0x1f52d, 2],
    ['U+1F321 N', 0x1f321, 1],
    ['U+20000 W', 0x20000, 2],
  ])('%s', (_, codePoint, width) => {
    expect(charWidth(codePoint)).toBe(width);
  });

  it('braille is one cell, all of it', () => {
    for (let dots = 0; dots < 256; dots++) expect(charWidth(0x2800 + dots)).toBe(1);
  });

  it('a text is as wide as its characters', () => {
    expect(textWidth('α Cen 中\u0301')).toBe(8);
  });
});

describe('glyphs', () => {
  it.each(GLYPH_NAMES)('%s: every sign is one cell', name => {
    for (const [sign, text] of Object.entries(glyphsOf(name))) {
      const cells = sign === 'plusMinus' && name === 'ascii' ? 2 : 1;
      expect(textWidth(text), sign).toBe(cells);
    }
  });

  it('ascii is ASCII, and no two kinds of star look alike in any set', () => {
    for (const text of Object.values(glyphsOf('ascii'))) expect(text).toMatch(/^[\x21-\x7e]+$/);
    for (const name of GLYPH_NAMES) {
      const { flagged, flaggedFresh, fresh, selected } = glyphsOf(name);
      expect(new Set([flagged, flaggedFresh, fresh, selected]).size).toBe(4);
    }
  });
});
