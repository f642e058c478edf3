import type { ScreenName, ScreenState } from '../state/screen-state.js';
import { Grid } from '../terminal/grid.js';
import { dim, type Part, plain, putParts, putRight, title } from './parts.js';
import { clockText, grouped, toWidth } from './text.js';

const TITLES: Readonly<Record<ScreenName, string>> = {
  field: 'Field',
  stars: 'Stars',
  star: 'Star',
  files: 'Files',
  help: 'Keys',
};

const LONGEST_FIELD_NAME = 20;

type Shown = Pick<ScreenState, 'screen' | 'view' | 'unseen' | 'now_ms' | 'folderPresent'>;

/** Which screen this is, what the night has brought so far, and the time. */
export function statusLine(state: Shown, width: number): Grid {
  const grid = new Grid(width, 1);
  const { view } = state;
  const end = putParts(grid, 0, 0, [title(TITLES[state.screen]), ...countsOf(state)]);
  const clock = `${clockText(state.now_ms)} UT`;
  const name = view === undefined ? '' : toWidth(view.field, Math.min(view.field.length, LONGEST_FIELD_NAME));
  const withName = [dim(name), plain(`  ${clock}`)];
  putRight(grid, 0, end + name.length + clock.length + 4 <= width ? withName : [plain(clock)]);
  return grid;
}

function countsOf({ view, unseen, folderPresent }: Shown): Part[] {
  const gone: Part[] = folderPresent
    ? []
    : [{ text: '  FOLDER IS GONE', style: { colour: 'alarm', bold: true } }];
  if (view === undefined) return gone;
  const problems = view.problems.length;
  return [
    // First of all: everything after it may be cut off, and all of it is getting old.
    ...gone,
    plain(`  ${count(view.frames.length, 'frame')}  ${count(view.stars.count, 'star')}  `),
    { text: `${view.shortlist.length} flagged`, style: { colour: 'flagged' } },
    ...(unseen.size === 0
      ? []
      : [{ text: `  ${unseen.size} new`, style: { colour: 'fresh', bold: true } } as const]),
    ...(problems === 0
      ? []
      : [{ text: `  ${count(problems, 'problem')}`, style: { colour: 'warning' } } as const]),
  ];
}

/** '1 frame', '4 120 stars'. */
export function count(number: number, word: string): string {
  return `${grouped(number)} ${word}${number === 1 ? '' : 's'}`;
}
