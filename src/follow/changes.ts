import type { Band } from '../science/bands.js';
import type { BandChange } from './flags/evidence.js';

/** Readings of one star in one band, in order of time, on a common zero point. */
export interface TimeSeries {
  readonly band: Band;
  readonly time_ms: ArrayLike<number>;
  readonly mag: ArrayLike<number>;
  readonly sigma_mag: ArrayLike<number>;
}

/** Fewer readings than this say nothing about a change. */
export const LEAST_READINGS = 5;

/**
 * Describes how a star behaved in one band: chi-square about the weighted mean, and last third against first
 * third. `errorScale` multiplies the errors, so that the field's ordinary stars have a reduced chi-square of 1;
 * `scatterChance` gives the probability of a chi-square by chance. Undefined with too few readings.
 */
export function describeChange(
  series: TimeSeries,
  errorScale: number,
  scatterChance: (chi2: number, degreesOfFreedom: number) => number,
): BandChange | undefined {
  const n = series.mag.length;
  if (n < LEAST_READINGS) return undefined;
  const all = weightedMean(series, 0, n, errorScale);
  const third = Math.max(2, Math.floor(n / 3));
  const early = weightedMean(series, 0, third, errorScale);
  const late = weightedMean(series, n - third, n, errorScale);
  return {
    band: series.band,
    readings: n,
    scatterChance: scatterChance(steadyChi2(series, errorScale), n - 2),
    reducedChi2: all.chi2 / (n - 1),
    range_mag: all.largest - all.smallest,
    change_mag: late.mean - early.mean,
    // Scatter within the thirds counts as well: a flickering star has not drifted.
    changeSigma_mag: Math.hypot(inflated(early), inflated(late)),
    from_ms: series.time_ms[0],
    to_ms: series.time_ms[n - 1],
  };
}

interface Mean {
  readonly mean: number;
  readonly sigma: number;
  readonly chi2: number;
  readonly count: number;
  readonly smallest: number;
  readonly largest: number;
}

function inflated(mean: Mean): number {
  return mean.sigma * Math.sqrt(Math.max(1, mean.chi2 / Math.max(1, mean.count - 1)));
}

function weightedMean(series: TimeSeries, from: number, to: number, errorScale: number, skip = -1): Mean {
  let weight = 0;
  let sum = 0;
  let sum2 = 0;
  let smallest = Number.POSITIVE_INFINITY;
  let largest = Number.NEGATIVE_INFINITY;
  for (let i = from; i < to; i++) {
    if (i === skip) continue;
    const m = series.mag[i];
    const w = 1 / (series.sigma_mag[i] * errorScale) ** 2;
    // Differences from the first value keep the sums free of cancellation.
    const d = m - series.mag[from];
    weight += w;
    sum += w * d;
    sum2 += w * d * d;
    smallest = Math.min(smallest, m);
    largest = Math.max(largest, m);
  }
  return {
    mean: series.mag[from] + sum / weight,
    sigma: 1 / Math.sqrt(weight),
    chi2: Math.max(0, sum2 - (sum * sum) / weight),
    count: to - from - (skip >= from && skip < to ? 1 : 0),
    smallest,
    largest,
  };
}

/** Chi-square without the most deviant reading: one bad frame never makes a variable. */
function steadyChi2(series: TimeSeries, errorScale: number): number {
  const n = series.mag.length;
  const { mean } = weightedMean(series, 0, n, errorScale);
  let worst = 0;
  const deviation = (i: number) => Math.abs(series.mag[i] - mean) / series.sigma_mag[i];
  for (let i = 1; i < n; i++) if (deviation(i) > deviation(worst)) worst = i;
  return weightedMean(series, 0, n, errorScale, worst).chi2;
}
