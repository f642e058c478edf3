import type { KeyPress } from '../terminal/key-press.js';

/**
 * The name a key has in the list of keys: the character itself, or 'up', 'page-down', 'enter', with 'ctrl-',
 * 'alt-' or 'shift-' before it. A shifted letter is its capital. '' for a paste.
 */
export function nameOfKey(key: KeyPress): string {
  if (key.name === 'paste') return '';
  const base = key.name === 'char' ? key.char : (OWN_NAMES[key.name] ?? key.name);
  const shift = key.shift && key.name !== 'char' ? 'shift-' : '';
  return `${key.ctrl ? 'ctrl-' : ''}${key.meta ? 'alt-' : ''}${shift}${base}`;
}

const OWN_NAMES: Readonly<Record<string, string>> = {
  return: 'enter',
  pageup: 'page-up',
  pagedown: 'page-down',
};
