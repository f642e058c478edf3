import type { GlyphName } from './look.js';

/** The signs of a glyph set. Braille dots are drawn by the pictures themselves. */
export interface Glyphs {
  readonly horizontal: string;
  readonly vertical: string;
  readonly cross: string;
  readonly tickLeft: string;
  readonly tickBottom: string;
  /** A flagged star, and one flagged by the newest frame. */
  readonly flagged: string;
  readonly flaggedFresh: string;
  /** A star of the newest frame. */
  readonly fresh: string;
  readonly selected: string;
  readonly pointer: string;
  readonly barFull: string;
  readonly barEmpty: string;
  readonly plusMinus: string;
  readonly cut: string;
  readonly up: string;
  readonly down: string;
  readonly left: string;
  readonly right: string;
}

/**
 * Signs outside ASCII are one cell wide on every terminal (East Asian width neutral) where they mark a star; lines
 * and bars are of the box-drawing kind, which only terminals set up for Chinese or Japanese draw wide.
 */
const UNICODE: Glyphs = {
  horizontal: '─',
  vertical: '│',
  cross: '┼',
  tickLeft: '┤',
  tickBottom: '┬',
  flagged: '✶',
  flaggedFresh: '✹',
  fresh: '✦',
  selected: '⬥',
  pointer: '❯',
  barFull: '━',
  barEmpty: '┄',
  plusMinus: '±',
  cut: '…',
  up: '↑',
  down: '↓',
  left: '←',
  right: '→',
};

const ASCII: Glyphs = {
  horizontal: '-',
  vertical: '|',
  cross: '+',
  tickLeft: '+',
  tickBottom: '+',
  flagged: '*',
  flaggedFresh: '#',
  fresh: 'o',
  selected: '@',
  pointer: '>',
  barFull: '=',
  barEmpty: '.',
  plusMinus: '+-',
  cut: '~',
  up: '^',
  down: 'v',
  left: '<',
  right: '>',
};

export function glyphsOf(name: GlyphName): Glyphs {
  return name === 'ascii' ? ASCII : UNICODE;
}
