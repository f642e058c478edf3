import { refraction_deg } from '../../science/sky/refraction.js';
import { azimuthOf_deg, type Direction, dot, type HorizonAxes } from './direction.js';
import { horizonAltitude_deg } from './horizon.js';
import type { SkyLimits } from './sky-limits.js';
import { type Span, type TimeGrid, turnBetween } from './time-grid.js';

const RADIAN = Math.PI / 180;
/** The sine of an altitude bends by less between two points of the grid: ten times (1.25 deg in radians)^2 / 8. */
const BEND = 6e-4;
/** How closely the corners of a horizon are looked at: the sky turns by 2.5 arcmin in that time. */
const CLOSE_MS = 10_000;

/** What is the same for all paths of a night, at the points of its grid. */
export interface NightFrame {
  readonly grid: TimeGrid;
  readonly axes: readonly HorizonAxes[];
  readonly moon: readonly Direction[];
  readonly moonAltitude_deg: readonly number[];
  /** Rising and setting of the Moon's centre. */
  readonly moonTurns: readonly number[];
  readonly limits: SkyLimits;
}

/**
 * One star on the night's grid: smooth values, between whose points parabolas are good to an arcsecond. Every limit is
 * followed to the times at which it is passed, so that no window is too short to be found.
 */
export class StarPath {
  private readonly sinAltitude: Float64Array;
  private readonly cosMoonDistance: Float64Array;
  private readonly north: Float64Array;
  private readonly west: Float64Array;

  constructor(
    private readonly frame: NightFrame,
    direction: Direction,
  ) {
    this.sinAltitude = along(frame.axes.length, i => dot(frame.axes[i].up, direction));
    this.cosMoonDistance = along(frame.moon.length, i => dot(frame.moon[i], direction));
    // Only a horizon asks for azimuths.
    const points = frame.limits.horizon.length > 0 ? frame.axes.length : 0;
    this.north = along(points, i => dot(frame.axes[i].north, direction));
    this.west = along(points, i => dot(frame.axes[i].west, direction));
  }

  /** When it is within all limits. */
  openSpans(): Span[] {
    const { grid, limits, moonTurns } = this.frame;
    const turns = [
      ...this.highTurns(),
      ...(limits.sinHighest < 1 ? grid.crossings(this.sinAltitude, limits.sinHighest) : []),
      ...grid.crossings(this.cosMoonDistance, limits.cosMoon),
      ...moonTurns,
    ];
    return grid.spans(turns, time => this.isHigh(time) && !this.isNearZenith(time) && !this.isMoonNear(time));
  }

  /** When it is high enough, whatever else forbids it. */
  highSpans(): Span[] {
    return this.frame.grid.spans(this.highTurns(), time => this.isHigh(time));
  }

  isHigh(time_ms: number): boolean {
    return this.isAboveLowest(time_ms) && this.isAboveHorizon(time_ms);
  }

  isAboveLowest(time_ms: number): boolean {
    return this.frame.grid.at(this.sinAltitude, time_ms) >= this.frame.limits.sinLowest;
  }

  isNearZenith(time_ms: number): boolean {
    return this.frame.grid.at(this.sinAltitude, time_ms) > this.frame.limits.sinHighest;
  }

  isMoonNear(time_ms: number): boolean {
    const { grid, limits, moonAltitude_deg } = this.frame;
    return grid.at(this.cosMoonDistance, time_ms) > limits.cosMoon && grid.at(moonAltitude_deg, time_ms) > 0;
  }

  highest_deg(): number {
    return Math.asin(Math.max(...this.sinAltitude)) / RADIAN;
  }

  nearestMoon_deg(): number {
    return Math.acos(Math.min(1, Math.max(...this.cosMoonDistance))) / RADIAN;
  }

  private highTurns(): number[] {
    const { grid, limits } = this.frame;
    return [...grid.crossings(this.sinAltitude, limits.sinLowest), ...this.horizonTurns()];
  }

  /** The horizon has corners: where the star is low enough to meet it, the grid is too wide. */
  private horizonTurns(): number[] {
    const { grid, limits } = this.frame;
    const turns: number[] = [];
    if (limits.sinHorizonTop <= limits.sinLowest) return turns;
    const holds = (time: number) => this.isAboveHorizon(time);
    for (let i = 1; i < grid.times.length; i++) {
      const [a, b] = [this.sinAltitude[i - 1], this.sinAltitude[i]];
      if (Math.min(a, b) > limits.sinHorizonTop + BEND || Math.max(a, b) < limits.sinLowest - BEND) continue;
      const pieces = Math.ceil((grid.times[i] - grid.times[i - 1]) / CLOSE_MS);
      const time = (n: number) => grid.times[i - 1] + ((grid.times[i] - grid.times[i - 1]) * n) / pieces;
      for (let n = 1; n <= pieces; n++) {
        if (holds(time(n - 1)) !== holds(time(n))) turns.push(turnBetween(time(n - 1), time(n), holds));
      }
    }
    return turns;
  }

  private isAboveHorizon(time_ms: number): boolean {
    const { limits } = this.frame;
    const up = this.frame.grid.at(this.sinAltitude, time_ms);
    if (up >= limits.sinHorizonTop) return true;
    const azimuth_deg = azimuthOf_deg(
      this.frame.grid.at(this.north, time_ms),
      this.frame.grid.at(this.west, time_ms),
    );
    const altitude_deg = Math.asin(Math.max(-1, up)) / RADIAN;
    const seen_deg = altitude_deg + limits.refractionFactor * refraction_deg(altitude_deg);
    return seen_deg >= horizonAltitude_deg(limits.horizon, azimuth_deg);
  }
}

/** A value at each point of the grid; `Float64Array.from` is far slower. */
function along(points: number, value: (i: number) => number): Float64Array {
  const values = new Float64Array(points);
  for (let i = 0; i < points; i++) values[i] = value(i);
  return values;
}
