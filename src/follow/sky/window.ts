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
  readonly now_ms: number;
  readonly zenith: Direction;
  readonly toApparent: (direction: Direction) => Direction;
  /** Moon and Sun, worked out when first needed. */
  lights?: {
    readonly moon: Direction;
    readonly moonZenithDistance_deg: number;
    readonly phaseAngle_deg: number;
    readonly sunAltitude_deg: number;
  };
}

/**
 * The sky of one night on a grid of five minutes, made once and used for every star: quadratic interpolation
 * in it is good to an arcsecond, far below what a window needs.
 */
export class NightSky {
  private readonly times: Float64Array;
  private readonly zenith: readonly Direction[];
  private readonly moon: readonly Direction[];
  private readonly moonUp: readonly boolean[];
  private readonly limit_deg: number;
  private moment: Moment | undefined;

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
    this.moonUp = Array.from(this.times, time => ephemeris.moonAltitude_deg(time) > 0);
    this.limit_deg = Math.max(site.minAltitude_deg, altitudeOfAirmass_deg(site.maxAirmass));
  }

  /** How a star stands tonight, whatever is done with it. */
  follow(ra_deg: number, dec_deg: number, now_ms: number): StarTonight {
    const moment = this.momentOf(now_ms);
    const direction = moment.toApparent(directionOf(ra_deg, dec_deg));
    const altitudeNow_deg = altitudeIn(moment.zenith, direction);
    const altitudes = this.zenith.map(row => altitudeIn(row, direction) - this.limit_deg);
    const clear = this.moon.map((moon, i) =>
      this.moonUp[i] ? separation_deg(moon, direction) - this.site.moonDistance_deg : 1,
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

  /** Where a target, the Moon and the Sun stand at a time. */
  geometryAt(ra_deg: number, dec_deg: number, time_ms: number): SkyGeometry {
    const moment = this.momentOf(time_ms);
    moment.lights ??= {
      moon: this.ephemeris.moonDirection(time_ms),
      moonZenithDistance_deg: 90 - this.ephemeris.moonAltitude_deg(time_ms),
      phaseAngle_deg: this.ephemeris.moonPhaseAngle_deg(time_ms),
      sunAltitude_deg: this.ephemeris.sunAltitude_deg(time_ms),
    };
    const direction = moment.toApparent(directionOf(ra_deg, dec_deg));
    const { moon, ...lights } = moment.lights;
    return {
      ...lights,
      separation_deg: separation_deg(moon, direction),
      targetZenithDistance_deg: 90 - altitudeIn(moment.zenith, direction),
    };
  }

  /** What is the same for all stars at one time, kept until the time changes. */
  private momentOf(now_ms: number): Moment {
    if (this.moment?.now_ms !== now_ms) {
      this.moment = {
        now_ms,
        zenith: this.ephemeris.zenithRow(now_ms),
        toApparent: this.ephemeris.aberrationAt(now_ms),
      };
    }
    return this.moment;
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
