/** A night in whole minutes, small enough to try every order in it. */
export interface SmallNight {
  readonly now: number;
  readonly dark: readonly (readonly [number, number])[];
  readonly breaks: readonly (readonly [number, number])[];
  readonly setup: (from: number | undefined, to: number) => number;
}

export interface SmallTarget {
  readonly merit: number;
  readonly windows: readonly (readonly [number, number])[];
  readonly duration: (start: number) => number;
  readonly pin?: number | 'first';
}

export const END = 400;
const KNOT = 10;

/**
 * Best merit and its earliest finish over all orders of all subsets, minute by minute: written without anything of the
 * planner, as slowly as it can be. A pin that can be kept comes before all merit.
 */
export function bruteForce(targets: readonly SmallTarget[], night: SmallNight) {
  const inside = (spans: readonly (readonly [number, number])[], minute: number) =>
    spans.some(([from, until]) => minute >= from && minute < until);
  const free = (minute: number) => !inside(night.breaks, minute);
  const usable = targets.map(({ windows }) =>
    Array.from(
      { length: END },
      (_, minute) =>
        minute >= night.now && free(minute) && inside(night.dark, minute) && inside(windows, minute),
    ),
  );

  /** Time on target by the rule of ten-minute knots within one unbroken stretch. */
  const timeOnTarget = (job: number, start: number): number => {
    const { pin, duration } = targets[job];
    if (typeof pin === 'number') return start === pin ? duration(start) : Number.POSITIVE_INFINITY;
    let from = start;
    while (from > 0 && usable[job][from - 1]) from--;
    let until = start;
    while (until < END && usable[job][until]) until++;
    let least = Number.POSITIVE_INFINITY;
    for (let knot = from; knot < until; knot += KNOT) {
      const next = Math.min(knot + KNOT, until);
      if (start >= knot && start <= next) least = Math.min(least, Math.max(duration(knot), duration(next)));
    }
    return least;
  };

  const finishOf = (job: number, ready: number, from: number | undefined): number => {
    const setup = night.setup(from, job);
    let best = Number.POSITIVE_INFINITY;
    for (let start = ready + setup; start < END; start++) {
      const finish = start + timeOnTarget(job, start);
      if (finish > END) continue;
      let works = true;
      for (let minute = start - setup; minute < start; minute++) works &&= free(minute);
      for (let minute = start; minute < finish; minute++) works &&= usable[job][minute];
      if (works) best = Math.min(best, finish);
    }
    return best;
  };

  let best = { pins: 0, merit: 0, finish: night.now };
  const first = targets.findIndex(({ pin }) => pin === 'first');
  const mustBeFirst = first >= 0 && Number.isFinite(finishOf(first, night.now, undefined));
  const search = (
    used: number,
    last: number | undefined,
    ready: number,
    merit: number,
    pins: number,
  ): void => {
    const isBetter =
      pins > best.pins ||
      (pins === best.pins && (merit > best.merit || (merit === best.merit && ready < best.finish)));
    if (isBetter) best = { pins, merit, finish: ready };
    for (let job = 0; job < targets.length; job++) {
      if (used & (1 << job) || (used === 0 && mustBeFirst && job !== first)) continue;
      const finish = finishOf(job, ready, last);
      const pin = targets[job].pin === undefined ? 0 : 1;
      if (Number.isFinite(finish))
        search(used | (1 << job), job, finish, merit + targets[job].merit, pins + pin);
    }
  };
  search(0, undefined, night.now, 0, 0);
  return best;
}
