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
  at(values: readonly number[], time_ms: number): number {
    const k = Math.min(this.times.length - 2, Math.max(1, this.nearest(time_ms)));
    const x = (time_ms - this.times[k]) / this.step_ms;
    const a = values[k - 1];
    const b = values[k];
    const c = values[k + 1];
    return b + ((c - a) / 2) * x + ((a - 2 * b + c) / 2) * x * x;
  }

  /** Stretches in which something holds; one that is shorter than a step may be missed. */
  spans(holds: (time_ms: number) => boolean): Span[] {
    const spans: Span[] = [];
    let from = Number.NaN;
    for (let i = 0; i < this.times.length; i++) {
      const good = holds(this.times[i]);
      if (good && Number.isNaN(from)) from = i === 0 ? this.times[0] : this.turn(i, holds);
      if (!good && !Number.isNaN(from)) {
        spans.push([from, this.turn(i, holds)]);
        from = Number.NaN;
      }
    }
    if (!Number.isNaN(from)) spans.push([from, this.until_ms]);
    return spans;
  }

  /** When something begins or ends to hold between the points i-1 and i. */
  private turn(i: number, holds: (time_ms: number) => boolean): number {
    let [low, high] = [this.times[i - 1], this.times[i]];
    const before = holds(low);
    for (let n = 0; n < BISECTIONS; n++) {
      const middle = (low + high) / 2;
      if (holds(middle) === before) low = middle;
      else high = middle;
    }
    return (low + high) / 2;
  }
}
