import type { NightView } from '../../night/view.js';
import type { TableState } from '../state/screen-state.js';
import type { SortKey } from '../state/table-rows.js';
import { glyphsOf } from '../terminal/glyphs.js';
import { Grid } from '../terminal/grid.js';
import type { GlyphName } from '../terminal/look.js';
import { REASON_ROWS } from '../views/layout.js';
import { dim, pageOf, plain, putParts } from './parts.js';
import { byOdds, flagWords } from './star-words.js';
import { grouped, sentence, toWidth, wrapped } from './text.js';

const ORDERS: Readonly<Record<SortKey, string>> = {
  merit: 'merit of the flags',
  id: 'name',
  type: 'type',
  mag: 'magnitude',
  colour: 'colour',
  absMag: 'absolute magnitude',
  odds: 'odds',
  readings: 'readings',
};

/** How the table is ordered, and which of all stars it shows. */
export function tableChoice(table: TableState, total: number, width: number): Grid {
  const grid = new Grid(width, 1);
  const search = table.filter === '' ? '' : ` with "${table.filter}"`;
  const rows = table.rows.length;
  putParts(grid, 0, 0, [
    plain(`${grouped(rows)}${rows === total ? '' : ` of ${grouped(total)}`} stars${search}`),
    plain(table.flaggedOnly ? ', flagged only' : ''),
    dim(`   by ${ORDERS[table.sort]}${table.descending ? ', reversed' : ''}`),
  ]);
  return grid;
}

/** Why the star of the cursor is flagged, as much as fits into two lines. */
export function tableReason(
  view: NightView | undefined,
  star: number,
  width: number,
  glyphs: GlyphName,
): Grid {
  const flags = view?.shortlist.find(entry => entry.star === star)?.flags ?? [];
  const [first] = byOdds(flags);
  const text = first === undefined ? '' : `${flagWords(first.code)}: ${first.because}`;
  const lines = wrapped(sentence(text, glyphs), width);
  const second =
    lines.length > REASON_ROWS ? toWidth(`${lines[1]} ${glyphsOf(glyphs).cut}`, width) : (lines[1] ?? '');
  return pageOf([[plain(lines[0] ?? '')], [plain(second)]], width);
}
