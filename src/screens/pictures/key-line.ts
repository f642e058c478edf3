import { type KeyHint, keyHints } from '../keys/key-lines.js';
import { searchText } from '../keys/typing.js';
import type { ScreenState } from '../state/screen-state.js';
import { Grid } from '../terminal/grid.js';
import { dim, type Line, plain, putParts, putRight, widthOf } from './parts.js';
import { toWidth } from './text.js';

const GAP = '  ';

/** The last line: what is being typed, else the message there is, else the keys that can be used now. */
export function keyLine(state: ScreenState, width: number): Grid {
  const grid = new Grid(width, 1);
  const hints = keyHints(state).map(hintParts);
  if (state.typing) {
    const end = putParts(grid, 0, 0, [
      { text: 'search: ', style: { colour: 'accent' } },
      plain(searchText(state)),
      { text: ' ', style: { inverse: true } },
    ]);
    const right = hints.flatMap((hint, i) => (i === 0 ? hint : [plain(GAP), ...hint]));
    if (end + widthOf(right) + GAP.length <= width) putRight(grid, 0, right);
    return grid;
  }
  if (state.message !== '') {
    putParts(grid, 0, 0, [{ text: toWidth(state.message, width), style: { colour: 'accent' } }]);
    return grid;
  }
  let x = 0;
  for (const hint of hints) {
    const length = widthOf(hint);
    if (x + length > width) break;
    x = putParts(grid, x, 0, hint) + GAP.length;
  }
  return grid;
}

function hintParts({ key, label }: KeyHint): Line {
  return [{ text: key, style: { colour: 'accent', bold: true } }, dim(` ${label}`)];
}
