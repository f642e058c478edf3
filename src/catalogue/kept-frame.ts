import type { Band } from '../science/bands.js';
import { ASTROMETRY, type AstrometryName } from './astrometry.js';
import type { BandColumn, FrameReadings } from './frame.js';
import type { ReadingIndex } from './reading-index.js';

/** What stays of a frame: identifiers and positions have done their work once its rows have their stars. */
export interface KeptFrame {
  readonly mid_ms: number;
  /** Star of each row. */
  readonly stars: Uint32Array;
  readonly suspect: Uint8Array;
  readonly bands: readonly BandColumn[];
  /** Only the columns in which something is given. */
  readonly astrometry: ReadonlyMap<AstrometryName, Float64Array>;
}

export function keepFrame(frame: FrameReadings, stars: Uint32Array): KeptFrame {
  const isGiven = (name: AstrometryName) => frame[name].some(value => !Number.isNaN(value));
  return {
    mid_ms: frame.facts.mid_ms,
    stars,
    suspect: frame.suspect,
    bands: frame.bands,
    astrometry: new Map(ASTROMETRY.filter(isGiven).map(name => [name, frame[name]])),
  };
}

/** Readings of one star in one band, in order of time. */
export interface StarLightCurve {
  readonly time_ms: Float64Array;
  readonly mag: Float64Array;
  readonly sigma_mag: Float64Array;
  /** Frame of each reading. */
  readonly frame: Uint32Array;
  /** 1 where the file itself doubts the reading. */
  readonly suspect: Uint8Array;
}

/** Readings of a star on the frames that have a time. */
export function lightCurveOf(
  frames: ReadonlyMap<number, KeptFrame>,
  index: ReadingIndex | undefined,
  star: number,
  band: Band,
): StarLightCurve {
  const points: { time_ms: number; mag: number; sigma_mag: number; frame: number; suspect: number }[] = [];
  index?.each(star, (frame, row) => {
    const kept = frames.get(frame);
    const column = kept?.bands.find(candidate => candidate.band === band);
    if (kept === undefined || column === undefined || Number.isNaN(kept.mid_ms)) return;
    const { mid_ms, suspect } = kept;
    points.push({
      time_ms: mid_ms,
      mag: column.mag[row],
      sigma_mag: column.sigma_mag[row],
      frame,
      suspect: suspect[row],
    });
  });
  points.sort((a, b) => a.time_ms - b.time_ms || a.frame - b.frame);
  return {
    time_ms: Float64Array.from(points, point => point.time_ms),
    mag: Float64Array.from(points, point => point.mag),
    sigma_mag: Float64Array.from(points, point => point.sigma_mag),
    frame: Uint32Array.from(points, point => point.frame),
    suspect: Uint8Array.from(points, point => point.suspect),
  };
}
