import type { Band } from '../science/bands.js';
import { testConstancy, testConstancyWithoutWorst } from '../science/variability/chi-square.js';
import type { BandChange } from './flags/evidence.js';

/** Readings of one star in one band, in order of time, on a common zero point. */
export interface TimeSeries {
  readonly band: Band;
  readonly time_ms: Float64Array;
  readonly mag: Float64Array;
  readonly sigma_mag: Float64Array;
}

/** Fewer readings than this say nothing about a change. */
export const LEAST_READINGS = 5;

/**
 * Describes how a star behaved in one band: scatter about the mean without the worst reading, and last third
 * against first third. `errorScale` multiplies the errors, so that the field's ordinary stars have a reduced
 * chi-square of 1. Undefined with too few readings.
 */
export function describeChange(series: TimeSeries, errorScale: number): BandChange | undefined {
  const n = series.mag.length;
  if (n < LEAST_READINGS) return undefined;
  const scaled = { mag: series.mag, sigma_mag: series.sigma_mag.map(sigma => sigma * errorScale) };
  const steady = testConstancyWithoutWorst(scaled);
  const third = Math.max(2, Math.floor(n / 3));
  const early = testConstancy(part(scaled, 0, third));
  const late = testConstancy(part(scaled, n - third, n));
  return {
    band: series.band,
    readings: n,
    scatterChance: steady.chance,
    reducedChi2: testConstancy(scaled).reducedChi2,
    range_mag: series.mag.reduce((a, b) => Math.max(a, b)) - series.mag.reduce((a, b) => Math.min(a, b)),
    change_mag: late.mean_mag - early.mean_mag,
    // Scatter within the thirds counts as well: a flickering star has not drifted.
    changeSigma_mag: Math.hypot(inflated(early), inflated(late)),
    from_ms: series.time_ms[0],
    to_ms: series.time_ms[n - 1],
  };
}

function part(series: { mag: Float64Array; sigma_mag: Float64Array }, from: number, to: number) {
  return { mag: series.mag.subarray(from, to), sigma_mag: series.sigma_mag.subarray(from, to) };
}

function inflated(test: { meanSigma_mag: number; reducedChi2: number }): number {
  return test.meanSigma_mag * Math.sqrt(Math.max(1, test.reducedChi2));
}
