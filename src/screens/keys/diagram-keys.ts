import { type DiagramWindow, panned, wholeWindow, zoomed } from '../state/diagram-window.js';
import type { ScreenState } from '../state/screen-state.js';
import { currentStar } from '../state/selection.js';
import { done, type KeyEntry } from './key-entry.js';

/** One press makes this of the window's width and height. */
const ZOOM = 0.6;
/** Share of the window that a pan moves by. */
const PAN = 0.25;

const PANS: Readonly<Record<string, readonly [number, number]>> = {
  'shift-left': [-PAN, 0],
  H: [-PAN, 0],
  'shift-right': [PAN, 0],
  L: [PAN, 0],
  'shift-up': [0, -PAN],
  K: [0, -PAN],
  'shift-down': [0, PAN],
  J: [0, PAN],
};

const noStars = (state: ScreenState) =>
  state.view === undefined || state.view.stars.count === 0 ? 'no stars on the diagram yet' : '';
const notZoomed = (state: ScreenState) =>
  noStars(state) || (state.window === undefined ? 'the whole diagram is shown: press + first' : '');

/** Zooms around the current star, or the middle of the window where it has no place. */
function zoom(state: ScreenState, factor: number): ScreenState {
  const { view } = state;
  if (view === undefined) return state;
  const whole = wholeWindow(view);
  const window = state.window ?? whole;
  const star = currentStar(state);
  const colour = star < 0 ? Number.NaN : view.stars.colour[star];
  const mag = star < 0 ? Number.NaN : view.stars.absMag[star];
  const [x, y] = Number.isNaN(colour + mag) ? middle(window) : [colour, mag];
  return { ...state, window: zoomed(window, whole, factor, x, y) };
}

function middle(window: DiagramWindow): readonly [number, number] {
  return [(window.colourFrom + window.colourTo) / 2, (window.magFrom + window.magTo) / 2];
}

export const DIAGRAM_KEYS: readonly KeyEntry[] = [
  {
    keys: ['tab'],
    shown: 'Tab',
    where: ['field'],
    label: 'diagram/list',
    does: 'Moves the arrow keys from the shortlist to the diagram and back.',
    run: state => done({ ...state, focus: state.focus === 'diagram' ? 'shortlist' : 'diagram' }),
  },
  {
    keys: ['+', '='],
    shown: '+',
    where: ['field'],
    label: 'zoom',
    footerKey: '+ -',
    does: 'Enlarges the diagram around the star.',
    whyNot: noStars,
    run: state => done(zoom(state, ZOOM)),
  },
  {
    keys: ['-'],
    shown: '-',
    where: ['field'],
    does: 'Shows more of the diagram.',
    whyNot: notZoomed,
    run: state => done(zoom(state, 1 / ZOOM)),
  },
  {
    keys: ['0'],
    shown: '0',
    where: ['field'],
    does: 'Shows the whole diagram again.',
    whyNot: notZoomed,
    run: state => done({ ...state, window: undefined }),
  },
  {
    keys: Object.keys(PANS),
    shown: 'Shift-arrows  H J K L',
    where: ['field'],
    does: 'Moves the enlarged part of the diagram.',
    whyNot: notZoomed,
    run: (state, key) => {
      const { view, window } = state;
      if (view === undefined || window === undefined) return done(state);
      return done({ ...state, window: panned(window, wholeWindow(view), ...PANS[key]) });
    },
  },
];
