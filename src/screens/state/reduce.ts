import { handleKey } from '../keys/handle-key.js';
import { viewArrived } from './arrivals.js';
import type { ScreenEvent, Step } from './events.js';
import { NO_STAR, type ScreenState } from './screen-state.js';
import { withinPage } from './scroll-screen.js';

/** The only way the screens' state changes. Returns the same state object when nothing has changed. */
export function reduce(state: ScreenState, event: ScreenEvent): Step<ScreenState> {
  switch (event.kind) {
    case 'key':
      return keyPressed(state, event);
    case 'view':
      return viewArrived(state, event.view);
    case 'detail':
      return detailArrived(state, event);
    case 'folder':
      return { state: { ...state, folderPresent: event.present }, effects: [] };
    case 'tick':
      return { state: ticked(state, event.now_ms), effects: [] };
    case 'resize':
      return {
        state: { ...state, columns: event.columns, rows: event.rows },
        effects: [{ kind: 'redraw' }],
      };
  }
}

function keyPressed(state: ScreenState, { key }: Extract<ScreenEvent, { kind: 'key' }>): Step<ScreenState> {
  const step = handleKey(state, key);
  return step.state.scroll === state.scroll ? step : { ...step, state: withinPage(step.state) };
}

/** A detail that comes after the observer has gone on to another star is dropped. */
function detailArrived(
  state: ScreenState,
  { detail }: Extract<ScreenEvent, { kind: 'detail' }>,
): Step<ScreenState> {
  if (detail.star !== state.pendingDetail) return { state, effects: [] };
  return { state: { ...state, detail, pendingDetail: NO_STAR }, effects: [] };
}

/** The screens show minutes, so only a new minute is news. */
function ticked(state: ScreenState, now_ms: number): ScreenState {
  const minute = (time_ms: number) => Math.floor(time_ms / 60_000);
  return minute(now_ms) === minute(state.now_ms) ? state : { ...state, now_ms };
}
