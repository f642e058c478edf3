import { airmass, altitudeOfAirmass_deg } from '../../science/sky/airmass.js';
import type { Site } from '../settings.js';
import { type Direction, directionOf, type Ephemeris } from './ephemeris.js';
import { clock, type Night } from './night-of.js';
import type { SkyGeometry } from './sky-light.js';

const RADIAN = Math.PI / 180;
const STEP_MS = 5 * 60_000;

/** When a star can be observed in the rest of a night, and until when it must be begun. Times in Unix ms. */
export interface TargetWindow {
  readonly altitudeNow_deg: number;
  readonly airmassNow: number;
  /** NaN: not in this night any more. */
  readonly upFrom_ms: number;
  readonly upUntil_ms: number;
  /** Latest start that still completes; NaN when there is none. */
  readonly startBy_ms: number;
  /** Empty when it can be observed, else why not. */
  readonly blockedBy: string;
}

/** A star's night: where it stands now, and the stretches in which it can be observed. */
export interface StarTonight {
  readonly now_ms: number;
  readonly altitudeNow_deg: number;
  readonly airmassNow: number;
  readonly spans: readonly (readonly [number, number])[];
  readonly whyNever: () => string;
}

interface Moment {
  readonly time_ms: number;
  readonly zenith: Direction;
  readonly moon: Direction;
  readonly moonAltitude_deg: number;
  readonly sunAltitude_deg: number;
}

/**
 * The sky of one night on a grid of five minutes, made once and used for every star: quadratic interpolation
 * in it is good to an arcsecond, far below what a window needs.
 */
export class NightSky {
  private readonly times: Float64Array;
  private readonly zenith: readonly Direction[];
  private readonly moon: readonly Direction[];
  private readonly moonAltitude_deg: readonly number[];
  private readonly sunAltitude_deg: readonly number[];
  private readonly phaseAngle_deg: number;
  private readonly limit_deg: number;
  /** The Earth's motion turns by a degree a day: one aberration serves the night. */
  private readonly toApparent: (direction: Direction) => Direction;
  private kept: Moment | undefined;
  private zenithKept: { readonly time_ms: number; readonly row: Direction } | undefined;

  constructor(
    private readonly ephemeris: Ephemeris,
    private readonly site: Site,
    readonly night: Night,
  ) {
    const { dusk_ms, dawn_ms } = night.dark;
    const steps = Number.isNaN(dusk_ms) ? 0 : Math.max(2, Math.ceil((dawn_ms - dusk_ms) / STEP_MS));
    this.times = Float64Array.from(
      { length: steps === 0 ? 0 : steps + 1 },
      (_, i) => dusk_ms + (i * (dawn_ms - dusk_ms)) / steps,
    );
    this.zenith = Array.from(this.times, time => ephemeris.zenithRow(time));
    this.moon = Array.from(this.times, time => ephemeris.moonDirection(time));
    this.moonAltitude_deg = Array.from(this.times, time => ephemeris.moonAltitude_deg(time));
    this.sunAltitude_deg = Array.from(this.times, time => ephemeris.sunAltitude_deg(time));
    this.phaseAngle_deg = ephemeris.moonPhaseAngle_deg((night.noon_ms + night.nextNoon_ms) / 2);
    this.toApparent = ephemeris.aberrationAt((night.noon_ms + night.nextNoon_ms) / 2);
    this.limit_deg = Math.max(site.minAltitude_deg, altitudeOfAirmass_deg(site.maxAirmass));
  }

  /** How a star stands tonight, whatever is done with it. */
  follow(ra_deg: number, dec_deg: number, now_ms: number): StarTonight {
    const direction = this.toApparent(directionOf(ra_deg, dec_deg));
    const altitudeNow_deg = altitudeIn(this.zenithAt(now_ms), direction);
    const altitudes = this.zenith.map(row => altitudeIn(row, direction) - this.limit_deg);
    const clear = this.moon.map((moon, i) =>
      this.moonAltitude_deg[i] > 0 ? separation_deg(moon, direction) - this.site.moonDistance_deg : 1,
    );
    return {
      now_ms,
      altitudeNow_deg,
      airmassNow: airmass(altitudeNow_deg),
      spans: this.spans(altitudes, clear).filter(([, until]) => until > now_ms),
      whyNever: () => this.whyNever(altitudes, clear, now_ms),
    };
  }

  /** The window of a star for an observation of the given wall time (0: any). */
  windowFor(star: StarTonight, wall_s: number): TargetWindow {
    const { now_ms, altitudeNow_deg, airmassNow, spans } = star;
    const place = { altitudeNow_deg, airmassNow };
    const span = spans.find(([from, until]) => until - Math.max(from, now_ms) >= wall_s * 1000) ?? spans[0];
    if (span === undefined) return { ...place, ...NEVER, blockedBy: star.whyNever() };
    const [upFrom_ms, upUntil_ms] = span;
    const startBy = upUntil_ms - wall_s * 1000;
    const fits = startBy >= Math.max(upFrom_ms, now_ms);
    return {
      ...place,
      upFrom_ms,
      upUntil_ms,
      startBy_ms: fits ? startBy : Number.NaN,
      blockedBy: fits ? '' : this.whyTooShort(upFrom_ms, upUntil_ms, now_ms, wall_s),
    };
  }

