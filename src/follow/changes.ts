import type { Band } from '../science/bands.js';
import { interquartileRange } from '../science/statistics.js';
import { testConstancy, testConstancyWithoutWorst } from '../science/variability/chi-square.js';
import { pairedChance, relativeErrors, stetsonJ } from '../science/variability/stetson.js';
import { orderChance, vonNeumannRatio } from '../science/variability/von-neumann.js';
import type { BandChange, PairedChange } from './flags/evidence.js';

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
 * Describes how a star behaved in one band: scatter about the mean without the worst reading, order in time, and last
 * third against first third. Undefined with too few readings.
 */
export function describeChange(series: TimeSeries): BandChange | undefined {
  const n = series.mag.length;
  if (n < LEAST_READINGS) return undefined;
  const third = Math.max(2, Math.floor(n / 3));
  const early = testConstancy(part(series, 0, third));
  const late = testConstancy(part(series, n - third, n));
  return {
    band: series.band,
    readings: n,
    scatterChance: testConstancyWithoutWorst(series).chance,
    orderChance: orderChance(vonNeumannRatio(series.mag), n),
    reducedChi2: testConstancy(series).reducedChi2,
    range_mag: series.mag.reduce((a, b) => Math.max(a, b)) - series.mag.reduce((a, b) => Math.min(a, b)),
    interquartileRange_mag: interquartileRange(series.mag),
    change_mag: late.mean_mag - early.mean_mag,
    // Scatter within the thirds counts as well: a flickering star has not drifted.
    changeSigma_mag: Math.hypot(inflated(early), inflated(late)),
    from_ms: series.time_ms[0],
    to_ms: series.time_ms[n - 1],
  };
}

/** Readings of two bands closer in time than this were taken together. */
const PAIR_MS = 30 * 60_000;

/** Whether two bands changed together, from readings taken within half an hour of each other; undefined with few. */
export function describePairs(first: TimeSeries, second: TimeSeries): PairedChange | undefined {
  const a = relativeErrors(first);
  const b = relativeErrors(second);
  const firstOfPairs: number[] = [];
  const secondOfPairs: number[] = [];
  let j = 0;
  for (let i = 0; i < a.length && j < b.length; i++) {
    // The next reading of the other band, unless the one after it is nearer.
    while (j + 1 < b.length && apart(first, i, second, j + 1) < apart(first, i, second, j)) j++;
    if (apart(first, i, second, j) > PAIR_MS) continue;
    firstOfPairs.push(a[i]);
    secondOfPairs.push(b[j]);
    j++;
  }
  const pairs = firstOfPairs.length;
  if (pairs < LEAST_READINGS) return undefined;
  const stetsonIndex = stetsonJ(firstOfPairs, secondOfPairs);
  return {
    bands: [first.band, second.band],
    pairs,
    stetsonJ: stetsonIndex,
    chance: pairedChance(stetsonIndex, pairs),
  };
}

function apart(first: TimeSeries, i: number, second: TimeSeries, j: number): number {
  return Math.abs(first.time_ms[i] - second.time_ms[j]);
}

function part(series: TimeSeries, from: number, to: number) {
  return { mag: series.mag.subarray(from, to), sigma_mag: series.sigma_mag.subarray(from, to) };
}

function inflated(test: { meanSigma_mag: number; reducedChi2: number }): number {
  return test.meanSigma_mag * Math.sqrt(Math.max(1, test.reducedChi2));
}
