import type { KeyLine } from '../keys/key-lines.js';
import { glyphsOf } from '../terminal/glyphs.js';
import type { Grid } from '../terminal/grid.js';
import type { GlyphName } from '../terminal/look.js';
import { dim, type Line, pageOf, plain, title } from './parts.js';
import { wrapped } from './text.js';

const KEY_WIDTH = 23;

/** All keys, or those that match the search; then the signs of the diagram. */
export function helpPage(
  lines: readonly KeyLine[],
  search: string,
  width: number,
  height: number,
  glyphs: GlyphName,
): Grid {
  const found: Line[] = lines.flatMap(({ keys, where, does }) =>
    wrapped(`${does} (${where})`, width - KEY_WIDTH).map(
      (text, i): Line => [
        { text: (i === 0 ? keys : '').padEnd(KEY_WIDTH), style: { colour: 'accent', bold: true } },
        ...splitWhere(text),
      ],
    ),
  );
  const heading: Line[] = search === '' ? [] : [[dim(`Keys with "${search}":`)]];
  const none: Line[] = lines.length === 0 ? [[dim('No key does that. Esc clears the search.')]] : [];
  return pageOf([...heading, ...found, ...none, ...(search === '' ? signs(glyphs) : [])], width, height);
}

function splitWhere(text: string): Line {
  const at = text.lastIndexOf('(');
  return at < 0 ? [plain(text)] : [plain(text.slice(0, at)), dim(text.slice(at))];
}

function signs(glyphs: GlyphName): Line[] {
  const { flagged, flaggedFresh, fresh, selected, left, right, up, down } = glyphsOf(glyphs);
  const rows: readonly (readonly [string, string])[] = [
    ['1 ... 9', 'Flagged star, by its number in the shortlist; underlined until you have selected it.'],
    [
      `${flagged}  ${flaggedFresh}`,
      'Flagged star further down the shortlist; one you have not selected yet.',
    ],
    [fresh, 'Star that the newest frame put on the diagram.'],
    [selected, 'Selected star, with the error bar of its absolute magnitude.'],
    [`${left} ${right} ${up} ${down}`, 'Flagged star beyond the edge of the enlarged part.'],
  ];
  return [
    [],
    [title('Signs on the diagram')],
    ...rows.map(
      ([sign, meaning]): Line => [
        { text: sign.padEnd(KEY_WIDTH), style: { colour: 'flagged', bold: true } },
        plain(meaning),
      ],
    ),
  ];
}
