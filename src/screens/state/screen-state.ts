import type { NightView, StarDetail } from '../../night/view.js';
import type { Look } from '../terminal/look.js';
import type { DiagramWindow } from './diagram-window.js';
import { type Anchor, TOP } from './scroll.js';
import type { RowChoice } from './table-rows.js';

export type ScreenName = 'field' | 'stars' | 'star' | 'files' | 'help';

/** No star: the selection then follows the star to point at next. */
export const NO_STAR = -1;

export interface TableState extends RowChoice {
  /** Stars in the order of the table, made for `rowsRevision`. */
  readonly rows: Uint32Array;
  readonly rowsRevision: number;
  readonly anchor: Anchor;
}

/** All that the screens show. Changed only by `reduce`. */
export interface ScreenState {
  readonly screen: ScreenName;
  /** Screens to go back to, the last one first to be left for. */
  readonly trail: readonly ScreenName[];
  readonly columns: number;
  readonly rows: number;
  readonly look: Look;
  /** Directory that is watched, for the words shown before the first file. */
  readonly place: string;
  /** False while the watched directory does not exist. */
  readonly folderPresent: boolean;
  readonly now_ms: number;
  readonly view: NightView | undefined;
  /** Stars that the newest frames put on the diagram for the first time. */
  readonly fresh: readonly number[];
  /** Flagged stars that came since the start and have not been selected yet. */
  readonly unseen: ReadonlySet<number>;
  /** A star's place in StarColumns, or NO_STAR. */
  readonly selected: number;
  readonly focus: 'diagram' | 'shortlist';
  /** Undefined: the whole diagram. */
  readonly window: DiagramWindow | undefined;
  readonly shortlistAnchor: Anchor;
  readonly table: TableState;
  /** True while the keys are letters of a search. */
  readonly typing: boolean;
  readonly helpFilter: string;
  /** First visible line of the screens that only scroll. */
  readonly scroll: Readonly<Record<'star' | 'files' | 'help', number>>;
  readonly detail: StarDetail | undefined;
  /** Star whose detail has been asked for and has not come. */
  readonly pendingDetail: number;
  /** One line for the observer; gone with the next key. */
  readonly message: string;
}

export interface Beginning {
  readonly columns: number;
  readonly rows: number;
  readonly look: Look;
  readonly place: string;
  readonly now_ms: number;
}

export function initialState(beginning: Beginning): ScreenState {
  return {
    ...beginning,
    screen: 'field',
    trail: [],
    folderPresent: true,
    view: undefined,
    fresh: [],
    unseen: new Set(),
    selected: NO_STAR,
    focus: 'shortlist',
    window: undefined,
    shortlistAnchor: TOP,
    table: {
      sort: 'merit',
      descending: false,
      filter: '',
      flaggedOnly: false,
      rows: new Uint32Array(0),
      rowsRevision: -1,
      anchor: TOP,
    },
    typing: false,
    helpFilter: '',
    scroll: { star: 0, files: 0, help: 0 },
    detail: undefined,
    pendingDetail: NO_STAR,
    message: '',
  };
}
