import { describe, expect, it } from 'vitest';
import { gammaQ, logGamma, median, quantile, sigmaFromMad } from '../../src/science/statistics.js';
import { testConstancy, testConstancyWithoutWorst } from '../../src/science/variability/chi-square.js';
import { zeroPointShift } from '../../src/science/variability/zero-point-shift.js';

describe('statistics at their edges', () => {
  it('of nothing are not known', () => {
    expect(median([])).toBeNaN();
    expect(sigmaFromMad([])).toBeNaN();
  });

  it('of equal values are the value and no spread', () => {
    expect(quantile([5, 5, 5], 0.3)).toBe(5);
    expect(sigmaFromMad([5, 5, 5, 9])).toBe(0);
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

describe('zero point of a frame', () => {
  it('is refused for two stars, a median for seven, robust for many', () => {
    expect(zeroPointShift([0.1, 0.1], [0.01, 0.01])).toBeUndefined();
    const few = [0.1, 0.1, 0.1, 0.1, 0.1, 0.1, 0.9];
    expect(
      zeroPointShift(
        few,
        few.map(() => 0.01),
      )?.shift_mag,
    ).toBe(0.1);
    const many = Array.from({ length: 100 }, (_, i) => (i < 5 ? 2 : 0.1));
    const shift = zeroPointShift(
      many,
      many.map(() => 0.01),
    );
    expect(Math.abs((shift?.shift_mag ?? 0) - 0.1)).toBeLessThan(0.002);
  });
});
