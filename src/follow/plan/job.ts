import type { Span } from '../sky/time-grid.js';
import type { PlanNight, PlanTarget } from './plan.js';
import { common, without } from './stretches.js';

/** How far apart a target's durations are asked for. */
const KNOT_MS = 10 * 60_000;

/** Starts that take equally long. */
interface Cell {
  readonly from_ms: number;
  /** Latest start. */
  readonly to_ms: number;
  readonly duration_ms: number;
  /** End of the last break before: the slew may not begin earlier. */
  readonly open_ms: number;
}

/**
 * When one target can be begun and how long it then takes. Later starts may finish earlier (a rising target), so a
 * finish is the earliest over all starts from some time on: that makes it monotone, and the search over orders exact.
 */
export class Job {
  /** Shortest time on target; infinite where it fits nowhere. */
  readonly shortest_ms: number;
  /** Earliest finish and latest start of all. */
  readonly firstFinish_ms: number;
  readonly lastStart_ms: number;
  /** Latest start in a cell or any before it: the cells to skip are found by halving. */
  private readonly reach_ms: Float64Array;
  /** Shortest time on target in a cell or any after it. */
  private readonly least_ms: Float64Array;

  constructor(
    readonly id: string,
    private readonly cells: readonly Cell[],
  ) {
    this.reach_ms = Float64Array.from(cells, ({ to_ms }) => to_ms);
    this.least_ms = Float64Array.from(cells, ({ duration_ms }) => duration_ms);
    for (let i = 1; i < cells.length; i++) {
      this.reach_ms[i] = Math.max(this.reach_ms[i], this.reach_ms[i - 1]);
      const k = cells.length - 1 - i;
      this.least_ms[k] = Math.min(this.least_ms[k], this.least_ms[k + 1]);
    }
    this.shortest_ms = this.least_ms[0] ?? Number.POSITIVE_INFINITY;
    this.firstFinish_ms = this.earliestFinish_ms(Number.NEGATIVE_INFINITY, 0);
    this.lastStart_ms = this.reach_ms.at(-1) ?? Number.NEGATIVE_INFINITY;
  }

  /** Earliest finish when the slew begins at `ready_ms` or later; infinite: not at all. */
  earliestFinish_ms(ready_ms: number, setup_ms: number): number {
    const { cells } = this;
    let best = Number.POSITIVE_INFINITY;
    for (let i = this.firstReaching(ready_ms + setup_ms); i < cells.length; i++) {
      if (cells[i].from_ms + this.least_ms[i] >= best) break;
      best = Math.min(best, startIn(cells[i], ready_ms, setup_ms) + cells[i].duration_ms);
    }
    return best;
  }

  /** Latest time to begin the slew so that all is finished by a time; minus infinity: never. */
  latestReady_ms(finish_ms: number, setup_ms: number): number {
    let latest = Number.NEGATIVE_INFINITY;
    const last = this.lastBeginning(finish_ms - this.shortest_ms);
    for (let i = last; i >= 0 && this.reach_ms[i] - setup_ms > latest; i--) {
      const cell = this.cells[i];
      const start = Math.min(cell.to_ms, finish_ms - cell.duration_ms);
      if (start >= Math.max(cell.from_ms, cell.open_ms + setup_ms))
        latest = Math.max(latest, start - setup_ms);
    }
    return latest;
  }

  /** Start of the earliest finish; NaN where there is none. */
  start_ms(ready_ms: number, setup_ms: number): number {
    const finish = this.earliestFinish_ms(ready_ms, setup_ms);
    const starts = this.cells
      .filter(cell => startIn(cell, ready_ms, setup_ms) + cell.duration_ms === finish)
      .map(cell => startIn(cell, ready_ms, setup_ms));
    return Number.isFinite(finish) ? Math.max(...starts) : Number.NaN;
  }

  /** Last cell that begins by a time; -1 where there is none. */
  private lastBeginning(time_ms: number): number {
    let [low, high] = [0, this.cells.length];
    while (low < high) {
      const middle = (low + high) >> 1;
      if (this.cells[middle].from_ms <= time_ms) low = middle + 1;
      else high = middle;
    }
    return low - 1;
  }

  /** First cell in which, or before which, something can be begun at a time or later. */
  private firstReaching(time_ms: number): number {
    let [low, high] = [0, this.cells.length];
    while (low < high) {
      const middle = (low + high) >> 1;
      if (this.reach_ms[middle] < time_ms) low = middle + 1;
      else high = middle;
    }
    return low;
  }
}

function startIn(cell: Cell, ready_ms: number, setup_ms: number): number {
  const start = Math.max(cell.from_ms, Math.max(cell.open_ms, ready_ms) + setup_ms);
  return start <= cell.to_ms ? start : Number.POSITIVE_INFINITY;
}

/** Stretches of a target's windows that are dark, free of breaks and still to come. */
export function stretchesOf(windows: readonly Span[], night: PlanNight): Span[] {
  const ahead: readonly Span[] = [[night.now_ms, Number.POSITIVE_INFINITY]];
  return without(common(common(windows, night.dark), ahead), night.breaks);
}

/** A target's job within the night; one with a settled time has that start alone. */
export function jobOf(target: PlanTarget, night: PlanNight): Job {
  const cells = stretchesOf(target.windows, night).flatMap(stretch => {
    const open_ms = night.breaks.reduce(
      (latest, [, until]) => (until <= stretch[0] ? Math.max(latest, until) : latest),
      night.now_ms,
    );
    const { pin } = target;
    return typeof pin === 'number'
      ? pinnedCell(target, stretch, open_ms, pin)
      : cellsOf(target, stretch, open_ms);
  });
  return new Job(target.id, cells);
}

function pinnedCell(target: PlanTarget, [from, until]: Span, open_ms: number, pin_ms: number): Cell[] {
  const duration_ms = target.duration_ms(pin_ms);
  const fits = pin_ms >= from && pin_ms + duration_ms <= until;
  return fits ? [{ from_ms: pin_ms, to_ms: pin_ms, duration_ms, open_ms }] : [];
}

function cellsOf(target: PlanTarget, [from, until]: Span, open_ms: number): Cell[] {
  const pieces = Math.ceil((until - from) / KNOT_MS);
  const knots = Array.from({ length: pieces + 1 }, (_, i) => Math.min(from + i * KNOT_MS, until));
  const durations = knots.map(target.duration_ms);
  const cells: Cell[] = [];
  for (let i = 0; i < pieces; i++) {
    const duration_ms = Math.max(durations[i], durations[i + 1]);
    const to_ms = Math.min(knots[i + 1], until - duration_ms);
    if (!(to_ms >= knots[i])) continue;
    const last = cells.at(-1);
    if (last?.duration_ms === duration_ms && last.to_ms === knots[i])
      cells[cells.length - 1] = { ...last, to_ms };
    else cells.push({ from_ms: knots[i], to_ms, duration_ms, open_ms });
  }
  return cells;
}
