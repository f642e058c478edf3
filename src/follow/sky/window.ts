import { airmass } from '../../science/sky/airmass.js';
import { parallacticAngle_deg } from '../../science/sky/parallactic-angle.js';
import type { Site } from '../settings.js';
import {
  altitudeIn_deg,
  azimuthOf_deg,
  type Direction,
  directionOf,
  dot,
  type HorizonAxes,
  separation_deg,
} from './direction.js';
import type { Ephemeris } from './ephemeris.js';
import type { Night } from './night-of.js';
import type { SkyGeometry } from './sky-light.js';
import { limitsOf } from './sky-limits.js';
import { type NightFrame, StarPath } from './star-path.js';
import { type Span, TimeGrid } from './time-grid.js';
import { whyEnds, whyNever, whyTooShort } from './window-words.js';

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
  /** Why there is no stretch any more. */
  readonly whyNever: () => string;
  /** Why one ends, to go before 'at 02:14 UT': 'sets below airmass 2.0'. */
  readonly whyEnds: (until_ms: number) => string;
}

/** What is the same for all stars at one time. */
interface Moment {
  readonly time_ms: number;
  readonly axes: HorizonAxes;
  readonly moon: Direction;
  readonly moonAltitude_deg: number;
  readonly phaseAngle_deg: number;
  readonly sunAltitude_deg: number;
}

/** The sky of one night on a grid of five minutes, made once and used for every star. */
export class NightSky {
  private readonly frame: NightFrame;
  private readonly moments: readonly Moment[];
  /** The Earth's motion turns by a degree a day: one aberration serves the night. */
  private readonly toApparent: (direction: Direction) => Direction;
  private kept: Moment | undefined;
  private axesKept: { readonly time_ms: number; readonly axes: HorizonAxes } | undefined;

  constructor(
    private readonly ephemeris: Ephemeris,
    private readonly site: Site,
    readonly night: Night,
  ) {
    const grid = new TimeGrid(night.dark.dusk_ms, night.dark.dawn_ms, STEP_MS);
    this.moments = Array.from(grid.times, time => this.momentAt(time));
    const moonAltitude_deg = this.moments.map(moment => moment.moonAltitude_deg);
    this.frame = {
      grid,
      axes: this.moments.map(moment => moment.axes),
      moon: this.moments.map(moment => moment.moon),
      moonAltitude_deg,
      moonTurns: grid.crossings(moonAltitude_deg, 0),
      limits: limitsOf(site),
    };
    this.toApparent = ephemeris.aberrationAt((night.noon_ms + night.nextNoon_ms) / 2);
  }

  /** How a star stands tonight, whatever is done with it. */
  follow(ra_deg: number, dec_deg: number, now_ms: number): StarTonight {
    const direction = this.toApparent(directionOf(ra_deg, dec_deg));
    const altitudeNow_deg = altitudeIn_deg(this.axesAt(now_ms).up, direction);
    const path = new StarPath(this.frame, direction);
    return {
      now_ms,
      altitudeNow_deg,
      airmassNow: airmass(altitudeNow_deg),
      spans: path.openSpans().filter(([, until]) => until > now_ms),
      whyNever: () => whyNever(path, this.frame, this.site.sunLimit_deg, now_ms),
      whyEnds: until_ms => whyEnds(path, this.frame, until_ms),
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
      blockedBy: fits ? '' : whyTooShort(upFrom_ms, upUntil_ms, now_ms, wall_s),
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
      targetZenithDistance_deg: 90 - altitudeIn_deg(moment.axes.up, direction),
    };
  }

  /** Position angle of the zenith at a target, degrees, at the nearest point of the grid as in `geometryAt`. */
  parallacticAngle_deg(ra_deg: number, dec_deg: number, time_ms: number): number {
    const { axes } = this.momentOf(time_ms);
    const direction = this.toApparent(directionOf(ra_deg, dec_deg));
    const azimuth_deg = azimuthOf_deg(dot(axes.north, direction), dot(axes.west, direction));
    return parallacticAngle_deg(this.site.latitude_deg, altitudeIn_deg(axes.up, direction), azimuth_deg);
  }

  /** What is the same for all stars at one time: from the grid where it reaches, else worked out and kept. */
  private momentOf(time_ms: number): Moment {
    if (this.frame.grid.covers(time_ms)) return this.moments[this.frame.grid.nearest(time_ms)];
    if (this.kept?.time_ms !== time_ms) this.kept = this.momentAt(time_ms);
    return this.kept;
  }

  private momentAt(time_ms: number): Moment {
    const { ephemeris } = this;
    return {
      time_ms,
      axes: ephemeris.horizonAxes(time_ms),
      moon: ephemeris.moonDirection(time_ms),
      moonAltitude_deg: ephemeris.moonAltitude_deg(time_ms),
      phaseAngle_deg: ephemeris.moonPhaseAngle_deg(time_ms),
      sunAltitude_deg: ephemeris.sunAltitude_deg(time_ms),
    };
  }

  /** The horizon at one time, kept for the stars that are looked at together. */
  private axesAt(time_ms: number): HorizonAxes {
    if (this.axesKept?.time_ms !== time_ms) {
      this.axesKept = { time_ms, axes: this.ephemeris.horizonAxes(time_ms) };
    }
    return this.axesKept.axes;
  }
}

const NEVER = { upFrom_ms: Number.NaN, upUntil_ms: Number.NaN, startBy_ms: Number.NaN } as const;
