import type { Step } from '../state/events.js';
import type { ScreenState } from '../state/screen-state.js';
import { currentStar, moveInDiagram, moveRows, select, withDetail } from '../state/selection.js';
import { fieldLayout, shortlistEntries, tableHeight, textHeight } from '../views/layout.js';
import { done, type KeyEntry } from './key-entry.js';

/** Further than any list: the first and the last row. */
const ALL_ROWS = 1e9;

const STEPS: Readonly<Record<string, number>> = { up: -1, k: -1, down: 1, j: 1 };
const PAGES: Readonly<Record<string, number>> = { 'page-up': -1, 'page-down': 1, ' ': 1 };
const ENDS: Readonly<Record<string, number>> = { home: -1, end: 1 };
const SIDES: Readonly<Record<string, 'left' | 'right'>> = {
  left: 'left',
  h: 'left',
  right: 'right',
  l: 'right',
};

/** Moves the cursor, or the text where there is no cursor. */
function move(state: ScreenState, rows: number): Step<ScreenState> {
  switch (state.screen) {
    case 'field':
      if (state.focus === 'diagram' && Math.abs(rows) === 1)
        return done(moveInDiagram(state, rows < 0 ? 'up' : 'down'));
      return done(moveRows(state, rows));
    case 'stars':
      return done(moveRows(state, rows));
    default:
      // The reducer keeps it inside the page.
      return done({
        ...state,
        scroll: { ...state.scroll, [state.screen]: state.scroll[state.screen] + rows },
      });
  }
}

function pageOf(state: ScreenState): number {
  if (state.screen === 'field') return shortlistEntries(fieldLayout(state.columns, state.rows).shortlist);
  return state.screen === 'stars' ? tableHeight(state.rows) : textHeight(state.rows);
}

export const CURSOR_KEYS: readonly KeyEntry[] = [
  {
    keys: Object.keys(STEPS),
    shown: 'Up  Down  k  j',
    where: 'everywhere',
    does: 'Moves to the star above or below; scrolls where there is no cursor.',
    run: (state, key) => move(state, STEPS[key]),
  },
  {
    keys: Object.keys(PAGES),
    shown: 'PgUp  PgDn  Space',
    where: 'everywhere',
    does: 'Moves by a page.',
    run: (state, key) => move(state, PAGES[key] * pageOf(state)),
  },
  {
    keys: Object.keys(ENDS),
    shown: 'Home  End',
    where: 'everywhere',
    does: 'Moves to the first or the last.',
    run: (state, key) => move(state, ENDS[key] * ALL_ROWS),
  },
  {
    keys: Object.keys(SIDES),
    shown: 'Left  Right  h  l',
    where: ['field'],
    does: 'Moves to the star to the left or right in the diagram.',
    whyNot: state => (state.focus === 'diagram' ? '' : 'press Tab first: the arrows move in the shortlist'),
    run: (state, key) => done(moveInDiagram(state, SIDES[key])),
  },
  {
    keys: Object.keys(SIDES),
    shown: 'Left  Right  h  l',
    where: ['star'],
    label: 'previous, next',
    footerKey: 'Left Right',
    does: 'Opens the star before or after in the shortlist.',
    run: (state, key) =>
      withDetail({ ...neighbour(state, SIDES[key]), scroll: { ...state.scroll, star: 0 } }),
  },
  {
    keys: '123456789'.split(''),
    shown: '1 ... 9',
    where: ['field'],
    does: 'Selects the star with that number in the shortlist.',
    run: (state, key) => {
      const entry = state.view?.shortlist[Number(key) - 1];
      return done(entry === undefined ? state : select(state, entry.star));
    },
  },
];

function neighbour(state: ScreenState, side: 'left' | 'right'): ScreenState {
  const stars = state.view?.shortlist.map(entry => entry.star) ?? [];
  const at = stars.indexOf(currentStar(state));
  const to = at < 0 ? 0 : at + (side === 'left' ? -1 : 1);
  return to < 0 || to >= stars.length ? state : select(state, stars[to]);
}
