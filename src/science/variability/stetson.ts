import { testConstancy } from './chi-square.js';
import type { Series } from './series.js';

/** Relative errors sqrt(n/(n-1)) (m - mean)/sigma about the weighted mean (Stetson 1996, PASP 108, 851). */
function relativeErrors(series: Series): Float64Array {
  const n = series.mag.length;
  const { mean_mag } = testConstancy(series);
  const bias = Math.sqrt(n / (n - 1));
  return Float64Array.from(series.mag, (m, i) => (bias * (m - mean_mag)) / series.sigma_mag[i]);
}

function signedRoot(product: number): number {
  return Math.sign(product) * Math.sqrt(Math.abs(product));
}

function meanSignedRoot(n: number, product: (i: number) => number): number {
  let sum = 0;
  for (let i = 0; i < n; i++) sum += signedRoot(product(i));
  return sum / n;
}

/** J of two bands read together, equal weights (Stetson 1996): 0 for noise, positive for common changes. */
export function stetsonJOfPairs(first: Series, second: Series): number {
  const a = relativeErrors(first);
  const b = relativeErrors(second);
  return meanSignedRoot(a.length, i => a[i] * b[i]);
}

/** J of single readings, equal weights (Stetson 1996). */
export function stetsonJOfSingles(series: Series): number {
  const a = relativeErrors(series);
  return meanSignedRoot(a.length, i => a[i] * a[i] - 1);
}

/** K (Stetson 1996): 0.798 Gaussian, 0.900 sinusoid, lower for a single outlier. */
export function stetsonK(series: Series): number {
  const deltas = relativeErrors(series);
  let absolute = 0;
  let squares = 0;
  for (const delta of deltas) {
    absolute += Math.abs(delta);
    squares += delta * delta;
  }
  return absolute / deltas.length / Math.sqrt(squares / deltas.length);
}

/** I of two bands read together (Welch & Stetson 1993, AJ 105, 1813). */
export function welchStetsonI(first: Series, second: Series): number {
  const n = first.mag.length;
  const b = testConstancy(first).mean_mag;
  const v = testConstancy(second).mean_mag;
  let sum = 0;
  for (let i = 0; i < n; i++) {
    sum += ((first.mag[i] - b) / first.sigma_mag[i]) * ((second.mag[i] - v) / second.sigma_mag[i]);
  }
  return Math.sqrt(1 / (n * (n - 1))) * sum;
}
