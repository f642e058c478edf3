import { EventEmitter } from 'node:events';
import { render } from 'ink';
import { expect, it } from 'vitest';
import { screensOf } from '../../../src/screens/app.js';
import { initialState } from '../../../src/screens/state/screen-state.js';
import { ScreenStore } from '../../../src/screens/state/store.js';
import { Surface, SurfaceContext } from '../../../src/screens/terminal/canvas.js';
import { CellWriter } from '../../../src/screens/terminal/cell-writer.js';
import { NOW_MS, nightView } from '../../support/night-view.js';
import { key } from '../../support/render-screen.js';

const MINUTE_MS = 60_000;
/** Budgets in bytes. The summary below the shortlist is new text with every star, some 300 characters of it. */
const CLOCK = 20;
const CLOCK_WITH_FIVE_COUNTDOWNS = 200;
const MOVE = 400;
const MOVE_WITH_SUMMARY = 1000;

/** The real screens with all colours, and what the writer sends after each change. */
function drawnNight(columns: number, rows: number) {
  const look = { palette: 'dark', glyphs: 'braille', depth: 'true' } as const;
  const store = new ScreenStore(
    initialState({ columns, rows, look, place: '/data/tonight', now_ms: NOW_MS }),
    () => {},
  );
  const surface = new Surface(() => {});
  let frame = '';
  const stdout = Object.assign(new EventEmitter(), {
    columns,
    rows,
    write: (text: string) => {
      frame = text;
      return true;
    },
  });
  const app = render(<SurfaceContext.Provider value={surface}>{screensOf(store)}</SurfaceContext.Provider>, {
    stdout: stdout as unknown as NodeJS.WriteStream,
    debug: true,
    exitOnCtrlC: false,
    patchConsole: false,
  });
  const writer = new CellWriter(columns, rows);
  const bytes = async () => {
    await new Promise(resolve => setTimeout(resolve, 5));
    return Buffer.byteLength(writer.frame(frame, surface.overlays.values()));
  };
  return { store, bytes, app };
}

it.each([
  [80, 24],
  [120, 40],
  [200, 60],
])('at %i x %i a move of the cursor and the clock cost little, rest nothing', async (columns, rows) => {
  const { store, bytes, app } = drawnNight(columns, rows);
  await bytes();
  store.dispatch({ kind: 'tick', now_ms: NOW_MS + MINUTE_MS });
  expect(await bytes()).toBeLessThanOrEqual(CLOCK);

  store.dispatch({ kind: 'view', view: nightView() });
  expect(await bytes()).toBeGreaterThan(MOVE_WITH_SUMMARY);
  expect(await bytes()).toBe(0);
  store.dispatch({ kind: 'tick', now_ms: NOW_MS + 2 * MINUTE_MS });
  expect(await bytes()).toBeLessThanOrEqual(CLOCK_WITH_FIVE_COUNTDOWNS);

  const moves = async () => {
    const costs: number[] = [];
    for (const name of ['down', 'down', 'down', 'up']) {
      store.dispatch(key(name));
      costs.push(await bytes());
    }
    expect(Math.min(...costs)).toBeGreaterThan(0);
    return Math.max(...costs);
  };
  expect(await moves()).toBeLessThanOrEqual(MOVE_WITH_SUMMARY);
  store.dispatch(key('s'));
  await bytes();
  expect(await moves()).toBeLessThanOrEqual(MOVE);
  app.unmount();
});
