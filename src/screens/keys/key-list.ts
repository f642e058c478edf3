import type { Step } from '../state/events.js';
import { goBack, goTo, openStar } from '../state/navigation.js';
import { NO_STAR, type ScreenName, type ScreenState } from '../state/screen-state.js';
import { currentStar, selectNextNew } from '../state/selection.js';
import { CURSOR_KEYS } from './cursor-keys.js';
import { DIAGRAM_KEYS } from './diagram-keys.js';
import { done, type KeyEntry } from './key-entry.js';
import { LOOK_KEYS } from './look-keys.js';
import { TABLE_KEYS } from './table-keys.js';

const LISTS: readonly ScreenName[] = ['field', 'stars'];
const ABOVE_FIELD: readonly ScreenName[] = ['stars', 'star', 'files', 'help'];

const quit = (state: ScreenState): Step<ScreenState> => ({ state, effects: [{ kind: 'quit' }] });

const GOING: readonly KeyEntry[] = [
  {
    keys: ['enter'],
    shown: 'Enter',
    where: LISTS,
    label: 'open',
    does: 'Opens the star: why it is flagged, odds, exposures, light curve.',
    whyNot: state => (currentStar(state) === NO_STAR ? 'no star to open yet' : ''),
    run: openStar,
  },
  {
    keys: ['q', 'backspace', 'escape'],
    shown: 'q  Backspace  Esc',
    where: ABOVE_FIELD,
    label: 'back',
    footerKey: 'q',
    does: 'Goes back to the screen before.',
    run: state => done(goBack(state)),
  },
  {
    keys: ['q'],
    shown: 'q',
    where: ['field'],
    label: 'quit',
    does: 'Quits.',
    run: quit,
  },
  {
    keys: ['ctrl-c'],
    shown: 'Ctrl-C',
    where: 'everywhere',
    does: 'Quits from anywhere.',
    run: quit,
  },
  {
    keys: ['?'],
    shown: '?',
    where: ['field', 'stars', 'star', 'files'],
    label: 'keys',
    does: 'Shows this list of keys.',
    run: state => done(goTo({ ...state, helpFilter: '' }, 'help')),
  },
  {
    keys: ['s'],
    shown: 's',
    where: ['field', 'star', 'files'],
    label: 'stars',
    does: 'Shows the table of all stars.',
    run: state => done(goTo(state, 'stars')),
  },
  {
    keys: ['f'],
    shown: 'f',
    where: ['field', 'stars', 'star'],
    label: 'files',
    does: 'Shows the frames that were read, and what was wrong with files.',
    run: state => done(goTo(state, 'files')),
  },
];

const NEWS: readonly KeyEntry[] = [
  {
    keys: ['n'],
    shown: 'n',
    where: LISTS,
    label: 'next new',
    does: 'Selects the next star that was flagged since you looked.',
    whyNot: state => (state.unseen.size === 0 ? 'no new flagged stars' : ''),
    run: state => done(selectNextNew(state)),
  },
  {
    keys: ['a'],
    shown: 'a',
    where: LISTS,
    does: 'Counts all flagged stars as seen.',
    whyNot: state => (state.unseen.size === 0 ? 'no new flagged stars' : ''),
    run: state => done({ ...state, unseen: new Set() }),
  },
  {
    keys: ['escape'],
    shown: 'Esc',
    where: ['field'],
    does: 'Lets go of the selected star: the screen follows the one to point at next again.',
    run: state => done({ ...state, selected: NO_STAR }),
  },
];

/**
 * Every key there is: the handler, the line of keys on each screen, the list behind '?' and the README are all
 * made from this. Order: as they are offered, the most wanted first.
 */
export const KEY_LIST: readonly KeyEntry[] = [
  ...GOING,
  ...CURSOR_KEYS,
  ...TABLE_KEYS,
  ...DIAGRAM_KEYS,
  ...NEWS,
  ...LOOK_KEYS,
];
