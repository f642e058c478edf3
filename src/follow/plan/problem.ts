import type { Job } from './job.js';

/** What the search over orders works on: numbers alone. Jobs are places in the lists. */
export interface Problem {
  readonly jobs: readonly Job[];
  readonly merits: readonly number[];
  /** Jobs that may not be given up for others. */
  readonly kept: readonly boolean[];
  /** Setup before job j after job i; the last row: from where the telescope stands at the beginning. */
  readonly setup_ms: readonly Float64Array[];
  /** When the first slew may begin. */
  readonly ready_ms: number;
  /** Jobs of the previous plan, in its order; [] when there is none. */
  readonly previous: readonly number[];
}

/** Row of the setups from where the telescope stands at the beginning. */
export function origin(problem: Problem): number {
  return problem.jobs.length;
}

/**
 * Merits with those of the kept jobs raised above the sum of all others, so that giving one of them up never pays;
 * among kept jobs that exclude each other the better ones stay.
 */
export function weights(problem: Problem): Float64Array {
  const { merits, kept } = problem;
  const all = merits.reduce((sum, merit) => sum + merit, 0);
  return Float64Array.from(merits, (merit, i) => (kept[i] ? merit + 2 * all : merit));
}
