import { EventEmitter } from 'node:events';
import { render } from 'ink';
import { App } from '../../src/screens/app.js';
import type { ScreenEvent } from '../../src/screens/state/events.js';
import { initialState } from '../../src/screens/state/screen-state.js';
import { ScreenStore } from '../../src/screens/state/store.js';
import { type KeyName, plainKey } from '../../src/screens/terminal/key-press.js';
import type { GlyphName, Look } from '../../src/screens/terminal/look.js';
import { NOW_MS } from './night-view.js';

export const PLAIN_LOOK: Look = { palette: 'mono', glyphs: 'braille', depth: 'none' };

/** A key by its name ('up', 'return') or its character. */
export function key(name: string): ScreenEvent {
  return { kind: 'key', key: name.length === 1 ? plainKey('char', name) : plainKey(name as KeyName) };
}

export function newStore(columns = 80, rows = 24, glyphs: GlyphName = 'braille') {
  const effects: unknown[] = [];
  const state = initialState({
    columns,
    rows,
    look: { ...PLAIN_LOOK, glyphs },
    place: '/data/tonight',
    now_ms: NOW_MS,
  });
  return { store: new ScreenStore(state, effect => effects.push(effect)), effects };
}

/** Ink's whole frame for a store, without escape sequences and trailing blanks. */
export async function screenText(store: ScreenStore): Promise<string> {
  const { columns, rows } = store.getState();
  const frames: string[] = [];
  const stdout = Object.assign(new EventEmitter(), {
    columns,
    rows,
    write: (frame: string) => {
      frames.push(frame);
      return true;
    },
  });
  const app = render(<App store={store} />, {
    stdout: stdout as unknown as NodeJS.WriteStream,
    debug: true,
    exitOnCtrlC: false,
    patchConsole: false,
  });
  await new Promise(resolve => setTimeout(resolve, 0));
  const frame = frames[frames.length - 1] ?? '';
  app.unmount();
  return frame
    .replace(/\x1b\[[0-9;]*m/g, '')
    .split('\n')
    .map(line => line.trimEnd())
    .join('\n');
}
