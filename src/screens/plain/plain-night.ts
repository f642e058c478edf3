import { formatProblem, type Problem } from '../../catalogue/problems.js';
import type { FrameSummary, NightView, ShortlistEntry } from '../../night/view.js';
import { costSummary } from '../pictures/files-page.js';
import { byOdds, exposureWords, firstPossible, flagWords, startByWords } from '../pictures/star-words.js';
import { count } from '../pictures/status-line.js';
import { clockText } from '../pictures/text.js';

/** Tells a night as lines of text, for pipes and log files: each thing once, when it comes. */
export class PlainNight {
  private previous: NightView | undefined;
  private readonly toldProblems = new Set<string>();

  /**
   * One line for each frame read, each star newly flagged (with reason, exposure and latest start) or no longer
   * flagged, and each problem that has not been told.
   */
  next(view: NightView): string[] {
    const lines = newLines(view, this.previous, this.newProblems(view.problems));
    this.previous = view;
    return lines;
  }

  /** Problems come and go as files are written again; a line once printed stays. */
  private newProblems(problems: readonly Problem[]): readonly string[] {
    const fresh = problems.map(formatProblem).filter(text => !this.toldProblems.has(text));
    for (const text of fresh) this.toldProblems.add(text);
    return fresh;
  }
}

function newLines(view: NightView, previous: NightView | undefined, problems: readonly string[]): string[] {
  const time = `${clockText(view.time_ms)} UT`;
  const before = new Map(previous?.shortlist.map(entry => [entry.star, entry]));
  const now = new Set(view.shortlist.map(entry => entry.star));
  const flagged = view.shortlist.filter(entry => !before.has(entry.star));
  const gone = [...before.values()].filter(entry => !now.has(entry.star));
  return [
    ...newFrames(view, previous).map(frame => `${time}  frame    ${frameText(frame)}`),
    ...problems.map(problem => `${time}  problem  ${problem}`),
    ...flagged.map(entry => `${time}  flagged  ${entryText(entry, view.time_ms)}`),
    ...gone.map(entry => `${time}  cleared  ${entry.id}: no longer flagged`),
  ];
}

/** Totals, then the shortlist as it stands. */
export function summaryLines(view: NightView): string[] {
  const duplicates = view.duplicates === 0 ? '' : `, ${count(view.duplicates, 'duplicate')}`;
  const problems =
    view.problems.length === 0
      ? 'no problems'
      : `${count(view.problems.length, 'problem')} (${costSummary(view.problems)})`;
  return [
    `${view.field}: ${count(view.frames.length, 'frame')} read${duplicates}, ${count(view.stars.count, 'star')}, ${view.shortlist.length} flagged, ${problems}`,
    ...view.shortlist.map((entry, i) => `${String(i + 1).padStart(3)}  ${entryText(entry, view.time_ms)}`),
  ];
}

/** A frame that was reduced again stands at its old index with other contents: it is told again. */
function newFrames(view: NightView, previous: NightView | undefined): readonly FrameSummary[] {
  const known = new Map(previous?.frames.map(frame => [frame.index, frame]));
  return view.frames.filter(frame => {
    const before = known.get(frame.index);
    return before === undefined || before.rows !== frame.rows || !Object.is(before.mid_ms, frame.mid_ms);
  });
}

function frameText(frame: FrameSummary): string {
  const bands = frame.bands.length === 0 ? 'no magnitudes' : frame.bands.join(' ');
  const parts = [`${frame.name}: ${bands}`, count(frame.rows, 'row')];
  if (!Number.isNaN(frame.mid_ms)) parts.push(`mid ${clockText(frame.mid_ms)} UT`);
  if (!Number.isNaN(frame.fwhm_arcsec)) parts.push(`FWHM ${frame.fwhm_arcsec.toFixed(1)}"`);
  if (!Number.isNaN(frame.zeroPoint_mag)) parts.push(`zero point ${frame.zeroPoint_mag.toFixed(2)} mag`);
  return parts.join(', ');
}

function entryText(entry: ShortlistEntry, now_ms: number): string {
  const reasons = byOdds(entry.flags).map(flag => `${flagWords(flag.code)}: ${flag.because}`);
  return [
    `${entry.id}  ${entry.spectralType}`,
    ...reasons,
    exposureWords(firstPossible(entry.exposures)),
    startByWords(entry.window, now_ms),
  ].join('; ');
}
