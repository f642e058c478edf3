import type { Span } from '../sky/time-grid.js';

/** Something that is to be observed tonight. Times in Unix ms, durations in ms. */
export interface PlanTarget {
  readonly id: string;
  /** What observing it to the end is worth; what is worth nothing still gets the time nobody else needs. */
  readonly merit: number;
  /** When it may be observed, in order of time. */
  readonly windows: readonly Span[];
  /**
   * Time on target when it is begun at a time, without the slew and the acquisition; NaN: it cannot be begun then.
   * Asked every ten minutes of the windows, where the longer of two neighbours counts for the time between.
   */
  readonly duration_ms: (start_ms: number) => number;
  /** A start that is settled: a time, or before everything else (several: in the order given). */
  readonly pin?: number | 'first';
  /** Why a window ends then, to go before 'at 02:14 UT': 'sets below airmass 2.0'. */
  readonly closes: (until_ms: number) => string;
  /** Why there is no window any more; asked where `windows` has none left. */
  readonly whyNever: () => string;
}

/** What is left of a night. */
export interface PlanNight {
  /** Nothing begins before this, slews included. */
  readonly now_ms: number;
  /** When exposures may run, in order of time. */
  readonly dark: readonly Span[];
  /** When nothing may run, slews included, in order of time. */
  readonly breaks: readonly Span[];
  /** Slew and acquisition before a target that follows another; undefined: from where the telescope stands now. */
  readonly setup_ms: (from: string | undefined, to: string) => number;
}

/** One target's place in the night: slew from setup_ms, exposures from start_ms to end_ms. */
export interface PlannedBlock {
  readonly id: string;
  readonly setup_ms: number;
  readonly start_ms: number;
  readonly end_ms: number;
}

/** Every target of the call is in one of the two lists. */
export interface Plan {
  /** In order of time; none overlaps another. */
  readonly blocks: readonly PlannedBlock[];
  readonly unplaced: readonly { readonly id: string; readonly reason: string }[];
  /** Sum over the blocks. */
  readonly merit: number;
}
