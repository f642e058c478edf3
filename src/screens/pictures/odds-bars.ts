import type { StarClass } from '../../science/classes.js';
import { CLASSES } from '../../science/classes.js';
import { oddsText } from '../../science/odds/index.js';
import { glyphsOf } from '../terminal/glyphs.js';
import type { GlyphName } from '../terminal/look.js';
import { dim, type Line, plain } from './parts.js';

/** Odds below this are not worth a line. */
const LEAST_SHOWN = 0.005;
const NAME_WIDTH = 6;
const NUMBER_WIDTH = 5;

/** One line a class, most probable first: name, bar, odds. At most `most` lines. */
export function oddsBars(
  odds: Readonly<Record<StarClass, number>>,
  width: number,
  most: number,
  glyphs: GlyphName,
): readonly Line[] {
  const { barFull, barEmpty } = glyphsOf(glyphs);
  const length = Math.max(1, width - NAME_WIDTH - NUMBER_WIDTH);
  const shown = CLASSES.filter(name => odds[name] >= LEAST_SHOWN).sort((a, b) => odds[b] - odds[a]);
  if (shown.length === 0) return [[dim('no odds: too few measurements')]];
  return shown.slice(0, most).map((name, i) => {
    const full = Math.max(odds[name] >= 0.01 ? 1 : 0, Math.round(odds[name] * length));
    return [
      { text: name.padEnd(NAME_WIDTH), style: { bold: i === 0 } },
      { text: barFull.repeat(full), style: { colour: i === 0 ? 'accent' : 'text' } },
      dim(barEmpty.repeat(length - full)),
      plain(oddsText(odds[name]).padStart(NUMBER_WIDTH)),
    ];
  });
}
