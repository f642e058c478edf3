/** How many colours the terminal can show. */
export type ColourDepth = 'none' | '16' | '256' | 'true';

export const PALETTE_NAMES = ['dark', 'light', 'red', 'mono'] as const;
export type PaletteName = (typeof PALETTE_NAMES)[number];

export const GLYPH_NAMES = ['braille', 'block', 'ascii'] as const;
export type GlyphName = (typeof GLYPH_NAMES)[number];

/** How the screens are drawn. */
export interface Look {
  readonly palette: PaletteName;
  readonly glyphs: GlyphName;
  readonly depth: ColourDepth;
}
