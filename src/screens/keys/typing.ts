import { safeText } from '../../catalogue/safe-text.js';
import { chooseRows } from '../state/navigation.js';
import type { ScreenState } from '../state/screen-state.js';
import type { KeyPress } from '../terminal/key-press.js';

/** Longer than any identifier. */
const MOST_CHARACTERS = 60;

/** The search of the screen that is shown. */
export function searchText(state: ScreenState): string {
  return state.screen === 'help' ? state.helpFilter : state.table.filter;
}

/** A key while a search is being typed; undefined: not a key of the search, it keeps its own meaning. */
export function typeKey(state: ScreenState, key: KeyPress): ScreenState | undefined {
  if (key.name === 'paste') return search(state, searchText(state) + safeText(key.text));
  if (key.ctrl || key.meta) return undefined;
  switch (key.name) {
    case 'char':
      return search(state, searchText(state) + key.char);
    case 'backspace': {
      const text = searchText(state);
      return text === '' ? { ...state, typing: false } : search(state, text.slice(0, -1));
    }
    case 'return':
      return { ...state, typing: false };
    case 'escape':
      return { ...search(state, ''), typing: false };
    default:
      return undefined;
  }
}

function search(state: ScreenState, text: string): ScreenState {
  const filter = text.slice(0, MOST_CHARACTERS);
  if (state.screen !== 'help') return chooseRows(state, { filter });
  return { ...state, helpFilter: filter, scroll: { ...state.scroll, help: 0 } };
}
