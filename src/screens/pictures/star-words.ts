import type { ExposureSuggestion } from '../../follow/exposure/suggestion.js';
import type { RaisedFlag } from '../../follow/flags/index.js';
import type { TargetWindow } from '../../follow/sky/window.js';
import type { ShortlistEntry, StarColumns } from '../../night/view.js';
import { CLASSES } from '../../science/classes.js';
import { oddsText, temperatureTypeText } from '../../science/odds/index.js';
import { clockText, durationText, leftText, secondsText } from './text.js';

/** Names that would not fit into a column of 14. */
const SHORT_FLAGS: Readonly<Record<string, string>> = {
  'between-sequences': 'off sequence',
  'above-main-sequence': 'above dwarfs',
  'fits-none': 'fits no class',
  'instability-strip': 'may pulsate',
};

/** A flag in at most 14 characters: 'white dwarf', 'off sequence'. */
export function flagLabel(code: string): string {
  return SHORT_FLAGS[code] ?? code.replaceAll('-', ' ');
}

/** The flag in whole words: 'above main sequence'. */
export function flagWords(code: string): string {
  return code.replaceAll('-', ' ');
}

/** The most certain flag first. */
export function byOdds(flags: readonly RaisedFlag[]): readonly RaisedFlag[] {
  return [...flags].sort((a, b) => b.odds - a.odds);
}

/** Type of a star of the table: 'K2 III', 'D3 WD', 'no class'; empty when not known. */
export function typeText(stars: StarColumns, star: number): string {
  if (Number.isNaN(stars.classOdds[star])) return '';
  const starClass = CLASSES[stars.classIndex[star]];
  if (starClass === 'none') return 'no class';
  return `${temperatureTypeText(starClass, stars.subtype[star], stars.teff_K[star])} ${starClass}`.trim();
}

/** The same with its odds: 'K2 III 0.93'. */
export function typeWithOdds(stars: StarColumns, star: number): string {
  const type = typeText(stars, star);
  return type === '' ? '' : `${type} ${oddsText(stars.classOdds[star])}`;
}

/** A type without its odds, for narrow columns: 'G8 IV/III 0.55/0.41' -> 'G8 IV/III'. */
export function withoutOdds(spectralType: string): string {
  return spectralType.replace(/ [\d./]+$/, '');
}

/** The suggestion to show first: the first setup that can do it at all. */
export function firstPossible(exposures: readonly ExposureSuggestion[]): ExposureSuggestion | undefined {
  return exposures.find(exposure => exposure.possible) ?? exposures[0];
}

/** '3 x 240 s', 'too faint', 'no setup'. */
export function exposureShort(exposure: ExposureSuggestion | undefined): string {
  if (exposure === undefined) return 'no setup';
  if (exposure.possible) return `${exposure.count} x ${secondsText(exposure.each_s)}`;
  return exposure.limitedBy.split(':')[0].slice(0, 12);
}

/** 'imager V: 3 x 240 s, 15 min in all, S/N 52', or why not. */
export function exposureWords(exposure: ExposureSuggestion | undefined): string {
  if (exposure === undefined) return 'no follow-up setup in the profile';
  if (!exposure.possible) return `${exposure.setup}: ${exposure.limitedBy}`;
  return `${exposure.setup}: ${exposureShort(exposure)}, ${durationText(exposure.total_s)} in all, S/N ${exposure.snr.toFixed(0)}`;
}

/** What can be done about a star now. */
export type Urgency = 'open' | 'soon' | 'later' | 'closed';

/** A start within this time is urgent. */
const SOON_MS = 30 * 60_000;

export function urgencyOf(window: TargetWindow, now_ms: number): Urgency {
  if (Number.isNaN(window.startBy_ms) || window.startBy_ms < now_ms) return 'closed';
  if (window.upFrom_ms > now_ms) return 'later';
  return window.startBy_ms - now_ms < SOON_MS ? 'soon' : 'open';
}

/** 'by 03:42', 'from 01:10', 'too late', 'no window': at most 10 characters. */
export function startByShort(window: TargetWindow, now_ms: number): string {
  switch (urgencyOf(window, now_ms)) {
    case 'closed':
      return window.startBy_ms < now_ms ? 'too late' : 'no window';
    case 'later':
      return `from ${clockText(window.upFrom_ms)}`;
    default:
      return `by ${clockText(window.startBy_ms)}`;
  }
}

/** 'start by 03:42 UT, in 61 min', 'up from 01:10 to 04:40 UT', or why it cannot be observed. */
export function startByWords(window: TargetWindow, now_ms: number): string {
  const { startBy_ms, upFrom_ms } = window;
  switch (urgencyOf(window, now_ms)) {
    case 'closed':
      return startBy_ms < now_ms
        ? `too late: it had to be begun by ${clockText(startBy_ms)} UT`
        : `cannot be observed: ${window.blockedBy || 'no window tonight'}`;
    case 'later':
      return `from ${clockText(upFrom_ms)} UT (in ${leftText(now_ms, upFrom_ms)}), start by ${clockText(startBy_ms)} UT`;
    default:
      return `start by ${clockText(startBy_ms)} UT, ${leftText(now_ms, startBy_ms)} left`;
  }
}

/** The entry to point at next: the best that can be begun now; else the best of all. */
export function nextTarget(shortlist: readonly ShortlistEntry[], now_ms: number): ShortlistEntry | undefined {
  return (
    shortlist.find(entry => {
      const urgency = urgencyOf(entry.window, now_ms);
      return (urgency === 'open' || urgency === 'soon') && firstPossible(entry.exposures)?.possible === true;
    }) ?? shortlist[0]
  );
}
