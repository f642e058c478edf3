import type { Step } from '../state/events.js';
import type { ScreenName, ScreenState } from '../state/screen-state.js';

/** One thing that can be done with a key. */
export interface KeyEntry {
  /** Names of the keys, see `nameOfKey`. */
  readonly keys: readonly string[];
  /** The keys as they are written for people. */
  readonly shown: string;
  readonly where: readonly ScreenName[] | 'everywhere';
  /** A word or two for the line of keys; absent: not offered there. */
  readonly label?: string;
  /** What the line of keys calls the key where `shown` would be too long. */
  readonly footerKey?: string;
  /** One sentence. */
  readonly does: string;
  /** Why it cannot be done now; '' when it can. Absent: it always can. */
  readonly whyNot?: (state: ScreenState) => string;
  readonly run: (state: ScreenState, key: string) => Step<ScreenState>;
}

/** A change that asks nothing of the rest of the program. */
export function done(state: ScreenState): Step<ScreenState> {
  return { state, effects: [] };
}

export function isOffered(entry: KeyEntry, screen: ScreenName): boolean {
  return entry.where === 'everywhere' || entry.where.includes(screen);
}
