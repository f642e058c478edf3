import { mean } from '../statistics.js';

/**
 * Mean square successive difference over the variance (von Neumann 1941, Ann. Math. Stat. 12, 367), in order
 * of time: 2 for independent readings, small for slow changes. NaN with fewer than two readings or no scatter.
 */
export function vonNeumannRatio(mag: ArrayLike<number>): number {
  const centre = mean(mag);
  let differences = 0;
  let scatter = 0;
  for (let i = 0; i < mag.length; i++) {
    if (i > 0) differences += (mag[i] - mag[i - 1]) ** 2;
    scatter += (mag[i] - centre) ** 2;
  }
  return differences / scatter;
}

/** Expectation and variance of the ratio for n independent Gaussian readings (same source). */
export function vonNeumannMoments(n: number): { readonly expectation: number; readonly variance: number } {
  return { expectation: 2, variance: (4 * (n - 2)) / (n * n - 1) };
}
