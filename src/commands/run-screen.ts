import { makeClock } from '../night/clock.js';
import type { FromWorker } from '../night/messages.js';
import { screensOf } from '../screens/app.js';
import { initialState } from '../screens/state/screen-state.js';
import { ScreenStore } from '../screens/state/store.js';
import { chooseLook } from '../screens/terminal/capabilities.js';
import { type RunningScreen, startScreen } from '../screens/terminal/render.js';
import { EXIT } from './exit-codes.js';
import { type NightOptions, type NightSource, startWorker } from './night-source.js';

/** The clock on the screen shows minutes: it is looked at a little more often than that. */
const TICK_MS = 5000;
const MINUTE_MS = 60_000;

/** Shows the night on the terminal until the observer quits. */
export async function runScreen(source: NightSource, options: NightOptions): Promise<number> {
  const clock = makeClock(source.clock);
  let screen: RunningScreen | undefined;
  let failure: unknown;
  const store = new ScreenStore(
    initialState({
      columns: process.stdout.columns ?? 80,
      rows: process.stdout.rows ?? 24,
      look: chooseLook(process.env, options),
      place: source.folder,
      now_ms: clock.now_ms(),
    }),
    effect => {
      switch (effect.kind) {
        case 'quit':
          screen?.stop(EXIT.ok);
          break;
        case 'ask-detail':
          worker.post({ kind: 'detail', star: effect.star });
          break;
        case 'redraw':
          screen?.redraw();
          break;
      }
    },
  );
  const onMessage = (message: FromWorker) => {
    if (message.kind === 'view') store.dispatch({ kind: 'view', view: message.view });
    if (message.kind === 'folder') store.dispatch({ kind: 'folder', present: message.present });
    if (message.kind === 'detail') store.dispatch({ kind: 'detail', detail: message.detail });
  };
  const worker = startWorker(source, onMessage, error => {
    failure = error;
    screen?.stop(EXIT.failed);
  });
  let minute = 0;
  const ticker = setInterval(
    () => {
      const now_ms = clock.now_ms();
      const passed = Math.floor(now_ms / MINUTE_MS);
      if (passed === minute) return;
      minute = passed;
      store.dispatch({ kind: 'tick', now_ms });
      worker.post({ kind: 'refresh' });
    },
    Math.max(100, TICK_MS / source.clock.speed),
  );
  screen = startScreen({
    app: screensOf(store),
    onKey: key => {
      // Before the screens' own quit: the shell is to see that it was an interruption.
      if (key.name === 'char' && key.ctrl && key.char === 'c') screen?.stop(EXIT.interrupted);
      else store.dispatch({ kind: 'key', key });
    },
    onResize: (columns, rows) => store.dispatch({ kind: 'resize', columns, rows }),
  });
  const code = await screen.done;
  clearInterval(ticker);
  await worker.stop();
  if (failure !== undefined) throw failure;
  return code;
}
