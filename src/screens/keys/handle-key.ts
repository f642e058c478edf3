import type { Step } from '../state/events.js';
import type { ScreenState } from '../state/screen-state.js';
import type { KeyPress } from '../terminal/key-press.js';
import { isOffered } from './key-entry.js';
import { KEY_LIST } from './key-list.js';
import { nameOfKey } from './name-of-key.js';
import { typeKey } from './typing.js';

/** What a key does. A key that cannot act now says why; one that means nothing does nothing. */
export function handleKey(before: ScreenState, key: KeyPress): Step<ScreenState> {
  const state = before.message === '' ? before : { ...before, message: '' };
  if (state.typing) {
    const typed = typeKey(state, key);
    if (typed !== undefined) return { state: typed, effects: [] };
  }
  const name = nameOfKey(key);
  const entry = KEY_LIST.find(
    candidate => candidate.keys.includes(name) && isOffered(candidate, state.screen),
  );
  if (entry === undefined) return { state, effects: [] };
  const whyNot = entry.whyNot?.(state) ?? '';
  return whyNot === '' ? entry.run(state, name) : { state: { ...state, message: whyNot }, effects: [] };
}
