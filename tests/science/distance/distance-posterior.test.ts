import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { distancePosterior } from '../../../src/science/distance/distance-posterior.js';

const number = (min: number, max: number) => fc.double({ min, max, noNaN: true });
const runs = { numRuns: 100, seed: 41 };

describe('distance posterior', () => {
  it('any parallax, negative ones too, gives rising quantiles above zero', () => {
    fc.assert(
      fc.property(number(-5, 50), number(0.01, 5), number(100, 3000), (parallax, sigma, scale) => {
        const { quantile_pc, mode_pc } = distancePosterior(parallax, sigma, scale);
        const quantiles = [0.05, 0.16, 0.5, 0.84, 0.95].map(quantile_pc);
        expect(quantiles[0]).toBeGreaterThan(0);
        for (let i = 1; i < quantiles.length; i++) expect(quantiles[i]).toBeGreaterThan(quantiles[i - 1]);
        expect(mode_pc).toBeGreaterThan(0);
      }),
      runs,
    );
  });

  it('a good parallax decides alone, none at all leaves the prior: mode 2 L', () => {
    expect(distancePosterior(10, 0.01, 1350).quantile_pc(0.5)).toBeCloseTo(100, 1);
    expect(distancePosterior(10, 0.01, 1350).mode_pc).toBeCloseTo(100, 1);
    expect(distancePosterior(0, 1e4, 500).mode_pc / 1000).toBeCloseTo(1, 3);
  });

  it('agrees with a plain sum over distances, also where a short scale outweighs the parallax', () => {
    // parallax, sigma (mas), scale (pc): 3-sigma, useless, contradicting the scale by far, and negative.
    for (const [parallax, sigma, scale] of [
      [3, 1, 400],
      [0.1, 2, 1350],
      [0, 0.01, 100],
      [0.1, 0.01, 100],
      [-2, 0.6, 800],
    ]) {
      const step_pc = 0.25;
      const farthest = Math.max(40 * scale, 20_000);
      let total = 0;
      const sums: number[] = [];
      const logOf = (r: number) =>
        2 * Math.log(r) - r / scale - (parallax - 1000 / r) ** 2 / (2 * sigma * sigma);
      let largest = Number.NEGATIVE_INFINITY;
      for (let r = step_pc; r < farthest; r += step_pc) largest = Math.max(largest, logOf(r));
      for (let r = step_pc; r < farthest; r += step_pc) {
        total += Math.exp(logOf(r) - largest);
        sums.push(total);
      }
      const { quantile_pc } = distancePosterior(parallax, sigma, scale);
      for (const share of [0.05, 0.5, 0.95]) {
        const slow = (sums.findIndex(sum => sum >= share * total) + 0.5) * step_pc;
        expect(quantile_pc(share) / slow, `${parallax} ${sigma} ${scale} ${share}`).toBeCloseTo(1, 2);
      }
    }
  });
});
