import { keyLines } from '../keys/key-lines.js';
import { filesPage } from '../pictures/files-page.js';
import { helpPage } from '../pictures/help-page.js';
import { starPage } from '../pictures/star-page.js';
import type { Grid } from '../terminal/grid.js';
import { textHeight } from '../views/layout.js';
import type { ScreenState } from './screen-state.js';
import { currentStar } from './selection.js';

/** The screens that may be longer than the terminal and have no cursor. */
export type ScrollingScreen = keyof ScreenState['scroll'];

/** The whole page behind a scrolling screen; undefined while there is nothing to show. */
export function pageOfScreen(state: ScreenState, screen: ScrollingScreen): Grid | undefined {
  const { columns, look, view, detail } = state;
  const height = textHeight(state.rows);
  switch (screen) {
    case 'help':
      return helpPage(keyLines(state.helpFilter), state.helpFilter, columns, height, look.glyphs);
    case 'files':
      return view === undefined ? undefined : filesPage(view, columns, height);
    case 'star':
      return detail?.star !== currentStar(state)
        ? undefined
        : starPage(detail, state.now_ms, columns, height, look.glyphs);
  }
}

/** Keeps the scroll of the screen in front inside its page. */
export function withinPage(state: ScreenState): ScreenState {
  const { screen, scroll } = state;
  if (screen === 'field' || screen === 'stars' || scroll[screen] === 0) return state;
  const height = pageOfScreen(state, screen)?.height ?? 0;
  const last = Math.max(0, height - textHeight(state.rows));
  const to = Math.max(0, Math.min(last, scroll[screen]));
  return to === scroll[screen] ? state : { ...state, scroll: { ...scroll, [screen]: to } };
}
