import { describe, expect, it } from 'vitest';
import { handleKey } from '../../../src/screens/keys/handle-key.js';
import { isOffered } from '../../../src/screens/keys/key-entry.js';
import { keyHints, keyLines } from '../../../src/screens/keys/key-lines.js';
import { KEY_LIST } from '../../../src/screens/keys/key-list.js';
import { nameOfKey } from '../../../src/screens/keys/name-of-key.js';
import { plainKey } from '../../../src/screens/terminal/key-press.js';
import { nightView } from '../../support/night-view.js';
import { key, newStore } from '../../support/render-screen.js';

const SCREENS = ['field', 'stars', 'star', 'files', 'help'] as const;

describe('the list of keys', () => {
  it('gives each key one meaning on each screen', () => {
    for (const screen of SCREENS) {
      const keys = KEY_LIST.filter(entry => isOffered(entry, screen)).flatMap(entry => entry.keys);
      expect(keys.toSorted()).toEqual([...new Set(keys)].toSorted());
    }
  });

  it('leaves alone the keys that terminals and multiplexers take', () => {
    const taken = ['ctrl-s', 'ctrl-q', 'ctrl-b', 'ctrl-a', 'ctrl-z'];
    expect(KEY_LIST.flatMap(entry => entry.keys).filter(name => taken.includes(name))).toEqual([]);
  });

  it('says of each key what it does, in a sentence', () => {
    for (const entry of KEY_LIST) expect(entry.does).toMatch(/^[A-Z].*\.$/);
  });

  it('offers a way back or out on every screen, and the list of keys', () => {
    const { store } = newStore();
    for (const screen of SCREENS) {
      const labels = keyHints({ ...store.getState(), screen }).map(hint => hint.label);
      expect(labels).toContain(screen === 'field' ? 'quit' : 'back');
      if (screen !== 'help') expect(labels).toContain('keys');
    }
  });

  it('offers only what can be done now, and says why not when asked for it', () => {
    const { store } = newStore();
    expect(keyHints(store.getState()).map(hint => hint.label)).not.toContain('open');
    expect(handleKey(store.getState(), plainKey('return')).state.message).toBe('no star to open yet');
    store.dispatch({ kind: 'view', view: nightView() });
    expect(keyHints(store.getState()).map(hint => hint.label)).toContain('open');
    store.dispatch(key('left'));
    expect(store.getState().message).toContain('press Tab first');
  });

  it('can be searched by what keys do', () => {
    expect(keyLines('zoom').length + keyLines('enlarges').length).toBeGreaterThan(0);
    expect(keyLines('light curve').map(line => line.keys)).toEqual(['Enter']);
    expect(keyLines()).toHaveLength(KEY_LIST.length);
  });
});

describe('names of keys', () => {
  it('are the character, or a word, with what was held down', () => {
    expect(nameOfKey(plainKey('char', 'K'))).toBe('K');
    expect(nameOfKey(plainKey('pagedown'))).toBe('page-down');
    expect(nameOfKey({ name: 'left', char: '', ctrl: false, meta: false, shift: true })).toBe('shift-left');
    expect(nameOfKey({ name: 'char', char: 'l', ctrl: true, meta: false, shift: false })).toBe('ctrl-l');
  });
});
