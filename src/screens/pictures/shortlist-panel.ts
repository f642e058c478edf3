import type { ShortlistEntry } from '../../night/view.js';
import { type Glyphs, glyphsOf } from '../terminal/glyphs.js';
import { Grid } from '../terminal/grid.js';
import type { GlyphName } from '../terminal/look.js';
import type { Style } from '../terminal/palette.js';
import { dim, type Part, plain, putParts, title } from './parts.js';
import {
  byOdds,
  exposureShort,
  firstPossible,
  flagLabel,
  startByShort,
  type Urgency,
  urgencyOf,
  withoutOdds,
} from './star-words.js';
import { durationText, leftText, toWidth } from './text.js';

export interface ShortlistInput {
  readonly shortlist: readonly ShortlistEntry[];
  /** First entry that is shown, and how many fit. */
  readonly first: number;
  readonly entries: number;
  /** Star the screens are about; -1: none. */
  readonly current: number;
  readonly unseen: ReadonlySet<number>;
  readonly focused: boolean;
  readonly now_ms: number;
  readonly glyphs: GlyphName;
  /** Said where there is nothing to list. */
  readonly emptyText: string;
}

/** From here on there is room for the odds and the total time. */
const ROOMY_WIDTH = 48;
/** Pointer, number, blank. */
const INDENT = 4;

const URGENCY_STYLES: Readonly<Record<Urgency, Style>> = {
  soon: { colour: 'alarm', bold: true },
  open: { colour: 'good' },
  later: { colour: 'text' },
  closed: { colour: 'dim' },
};

/** The flagged stars, best first, two lines each: what it is, until when, how long. */
export function shortlistPanel(input: ShortlistInput, width: number, height: number): Grid {
  const grid = new Grid(width, height);
  const { shortlist, first, entries, focused } = input;
  const signs = glyphsOf(input.glyphs);
  const shown = shortlist.slice(first, first + entries);
  const range =
    shortlist.length > shown.length ? `${first + 1}-${first + shown.length} of ${shortlist.length}` : '';
  putParts(grid, 0, 0, [title(`${focused ? signs.pointer : ' '} Shortlist `), dim(range)]);
  const heading = 'start by, UT';
  if (shown.length > 0) putParts(grid, width - heading.length, 0, [dim(heading)]);
  if (shown.length === 0) putParts(grid, INDENT, 1, [dim(toWidth(input.emptyText, width - INDENT))]);
  shown.forEach((entry, i) => {
    drawEntry(grid, 1 + 2 * i, entry, first + i + 1, input, signs);
  });
  return grid;
}

function drawEntry(
  grid: Grid,
  y: number,
  entry: ShortlistEntry,
  place: number,
  input: ShortlistInput,
  signs: Glyphs,
): void {
  const { width } = grid;
  const isCurrent = entry.star === input.current;
  const urgency = urgencyOf(entry.window, input.now_ms);
  const when = whenText(entry, input.now_ms, urgency);
  const mark = input.unseen.has(entry.star) ? signs.flaggedFresh : ' ';
  const number = place < 10 ? String(place) : ' ';
  const idWidth = width - INDENT - when.length - 1;
  const name: Style = isCurrent ? { colour: 'selected', bold: true, inverse: true } : { bold: true };
  const id = entry.id.length > idWidth ? toWidth(entry.id, idWidth, signs.cut) : entry.id;
  putParts(grid, 0, y, [
    { text: isCurrent ? signs.pointer : ' ', style: { colour: 'selected' } },
    { text: number, style: { colour: 'flagged', bold: true } },
    { text: mark, style: { colour: 'fresh', bold: true } },
    plain(' '),
    { text: id, style: name },
  ]);
  putParts(grid, width - when.length, y, [{ text: when, style: URGENCY_STYLES[urgency] }]);
  drawSecondLine(grid, y + 1, entry, signs);
}

/** 'by 03:42  61 min', the countdown to the latest start; '!' before it when that is soon. */
function whenText(entry: ShortlistEntry, now_ms: number, urgency: Urgency): string {
  const short = startByShort(entry.window, now_ms);
  if (urgency === 'closed') return short;
  const until = urgency === 'later' ? entry.window.upFrom_ms : entry.window.startBy_ms;
  const left = leftText(now_ms, until).padStart(6);
  return `${urgency === 'soon' ? '!' : ''}${short} ${left}`;
}

function drawSecondLine(grid: Grid, y: number, entry: ShortlistEntry, signs: Glyphs): void {
  const { width } = grid;
  const roomy = width >= ROOMY_WIDTH;
  const exposure = firstPossible(entry.exposures);
  const total = roomy && exposure?.possible === true ? `, ${durationText(exposure.total_s)}` : '';
  const howLong = `${exposureShort(exposure)}${total}`;
  const [flag] = byOdds(entry.flags);
  const type = roomy ? entry.spectralType : withoutOdds(entry.spectralType);
  const why = flag === undefined ? '' : flagLabel(flag.code);
  const room = width - INDENT - howLong.length - 1;
  // Where type and reason say the same, the reason is enough.
  const words: Part[] =
    type === why ? [plain(toWidth(why, room, signs.cut))] : twoWords(type, why, room, signs);
  putParts(grid, INDENT, y, words);
  putParts(grid, width - howLong.length, y, [plain(howLong)]);
}

/** The reason comes first: the type gives way where both do not fit. */
function twoWords(type: string, why: string, room: number, signs: Glyphs): Part[] {
  const left = room - why.length - 2;
  const reason: Part = {
    text: toWidth(why, Math.min(room, why.length), signs.cut),
    style: { colour: 'flagged' },
  };
  return left < type.length ? [reason] : [reason, dim(`  ${type}`)];
}
