/** Stretch of time, Unix ms: from, until. */
export type Span = readonly [number, number];

/** Bisections of one grid step: five minutes end below a millisecond. */
const BISECTIONS = 20;

/** Times an equal step apart, between which smooth values are interpolated. */
export class TimeGrid {
  readonly times: Float64Array;
  private readonly step_ms: number;

  /** Points from `from_ms` to `until_ms` at most `step_ms` apart, three at least; none where either is NaN. */
  constructor(from_ms: number, until_ms: number, step_ms: number) {
    const steps = Math.max(2, Math.ceil((until_ms - from_ms) / step_ms));
    this.step_ms = (until_ms - from_ms) / steps;
    this.times = Float64Array.from(
      { length: Number.isNaN(steps) ? 0 : steps + 1 },
      (_, i) => from_ms + i * this.step_ms,
    );
  }

  get until_ms(): number {
    return this.times[this.times.length - 1];
  }

  covers(time_ms: number): boolean {
    return time_ms >= this.times[0] && time_ms <= this.until_ms;
  }

  nearest(time_ms: number): number {
    return Math.round((time_ms - this.times[0]) / this.step_ms);
  }

  /** Value at a time within the grid, by the parabola through the three nearest points. */
  at(values: ArrayLike<number>, time_ms: number): number {
    const k = Math.min(this.times.length - 2, Math.max(1, this.nearest(time_ms)));
    const x = (time_ms - this.times[k]) / this.step_ms;
    const a = values[k - 1];
    const b = values[k];
    const c = values[k + 1];
    return b + ((c - a) / 2) * x + ((a - 2 * b + c) / 2) * x * x;
  }

  /**
   * When smooth values pass a level, in order of time; both passings of a step that begins and ends on the same side.
   */
  crossings(values: ArrayLike<number>, level: number): number[] {
    const isBelow = (time_ms: number) => this.at(values, time_ms) < level;
    const found: number[] = [];
    for (let i = 1; i < this.times.length; i++) {
      const [from, until] = [this.times[i - 1], this.times[i]];
      const before = values[i - 1] < level;
      if (values[i] < level !== before) {
        found.push(turnBetween(from, until, isBelow));
        continue;
      }
      const peak = this.peakBetween(values, i);
      if (peak > from && peak < until && isBelow(peak) !== before)
        found.push(turnBetween(from, peak, isBelow), turnBetween(peak, until, isBelow));
    }
    return found;
  }

  /** Vertex of the values' parabolas between the points i-1 and i; NaN where they only rise or sink. */
  private peakBetween(values: ArrayLike<number>, i: number): number {
    for (let k = i - 1; k <= i; k++) {
      if (k < 1 || k > this.times.length - 2) continue;
      const bend = values[k - 1] - 2 * values[k] + values[k + 1];
      const peak = this.times[k] + ((values[k - 1] - values[k + 1]) / (2 * bend)) * this.step_ms;
      if (peak >= this.times[i - 1] && peak <= this.times[i]) return peak;
    }
    return Number.NaN;
  }

  /** Stretches in which something holds that changes at the given times alone, in whatever order they are. */
  spans(turns: readonly number[], holds: (time_ms: number) => boolean): Span[] {
    const edges =
      this.times.length === 0 ? [] : [this.times[0], ...turns, this.until_ms].sort((a, b) => a - b);
    const spans: [number, number][] = [];
    for (let i = 1; i < edges.length; i++) {
      const [from, until] = [edges[i - 1], edges[i]];
      if (from === until || !holds((from + until) / 2)) continue;
      const last = spans.at(-1);
      if (last?.[1] === from) last[1] = until;
      else spans.push([from, until]);
    }
    return spans;
  }
}

/** When something that differs at two times changes between them. */
export function turnBetween(from_ms: number, until_ms: number, holds: (time_ms: number) => boolean): number {
  let [low, high] = [from_ms, until_ms];
  const before = holds(low);
  for (let n = 0; n < BISECTIONS; n++) {
    const middle = (low + high) / 2;
    if (holds(middle) === before) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}