  /**
   * Where a target, the Moon and the Sun stand: in the dark at the nearest point of the grid, which is near enough for
   * the brightness of the sky; outside it at the time itself.
   */
  geometryAt(ra_deg: number, dec_deg: number, time_ms: number): SkyGeometry {
    const moment = this.momentOf(time_ms);
    const direction = this.toApparent(directionOf(ra_deg, dec_deg));
    return {
      phaseAngle_deg: this.phaseAngle_deg,
      sunAltitude_deg: moment.sunAltitude_deg,
      moonZenithDistance_deg: 90 - moment.moonAltitude_deg,
      separation_deg: separation_deg(moment.moon, direction),
      targetZenithDistance_deg: 90 - altitudeIn(moment.zenith, direction),
    };
  }

  /** What is the same for all stars at one time: from the grid where it reaches, else worked out and kept. */
  private momentOf(time_ms: number): Moment {
    const { times } = this;
    if (time_ms >= times[0] && time_ms <= times[times.length - 1]) {
      const i = Math.round((time_ms - times[0]) / (times[1] - times[0]));
      return {
        time_ms,
        zenith: this.zenith[i],
        moon: this.moon[i],
        moonAltitude_deg: this.moonAltitude_deg[i],
        sunAltitude_deg: this.sunAltitude_deg[i],
      };
    }
    if (this.kept?.time_ms !== time_ms) {
      this.kept = {
        time_ms,
        zenith: this.ephemeris.zenithRow(time_ms),
        moon: this.ephemeris.moonDirection(time_ms),
        moonAltitude_deg: this.ephemeris.moonAltitude_deg(time_ms),
        sunAltitude_deg: this.ephemeris.sunAltitude_deg(time_ms),
      };
    }
    return this.kept;
  }

  /** Rotation to the zenith at one time, kept for the stars that are looked at together. */
  private zenithAt(time_ms: number): Direction {
    if (this.zenithKept?.time_ms !== time_ms) {
      this.zenithKept = { time_ms, row: this.ephemeris.zenithRow(time_ms) };
    }
    return this.zenithKept.row;
  }

  /** Stretches of the night in which both values are positive. */
  private spans(altitudes: readonly number[], clear: readonly number[]): [number, number][] {
    const spans: [number, number][] = [];
    let from = Number.NaN;
    for (let i = 0; i < this.times.length; i++) {
      const good = altitudes[i] >= 0 && clear[i] >= 0;
      if (good && Number.isNaN(from)) from = i === 0 ? this.times[0] : this.edge(altitudes, clear, i);
      if (!good && !Number.isNaN(from)) {
        spans.push([from, this.edge(altitudes, clear, i)]);
        from = Number.NaN;
      }
    }
    if (!Number.isNaN(from)) spans.push([from, this.times[this.times.length - 1]]);
    return spans;
  }

  /** Time between grid points i-1 and i at which the smaller of the two values passes zero. */
  private edge(altitudes: readonly number[], clear: readonly number[], i: number): number {
    let low = this.times[i - 1];
    let high = this.times[i];
    const goodBefore = altitudes[i - 1] >= 0 && clear[i - 1] >= 0;
    for (let step = 0; step < 20; step++) {
      const middle = (low + high) / 2;
      const good =
        this.at(altitudes, i, middle) >= 0 &&
        (clear[i - 1] >= 0 && clear[i] >= 0 ? true : this.at(clear, i, middle) >= 0);
      if (good === goodBefore) low = middle;
      else high = middle;
    }
    return (low + high) / 2;
  }

  /** Value at a time by the parabola through the grid points around i. */
  private at(values: readonly number[], i: number, time: number): number {
    const k = Math.min(this.times.length - 2, Math.max(1, i));
    const step = this.times[1] - this.times[0];
    const x = (time - this.times[k]) / step;
    const [a, b, c] = [values[k - 1], values[k], values[k + 1]];
    return b + ((c - a) / 2) * x + ((a - 2 * b + c) / 2) * x * x;
  }

  private whyNever(altitudes: readonly number[], clear: readonly number[], now_ms: number): string {
    if (this.times.length === 0) return 'no dark time tonight: the Sun stays too high';
    const end = this.times[this.times.length - 1];
    if (now_ms >= end)
      return `the night is over (Sun above ${this.site.sunLimit_deg} deg since ${clock(end)} UT)`;
    const highest = Math.max(...altitudes) + this.limit_deg;
    if (highest < this.limit_deg) {
      return `never above ${this.limit_deg.toFixed(0)} deg in the dark (highest ${highest.toFixed(0)} deg)`;
    }
    const up = altitudes.findLastIndex(altitude => altitude >= 0);
    if (this.times[up] <= now_ms)
      return `below ${this.limit_deg.toFixed(0)} deg since ${clock(this.times[up])} UT`;
    const nearest = Math.min(...clear) + this.site.moonDistance_deg;
    return `the Moon is too near (${nearest.toFixed(0)} deg, limit ${this.site.moonDistance_deg} deg)`;
  }

  private whyTooShort(from: number, until: number, now: number, wall_s: number): string {
    const left = Math.round((until - Math.max(from, now)) / 60_000);
    return `needs ${Math.round(wall_s / 60)} min, only ${left} min before ${clock(until)} UT`;
  }
}

const NEVER = { upFrom_ms: Number.NaN, upUntil_ms: Number.NaN, startBy_ms: Number.NaN } as const;

function altitudeIn(zenith: Direction, direction: Direction): number {
  const sine = zenith[0] * direction[0] + zenith[1] * direction[1] + zenith[2] * direction[2];
  return Math.asin(Math.max(-1, Math.min(1, sine))) / RADIAN;
}

function separation_deg(a: Direction, b: Direction): number {
  const cross = Math.hypot(a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0]);
  return Math.atan2(cross, a[0] * b[0] + a[1] * b[1] + a[2] * b[2]) / RADIAN;
}
