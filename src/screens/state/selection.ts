import type { NightView } from '../../night/view.js';
import { nextTarget } from '../pictures/star-words.js';
import { fieldLayout, shortlistEntries, tableHeight } from '../views/layout.js';
import { holding, wholeWindow } from './diagram-window.js';
import type { ScreenEffect, Step } from './events.js';
import { type Direction, starInDirection } from './nearest-star.js';
import { NO_STAR, type ScreenState } from './screen-state.js';
import { follow } from './scroll.js';

/** The star the screens are about: the selected one, else the one to point at next. */
export function currentStar(state: ScreenState): number {
  if (state.selected !== NO_STAR) return state.selected;
  return nextTarget(state.view?.shortlist ?? [], state.now_ms)?.star ?? NO_STAR;
}

/** Stars of the shortlist in its order. */
export function shortlistStars(view: NightView | undefined): readonly number[] {
  return view?.shortlist.map(entry => entry.star) ?? [];
}

/** Selects a star everywhere: lists scroll to it, a zoomed diagram moves to it, it is no longer new. */
export function select(state: ScreenState, star: number): ScreenState {
  const { view } = state;
  if (view === undefined || star < 0 || star >= view.stars.count) return state;
  const listed = shortlistStars(view);
  const place = listed.indexOf(star);
  const height = shortlistEntries(fieldLayout(state.columns, state.rows).shortlist);
  const row = state.table.rows.indexOf(star);
  return {
    ...state,
    selected: star,
    unseen: state.unseen.has(star)
      ? new Set([...state.unseen].filter(other => other !== star))
      : state.unseen,
    shortlistAnchor: place < 0 ? state.shortlistAnchor : follow(listed, state.shortlistAnchor, height, place),
    table:
      row < 0
        ? state.table
        : {
            ...state.table,
            anchor: follow(state.table.rows, state.table.anchor, tableHeight(state.rows), row),
          },
    window:
      state.window === undefined
        ? undefined
        : holding(state.window, wholeWindow(view), view.stars.colour[star], view.stars.absMag[star]),
  };
}

/** Moves the cursor of the list in front by a number of rows. */
export function moveRows(state: ScreenState, by: number): ScreenState {
  const rows = state.screen === 'stars' ? state.table.rows : shortlistStars(state.view);
  if (rows.length === 0) return state;
  const at = rows.indexOf(currentStar(state));
  // A star that is not in the list: the cursor enters at the end it comes from.
  const to = at < 0 ? (by > 0 ? 0 : rows.length - 1) : Math.max(0, Math.min(rows.length - 1, at + by));
  return select(state, rows[to]);
}

/** Moves the cursor of the diagram to the next star in a direction. */
export function moveInDiagram(state: ScreenState, direction: Direction): ScreenState {
  const { view } = state;
  const from = currentStar(state);
  if (view === undefined || from === NO_STAR) return state;
  const { width, height } = fieldLayout(state.columns, state.rows).diagram;
  const window = state.window ?? wholeWindow(view);
  const star = starInDirection(view.stars, window, width, height, from, direction);
  return star < 0 ? state : select(state, star);
}

/** The next new star in the order of the shortlist, after the selected one. */
export function selectNextNew(state: ScreenState): ScreenState {
  const unseen = shortlistStars(state.view).filter(star => state.unseen.has(star));
  return unseen.length === 0 ? state : select(state, unseen[0]);
}

/** Asks for the detail of the star screen's star unless it is there or on its way. */
export function withDetail(state: ScreenState): Step<ScreenState> {
  const star = currentStar(state);
  const known = state.detail?.star === star || state.pendingDetail === star;
  if (star === NO_STAR || known) return { state, effects: [] };
  const effects: ScreenEffect[] = [{ kind: 'ask-detail', star }];
  return { state: { ...state, pendingDetail: star }, effects };
}
