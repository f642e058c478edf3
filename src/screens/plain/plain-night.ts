import { formatProblem } from '../../catalogue/problems.js';
import type { ExposureSuggestion } from '../../follow/exposure/suggestion.js';
import type { TargetWindow } from '../../follow/sky/window.js';
import type { FrameSummary, NightView, ShortlistEntry } from '../../night/view.js';
import { clockText, durationText, fixed, secondsText } from '../pictures/text.js';

/** Tells a night line by line, each thing once: frames, problems, stars as they are flagged. */
export class PlainNight {
  private readonly frames = new Set<number>();
  private readonly flagged = new Map<number, string>();
  private problems = 0;

  /** Lines for what is new in a view. */
  next(view: NightView): string[] {
    const lines: string[] = [];
    for (const frame of view.frames) {
      if (this.frames.has(frame.index)) continue;
      this.frames.add(frame.index);
      lines.push(frameLine(frame, view));
    }
    for (const problem of view.problems.slice(this.problems))
      lines.push(`problem  ${formatProblem(problem)}`);
    this.problems = view.problems.length;
    for (const entry of view.shortlist) {
      const codes = entry.flags.map(flag => flag.code).join(' ');
      if (this.flagged.get(entry.star) === codes) continue;
      this.flagged.set(entry.star, codes);
      lines.push(...entryLines(entry));
    }
    return lines;
  }

  /** The night in a few lines: what to point at, best first. */
  summary(view: NightView): string[] {
    const count = (n: number, one: string, many = `${one}s`) => `${n} ${n === 1 ? one : many}`;
    const refused = new Set(
      view.problems.filter(problem => problem.cost === 'file').map(problem => problem.file),
    ).size;
    return [
      '',
      `${view.field}: ${count(view.frames.length, 'file')} read, ${count(view.duplicates, 'duplicate')}, ${count(refused, 'file')} refused, ${count(view.stars.count, 'star')}, ${view.shortlist.length} flagged; ${view.conditions.darkWords}`,
      ...view.shortlist.map((entry, i) => `${String(i + 1).padStart(2)}  ${shortLine(entry)}`),
    ];
  }
}

function frameLine(frame: FrameSummary, view: NightView): string {
  const bands = frame.bands.length === 0 ? 'positions and parallaxes' : frame.bands.join(' ');
  const parts = [
    `frame    ${clockText(frame.mid_ms)} UT  ${frame.name}`,
    `${frame.rows} stars in ${bands}`,
    frame.fwhm_arcsec > 0 ? `FWHM ${fixed(frame.fwhm_arcsec, 1)} arcsec` : '',
    `night so far ${view.stars.count} stars`,
  ];
  return parts.filter(part => part !== '').join(', ');
}

function entryLines(entry: ShortlistEntry): string[] {
  const flags = entry.flags.map(flag => flag.code).join(', ');
  return [
    `flagged  ${entry.id}  ${entry.spectralType}  ${flags}`,
    ...entry.flags.map(flag => `         ${flag.because}`),
    ...entry.exposures.map(exposure => `         ${exposure.setup}: ${exposureWords(exposure)}`),
    `         ${windowWords(entry.window)}`,
  ];
}

function shortLine(entry: ShortlistEntry): string {
  const first = entry.exposures.find(exposure => exposure.possible) ?? entry.exposures[0];
  const exposure = first === undefined ? '' : `  ${first.setup}: ${exposureWords(first)}`;
  return `${entry.id}  ${entry.spectralType}  ${entry.flags.map(flag => flag.code).join(', ')}${exposure}  ${windowWords(entry.window)}`;
}

/** '1 x 715 s, S/N 30, 16 min with overheads', or why not. */
export function exposureWords(exposure: ExposureSuggestion): string {
  if (!exposure.possible) return exposure.limitedBy;
  return `${exposure.count} x ${secondsText(exposure.each_s)}, S/N ${fixed(exposure.snr, 0)}, ${durationText(exposure.total_s)} with overheads`;
}

/** 'airmass 1.02, start by 04:40 UT', or why it cannot be. */
export function windowWords(window: TargetWindow): string {
  const airmass = Number.isNaN(window.airmassNow) ? 'not up' : `airmass ${fixed(window.airmassNow, 2)}`;
  return window.blockedBy === ''
    ? `${airmass}, start by ${clockText(window.startBy_ms)} UT`
    : `${airmass}, ${window.blockedBy}`;
}
