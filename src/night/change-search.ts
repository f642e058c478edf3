import type { StarCatalogue } from '../catalogue/stars.js';
import { describeChange, describePairs, LEAST_READINGS, type TimeSeries } from '../follow/changes.js';
import type { StarChanges } from '../follow/flags/index.js';
import type { Band } from '../science/bands.js';
import { median } from '../science/statistics.js';
import { testConstancy } from '../science/variability/chi-square.js';
import { type FrameOffset, frameOffsets } from './frame-offsets.js';

/** A star is described only when one of its tests is at least this improbable. */
const WORTH_A_LOOK = 0.01;

const NO_CHANGES: StarChanges = { bands: [], paired: undefined };

/** Which stars changed during the night, searched anew among those that a frame touched. */
export class ChangeSearch {
  /** Stars among which a chance variation is looked for: all with enough readings. */
  starsSearched = 0;
  private readonly found = new Map<number, StarChanges>();

  of(star: number): StarChanges {
    return this.found.get(star) ?? NO_CHANGES;
  }

  /**
   * Looks at the touched stars band by band: their readings are freed of what each frame lost, their errors scaled so
   * that the field's median reduced chi-square is 1 (upward only: real errors are never quite right).
   */
  search(catalogue: StarCatalogue, touched: Uint32Array): void {
    const bands = catalogue.bands.map(band => new BandReadings(catalogue, band, touched));
    this.starsSearched = Math.max(0, ...bands.map(band => band.starsSearched));
    for (const star of touched) {
      const series = bands.map(band => band.of(star)).filter(candidate => candidate !== undefined);
      const changes = changesOf(series);
      if (changes === undefined) this.found.delete(star);
      else this.found.set(star, changes);
    }
  }
}

function changesOf(series: readonly TimeSeries[]): StarChanges | undefined {
  const bands = series.map(describeChange).filter(change => change !== undefined);
  const paired = closestPairs(series);
  const chances = [...bands.flatMap(band => [band.scatterChance, band.orderChance]), paired?.chance ?? 1];
  return chances.some(chance => chance < WORTH_A_LOOK) ? { bands, paired } : undefined;
}

/** The two bands with the most readings. */
function closestPairs(series: readonly TimeSeries[]) {
  const [first, second] = [...series].sort((a, b) => b.mag.length - a.mag.length);
  return second === undefined ? undefined : describePairs(first, second);
}

/** Clean readings of one band on a common zero point, with errors that fit the field. */
class BandReadings {
  readonly starsSearched: number;
  private readonly offsets: ReadonlyMap<number, FrameOffset>;
  private readonly series = new Map<number, TimeSeries>();

  constructor(
    private readonly catalogue: StarCatalogue,
    private readonly band: Band,
    touched: Uint32Array,
  ) {
    const counts = catalogue.readingsIn(band);
    this.starsSearched = counts.filter(count => count >= LEAST_READINGS).length;
    this.offsets = this.starsSearched === 0 ? new Map() : frameOffsets(catalogue, band);
    const enough = touched.filter(star => counts[star] >= LEAST_READINGS);
    for (const star of enough) {
      const series = this.read(star);
      if (series.mag.length >= LEAST_READINGS) this.series.set(star, series);
    }
    this.scaleErrors();
  }

  of(star: number): TimeSeries | undefined {
    return this.series.get(star);
  }

  private read(star: number): TimeSeries {
    const curve = this.catalogue.lightCurve(star, this.band);
    const clean = [...curve.mag.keys()].filter(i => curve.suspect[i] === 0);
    const offsetOf = (i: number) => this.offsets.get(curve.frame[i]);
    return {
      band: this.band,
      time_ms: Float64Array.from(clean, i => curve.time_ms[i]),
      mag: Float64Array.from(clean, i => curve.mag[i] - (offsetOf(i)?.offset_mag ?? 0)),
      sigma_mag: Float64Array.from(clean, i => Math.hypot(curve.sigma_mag[i], offsetOf(i)?.sigma_mag ?? 0)),
    };
  }

  private scaleErrors(): void {
    if (this.series.size === 0) return;
    const typical = median([...this.series.values()].map(series => testConstancy(series).reducedChi2));
    if (!(typical > 1)) return;
    const scale = Math.sqrt(typical);
    for (const { sigma_mag } of this.series.values()) {
      for (let i = 0; i < sigma_mag.length; i++) sigma_mag[i] *= scale;
    }
  }
}
