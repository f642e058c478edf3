import { describe, expect, it } from 'vitest';
import {
  combinedChance,
  gammaQ,
  incompleteBeta,
  logGamma,
  median,
  quantile,
} from '../../src/science/statistics.js';
import { testConstancy, testConstancyWithoutWorst } from '../../src/science/variability/chi-square.js';

describe('statistics at their edges', () => {
  it('of nothing are not known', () => {
    expect(median([])).toBeNaN();
  });

  it('of equal values are the value and no spread', () => {
    expect(quantile([5, 5, 5], 0.3)).toBe(5);
    expect(testConstancy({ mag: [5, 5], sigma_mag: [0.1, 0.2] }).chi2).toBe(0);
  });

  it('do not change what they are given', () => {
    const values = [3, 1, 2];
    expect(median(values)).toBe(2);
    expect(values).toEqual([3, 1, 2]);
  });

  it('of one reading say nothing of constancy', () => {
    const test = testConstancy({ mag: [12], sigma_mag: [0.01] });
    expect(test.mean_mag).toBe(12);
    expect(test.reducedChi2).toBeNaN();
    expect(test.chance).toBeNaN();
  });

  it('without the worst reading forget one bad frame', () => {
    const series = { mag: [12, 12.01, 11.99, 13, 12], sigma_mag: [0.01, 0.01, 0.01, 0.01, 0.01] };
    expect(testConstancy(series).chance).toBeLessThan(1e-100);
    expect(testConstancyWithoutWorst(series).chance).toBeGreaterThan(0.5);
  });
});

describe('gamma functions', () => {
  // Exact: factorials, and Q(1, x) = exp(-x), Q(2, x) = (1 + x) exp(-x).
  it('meet factorials', () => {
    expect(logGamma(11)).toBeCloseTo(Math.log(3_628_800), 12);
    expect(logGamma(0.5)).toBeCloseTo(Math.log(Math.PI) / 2, 12);
  });

  it.each([0.1, 1, 2.9, 3.1, 20, 300])('meet the exponential at %s', x => {
    expect(gammaQ(1, x) / Math.exp(-x)).toBeCloseTo(1, 11);
    expect(gammaQ(2, x) / ((1 + x) * Math.exp(-x))).toBeCloseTo(1, 11);
  });

  it('are certain of nothing seen, and not known for nonsense', () => {
    expect(gammaQ(3, 0)).toBe(1);
    expect(gammaQ(3, -1)).toBeNaN();
    expect(gammaQ(0, 1)).toBeNaN();
  });
});

describe('the incomplete beta function', () => {
  // Closed forms: I_x(1, b) = 1 - (1-x)^b, I_x(a, 1) = x^a, and the symmetry at one half.
  it.each([0.01, 0.3, 0.5, 0.9])('meets its closed forms at %s', x => {
    expect(incompleteBeta(x, 1, 3)).toBeCloseTo(1 - (1 - x) ** 3, 12);
    expect(incompleteBeta(x, 4.5, 1)).toBeCloseTo(x ** 4.5, 12);
    expect(incompleteBeta(x, 7, 7) + incompleteBeta(1 - x, 7, 7)).toBeCloseTo(1, 12);
  });
  it('ends at 0 and 1', () => {
    expect([0, 1].map(x => incompleteBeta(x, 2, 3))).toEqual([0, 1]);
    expect(incompleteBeta(1.1, 2, 3)).toBeNaN();
  });
});

describe('one chance from several', () => {
  it('of one is itself, of two t (1 - ln t) with t their product (Fisher 1925)', () => {
    expect(combinedChance([0.03])).toBeCloseTo(0.03, 12);
    expect(combinedChance([0.03, 0.2])).toBeCloseTo(0.006 * (1 - Math.log(0.006)), 12);
    expect(combinedChance([0, 0.5])).toBeGreaterThan(0);
  });
});
