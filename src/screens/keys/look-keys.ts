import { GLYPH_NAMES, PALETTE_NAMES } from '../terminal/look.js';
import { done, type KeyEntry } from './key-entry.js';

/** The one after, and after the last the first. */
function after<Name>(names: readonly Name[], name: Name): Name {
  return names[(names.indexOf(name) + 1) % names.length];
}

export const LOOK_KEYS: readonly KeyEntry[] = [
  {
    keys: ['p'],
    shown: 'p',
    where: 'everywhere',
    does: 'Changes the colours: dark, light, red (for dark-adapted eyes), mono.',
    whyNot: state => (state.look.depth === 'none' ? 'this terminal shows no colours' : ''),
    run: state => {
      const palette = after(PALETTE_NAMES, state.look.palette);
      return done({ ...state, look: { ...state.look, palette }, message: `colours: ${palette}` });
    },
  },
  {
    keys: ['g'],
    shown: 'g',
    where: 'everywhere',
    does: 'Changes the signs the pictures are made of: braille, block, ascii.',
    run: state => {
      const glyphs = after(GLYPH_NAMES, state.look.glyphs);
      return done({ ...state, look: { ...state.look, glyphs }, message: `signs: ${glyphs}` });
    },
  },
  {
    keys: ['ctrl-l'],
    shown: 'Ctrl-L',
    where: 'everywhere',
    does: 'Draws the whole screen again.',
    run: state => ({ state, effects: [{ kind: 'redraw' }] }),
  },
];
