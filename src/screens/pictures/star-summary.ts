import type { NightView, ShortlistEntry } from '../../night/view.js';
import { colourName } from '../../science/bands.js';
import { glyphsOf } from '../terminal/glyphs.js';
import type { Grid } from '../terminal/grid.js';
import type { GlyphName } from '../terminal/look.js';
import { dim, type Line, type Part, pageOf, plain, putParts, title, widthOf } from './parts.js';
import {
  byOdds,
  exposureWords,
  firstPossible,
  flagWords,
  startByWords,
  typeWithOdds,
  urgencyOf,
} from './star-words.js';
import { fixed, sentence, signed, teffText, toWidth, withSigma, wrapped } from './text.js';

export interface SummaryInput {
  readonly view: NightView;
  /** -1: no star. */
  readonly star: number;
  /** True: nobody selected it, it is the one to point at next. */
  readonly isNext: boolean;
  readonly now_ms: number;
  readonly glyphs: GlyphName;
}

/** From this height on every setup has a line of its own. */
const TALL = 9;

/**
 * What has to be known at the telescope about one star: what it is, how long, until when, why. What does not fit
 * is cut at the end, with a sign that it was.
 */
export function starSummary(input: SummaryInput, width: number, height: number): Grid {
  const { view, star } = input;
  if (star < 0) return pageOf([[dim('No flagged star yet.')]], width, height);
  const entry = view.shortlist.find(candidate => candidate.star === star);
  const tall = height >= TALL;
  const lines: Line[] = [heading(input, entry, tall ? 0 : width)];
  if (tall) lines.push(...dimLines(measured(view, star, input.glyphs), width), []);
  if (entry === undefined) {
    lines.push(...textLines('Not flagged: nothing unusual about it so far.', width));
    if (!tall) lines.push(...dimLines(measured(view, star, input.glyphs), width));
  } else {
    lines.push(...plan(entry, input.now_ms, width, tall));
    if (tall) lines.push([]);
    for (const flag of byOdds(entry.flags))
      lines.push(...textLines(sentence(`${flagWords(flag.code)}: ${flag.because}`, input.glyphs), width));
    for (const caution of entry.cautions)
      lines.push(...textLines(sentence(`but ${caution}`, input.glyphs), width, { colour: 'warning' }));
  }
  const page = pageOf(lines.slice(0, height), width, height);
  if (lines.length > height) markCut(page, input.glyphs);
  return page;
}

/** Name and type; the magnitudes too where `width` leaves room for them. */
function heading(
  { view, star, isNext }: SummaryInput,
  entry: ShortlistEntry | undefined,
  width: number,
): Line {
  const type = entry?.spectralType ?? typeWithOdds(view.stars, star);
  const { mag, absMag } = view.stars;
  const { band } = view.axes;
  const line = [
    dim(isNext ? 'Next: ' : 'Star: '),
    title(view.stars.ids[star]),
    plain(`  ${type || 'type not known'}`),
  ];
  const full = [...line, dim(`  ${band} ${fixed(mag[star], 2)}  M_${band} ${signed(absMag[star], 1)}`)];
  return widthOf(full) <= width ? full : line;
}

function measured(view: NightView, star: number, glyphs: GlyphName): string {
  const { mag, colour, absMag, absMagSigma, teff_K, readings } = view.stars;
  const plusMinus = glyphsOf(glyphs).plusMinus;
  const { band } = view.axes;
  return [
    `${band} ${fixed(mag[star], 2)}`,
    `${colourName(view.axes.colour)} ${fixed(colour[star], 2)}`,
    `M_${band} ${absMag[star] > 0 ? '+' : ''}${withSigma(absMag[star], absMagSigma[star], plusMinus)}`,
    `Teff ${teffText(teff_K[star])}`,
    `${readings[star]} readings`,
  ].join(', ');
}

/** How long and until when. */
function plan(entry: ShortlistEntry, now_ms: number, width: number, tall: boolean): Line[] {
  const when = startByWords(entry.window, now_ms);
  const soon = urgencyOf(entry.window, now_ms) === 'soon';
  const whenPart: Part = soon
    ? { text: when, style: { colour: 'alarm', bold: true } }
    : { text: when, style: { colour: 'good' } };
  if (tall) {
    const setups = entry.exposures.length === 0 ? [undefined] : entry.exposures;
    return [
      ...setups.flatMap(setup => textLines(exposureWords(setup), width)),
      ...wrapped(when, width).map(text => [{ ...whenPart, text }]),
    ];
  }
  const first: Line = [plain(exposureWords(firstPossible(entry.exposures)))];
  const together: Line = [...first, plain('; '), whenPart];
  return widthOf(together) <= width ? [together] : [first, [whenPart]];
}

function textLines(text: string, width: number, style?: Part['style']): Line[] {
  return wrapped(text, width).map(line => [style === undefined ? plain(line) : { text: line, style }]);
}

function dimLines(text: string, width: number): Line[] {
  return wrapped(text, width).map(line => [dim(line)]);
}

function markCut(page: Grid, glyphs: GlyphName): void {
  const sign = ` ${glyphsOf(glyphs).cut}`;
  putParts(page, page.width - sign.length, page.height - 1, [
    { text: toWidth(sign, sign.length), style: { colour: 'accent' } },
  ]);
}
