import type { GlyphName } from '../terminal/look.js';
import type { DotGrid } from './raster.js';

/** Dots that a cell can show in each glyph set. */
export const DOT_GRIDS: Readonly<Record<GlyphName, DotGrid>> = {
  braille: { wide: 2, high: 4 },
  block: { wide: 2, high: 2 },
  ascii: { wide: 1, high: 2 },
};

/** Bit of each dot in the Unicode braille patterns, by row and column (Unicode Standard, block U+2800). */
const BRAILLE_BITS = [0x01, 0x08, 0x02, 0x10, 0x04, 0x20, 0x40, 0x80];
/** By mask: upper left 1, upper right 2, lower left 4, lower right 8. */
const QUADRANTS = ' ▘▝▀▖▌▞▛▗▚▐▜▄▙▟█';
/** By mask: upper 1, lower 2; and where a cell holds many. */
const ASCII = [' ', "'", '.', ':'];
const ASCII_MANY = '%';

/** The character of a cell with these dots; `crowded` for cells whose dots no longer tell how many there are. */
export function dotCharacter(mask: number, glyphs: GlyphName, crowded: boolean): string {
  switch (glyphs) {
    case 'braille': {
      let bits = 0;
      for (let bit = 0; bit < 8; bit++) if ((mask & (1 << bit)) !== 0) bits |= BRAILLE_BITS[bit];
      return String.fromCharCode(0x2800 + bits);
    }
    case 'block':
      return QUADRANTS[mask];
    case 'ascii':
      return crowded ? ASCII_MANY : ASCII[mask];
  }
}
