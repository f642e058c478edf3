import { tableHeight } from '../views/layout.js';
import type { Step } from './events.js';
import type { ScreenName, ScreenState } from './screen-state.js';
import { NO_STAR } from './screen-state.js';
import { firstVisible, follow, TOP } from './scroll.js';
import { currentStar, select, withDetail } from './selection.js';
import { type RowChoice, tableRows } from './table-rows.js';

/** Goes to a screen; the one that is left is where 'back' leads. */
export function goTo(state: ScreenState, screen: ScreenName): ScreenState {
  if (state.screen === screen) return state;
  const trail = [...state.trail.filter(name => name !== screen), state.screen];
  return arrived({ ...state, screen, trail, typing: false });
}

/** Back to where the observer came from. */
export function goBack(state: ScreenState): ScreenState {
  const screen = state.trail.at(-1);
  if (screen === undefined) return state;
  return arrived({ ...state, screen, trail: state.trail.slice(0, -1), typing: false });
}

/** Opens the current star, which counts as selecting it. */
export function openStar(state: ScreenState): Step<ScreenState> {
  const star = currentStar(state);
  if (star === NO_STAR) return { state, effects: [] };
  const opened = goTo(select(state, star), 'star');
  return withDetail({ ...opened, scroll: { ...opened.scroll, star: 0 } });
}

function arrived(state: ScreenState): ScreenState {
  return state.screen === 'stars' ? withCurrentVisible(withRows(state)) : state;
}

/** Scrolls the table to the current star, where it lists it. */
function withCurrentVisible(state: ScreenState): ScreenState {
  const { rows, anchor } = state.table;
  const row = rows.indexOf(currentStar(state));
  if (row < 0) return state;
  return { ...state, table: { ...state.table, anchor: follow(rows, anchor, tableHeight(state.rows), row) } };
}

/** The table's rows brought up to date with the view; made only while the table is shown. */
export function withRows(state: ScreenState): ScreenState {
  const { view, table } = state;
  if (view === undefined || table.rowsRevision === view.revision) return state;
  return { ...state, table: { ...table, rows: tableRows(view, table), rowsRevision: view.revision } };
}

/** Another order or search: the selected star stays on its line of the screen, where it is still listed. */
export function chooseRows(state: ScreenState, choice: Partial<RowChoice>): ScreenState {
  const { view } = state;
  const table = { ...state.table, ...choice };
  if (view === undefined) return { ...state, table };
  const rows = tableRows(view, table);
  const row = rows.indexOf(currentStar(state));
  const anchor = row < 0 ? TOP : follow(rows, state.table.anchor, tableHeight(state.rows), row);
  return { ...state, table: { ...table, rows, rowsRevision: view.revision, anchor } };
}

/** Part of the table that is on the screen. */
export function visibleRows(state: ScreenState): Uint32Array {
  const height = tableHeight(state.rows);
  const first = firstVisible(state.table.rows, state.table.anchor, height);
  return state.table.rows.subarray(first, first + height);
}
