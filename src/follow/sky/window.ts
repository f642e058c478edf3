import { airmass, altitudeOfAirmass_deg } from '../../science/sky/airmass.js';
import type { Site } from '../settings.js';
import { type Direction, directionOf, type Ephemeris } from './ephemeris.js';
import { clock, type Night } from './night-of.js';
import type { SkyGeometry } from './sky-light.js';
import { type Span, TimeGrid } from './time-grid.js';

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
  readonly spans: readonly Span[];
  readonly whyNever: () => string;
}

/** What is the same for all stars at one time. */
interface Moment {
  readonly time_ms: number;
  readonly zenith: Direction;
  readonly moon: Direction;
  readonly moonAltitude_deg: number;
  readonly phaseAngle_deg: number;
  readonly sunAltitude_deg: number;
}

/** One star on the night's grid: smooth values, so that the parabolas between the points hold. */
interface Path {
  readonly sinAltitude: readonly number[];
  readonly cosMoonDistance: readonly number[];
}

/**
 * The sky of one night on a grid of five minutes, made once and used for every star: quadratic interpolation
 * in it is good to an arcsecond, far below what a window needs.
 */
export class NightSky {
  private readonly grid: TimeGrid;
  private readonly moments: readonly Moment[];
  private readonly moonAltitude_deg: readonly number[];
  private readonly limit_deg: number;
  private readonly sinLimit: number;
  private readonly cosMoonLimit: number;
  /** The Earth's motion turns by a degree a day: one aberration serves the night. */
  private readonly toApparent: (direction: Direction) => Direction;
  private kept: Moment | undefined;
  private zenithKept: { readonly time_ms: number; readonly row: Direction } | undefined;

  constructor(
    private readonly ephemeris: Ephemeris,
    private readonly site: Site,
    readonly night: Night,
  ) {
    this.grid = new TimeGrid(night.dark.dusk_ms, night.dark.dawn_ms, STEP_MS);
    this.moments = Array.from(this.grid.times, time => this.momentAt(time));
    this.moonAltitude_deg = this.moments.map(moment => moment.moonAltitude_deg);
    this.toApparent = ephemeris.aberrationAt((night.noon_ms + night.nextNoon_ms) / 2);
    this.limit_deg = Math.max(site.minAltitude_deg, altitudeOfAirmass_deg(site.maxAirmass));
    this.sinLimit = Math.sin(this.limit_deg * RADIAN);
    this.cosMoonLimit = Math.cos(site.moonDistance_deg * RADIAN);
  }

  /** How a star stands tonight, whatever is done with it. */
  follow(ra_deg: number, dec_deg: number, now_ms: number): StarTonight {
    const direction = this.toApparent(directionOf(ra_deg, dec_deg));
    const altitudeNow_deg = altitudeIn(this.zenithAt(now_ms), direction);
    const path: Path = {
      sinAltitude: this.moments.map(({ zenith }) => dot(zenith, direction)),
      cosMoonDistance: this.moments.map(({ moon }) => dot(moon, direction)),
    };
    const spans = this.grid.spans(time => this.isHigh(path, time) && !this.isMoonNear(path, time));
    return {
      now_ms,
      altitudeNow_deg,
      airmassNow: airmass(altitudeNow_deg),
      spans: spans.filter(([, until]) => until > now_ms),
      whyNever: () => this.whyNever(path, now_ms),
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
      phaseAngle_deg: moment.phaseAngle_deg,
      sunAltitude_deg: moment.sunAltitude_deg,
      moonZenithDistance_deg: 90 - moment.moonAltitude_deg,
      separation_deg: separation_deg(moment.moon, direction),
      targetZenithDistance_deg: 90 - altitudeIn(moment.zenith, direction),
    };
  }

  /** What is the same for all stars at one time: from the grid where it reaches, else worked out and kept. */
  private momentOf(time_ms: number): Moment {
    if (this.grid.covers(time_ms)) return this.moments[this.grid.nearest(time_ms)];
    if (this.kept?.time_ms !== time_ms) this.kept = this.momentAt(time_ms);
    return this.kept;
  }

  private momentAt(time_ms: number): Moment {
    const { ephemeris } = this;
    return {
      time_ms,
      zenith: ephemeris.zenithRow(time_ms),
      moon: ephemeris.moonDirection(time_ms),
      moonAltitude_deg: ephemeris.moonAltitude_deg(time_ms),
      phaseAngle_deg: ephemeris.moonPhaseAngle_deg(time_ms),
      sunAltitude_deg: ephemeris.sunAltitude_deg(time_ms),
    };
  }

  /** Rotation to the zenith at one time, kept for the stars that are looked at together. */
  private zenithAt(time_ms: number): Direction {
    if (this.zenithKept?.time_ms !== time_ms) {
      this.zenithKept = { time_ms, row: this.ephemeris.zenithRow(time_ms) };
    }
    return this.zenithKept.row;
  }

  private isHigh(path: Path, time_ms: number): boolean {
    return this.grid.at(path.sinAltitude, time_ms) >= this.sinLimit;
  }

  private isMoonNear(path: Path, time_ms: number): boolean {
    return (
      this.grid.at(path.cosMoonDistance, time_ms) > this.cosMoonLimit &&
      this.grid.at(this.moonAltitude_deg, time_ms) > 0
    );
  }

  private whyNever(path: Path, now_ms: number): string {
    const { grid, site } = this;
    const limit = this.limit_deg.toFixed(0);
    if (grid.times.length === 0) return 'no dark time tonight: the Sun stays too high';
    if (now_ms >= grid.until_ms) {
      return `the night is over (Sun above ${site.sunLimit_deg} deg since ${clock(grid.until_ms)} UT)`;
    }
    const lastHigh = grid.spans(time => this.isHigh(path, time)).at(-1);
    if (lastHigh === undefined) {
      const highest_deg = Math.asin(Math.max(...path.sinAltitude)) / RADIAN;
      return `never above ${limit} deg in the dark (highest ${Math.floor(highest_deg)} deg)`;
    }
    if (lastHigh[1] <= now_ms) return `below ${limit} deg since ${clock(lastHigh[1])} UT`;
    const nearest = Math.max(...path.cosMoonDistance);
    const distance_deg = Math.acos(Math.min(1, nearest)) / RADIAN;
    return `the Moon is too near (${distance_deg.toFixed(0)} deg, limit ${site.moonDistance_deg} deg)`;
  }

  private whyTooShort(from: number, until: number, now: number, wall_s: number): string {
    const left = Math.round((until - Math.max(from, now)) / 60_000);
    return `needs ${Math.round(wall_s / 60)} min, only ${left} min before ${clock(until)} UT`;
  }
}

const NEVER = { upFrom_ms: Number.NaN, upUntil_ms: Number.NaN, startBy_ms: Number.NaN } as const;

function dot(a: Direction, b: Direction): number {
  return a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
}

function altitudeIn(zenith: Direction, direction: Direction): number {
  return Math.asin(Math.max(-1, Math.min(1, dot(zenith, direction)))) / RADIAN;
}

function separation_deg(a: Direction, b: Direction): number {
  const cross = Math.hypot(a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0]);
  return Math.atan2(cross, dot(a, b)) / RADIAN;
}
