import { gaussianUpperTail } from '../statistics.js';
import { testConstancy } from './chi-square.js';
import type { Series } from './series.js';

/** Relative errors sqrt(n/(n-1)) (m - mean)/sigma about the weighted mean (Stetson 1996, PASP 108, 851). */
export function relativeErrors(series: Series): Float64Array {
  const n = series.mag.length;
  const { mean_mag } = testConstancy(series);
  const bias = Math.sqrt(n / (n - 1));
  return Float64Array.from(series.mag, (m, i) => (bias * (m - mean_mag)) / series.sigma_mag[i]);
}

/**
 * J of readings taken together in two bands, from their relative errors, with equal weights (Stetson 1996): 0 for
 * noise, positive where both bands change together, whatever the bands.
 */
export function stetsonJ(first: ArrayLike<number>, second: ArrayLike<number>): number {
  let sum = 0;
  for (let i = 0; i < first.length; i++) {
    const product = first[i] * second[i];
    sum += Math.sign(product) * Math.sqrt(Math.abs(product));
  }
  return sum / first.length;
}

/**
 * Probability of so large a J of n pairs by chance. The root of a product of two Gaussians has the variance 2/pi; half
 * a pair is lost to the means (both ends checked against simulated one-per-mille points, 3 %).
 */
export function pairedChance(j: number, n: number): number {
  return gaussianUpperTail(j / Math.sqrt(2 / Math.PI / (n - 0.5)));
}
