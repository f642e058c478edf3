import { chiSquareChance } from '../statistics.js';
import type { Series } from './series.js';

export interface ConstancyTest {
  readonly mean_mag: number;
  readonly meanSigma_mag: number;
  readonly chi2: number;
  readonly degreesOfFreedom: number;
  /** NaN with fewer than two readings. */
  readonly reducedChi2: number;
  /** Probability of so large a chi-square of a constant star with Gaussian errors; NaN likewise. */
  readonly chance: number;
}

/**
 * Chi-square of the readings about their weighted mean (standard statistics). `skip` leaves one reading out.
 * Real errors are never Gaussian: scale them so that the field's median reduced chi-square is 1 first.
 */
export function testConstancy({ mag, sigma_mag }: Series, skip = -1): ConstancyTest {
  let weights = 0;
  let weighted = 0;
  let count = 0;
  for (let i = 0; i < mag.length; i++) {
    if (i === skip) continue;
    const weight = 1 / sigma_mag[i] ** 2;
    weights += weight;
    weighted += weight * mag[i];
    count++;
  }
  const mean_mag = weighted / weights;
  let chi2 = 0;
  for (let i = 0; i < mag.length; i++) {
    if (i !== skip) chi2 += ((mag[i] - mean_mag) / sigma_mag[i]) ** 2;
  }
  const degreesOfFreedom = count - 1;
  return {
    mean_mag,
    meanSigma_mag: 1 / Math.sqrt(weights),
    chi2,
    degreesOfFreedom,
    reducedChi2: degreesOfFreedom > 0 ? chi2 / degreesOfFreedom : Number.NaN,
    chance: degreesOfFreedom > 0 ? chiSquareChance(chi2, degreesOfFreedom) : Number.NaN,
  };
}

/** The same test without the reading that deviates most: what one bad frame caused is gone then. */
export function testConstancyWithoutWorst(series: Series): ConstancyTest {
  const { mean_mag } = testConstancy(series);
  const deviation = (i: number) => Math.abs(series.mag[i] - mean_mag) / series.sigma_mag[i];
  let worst = 0;
  for (let i = 1; i < series.mag.length; i++) if (deviation(i) > deviation(worst)) worst = i;
  return testConstancy(series, worst);
}
