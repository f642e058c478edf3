import { describe, expect, it } from 'vitest';
import { fallingExponential } from '../../src/science/falling-exponential.js';

describe('the tabulated exponential', () => {
  it('agrees with Math.exp to a relative 3e-9 over its whole range', () => {
    let worst = 0;
    for (let t = 0; t < 64; t += 0.000_937) {
      worst = Math.max(worst, Math.abs(fallingExponential(t) / Math.exp(-t) - 1));
    }
    expect(worst).toBeLessThan(3e-9);
  });

  it('starts at 1, ends at 0, and passes an unknown on', () => {
    expect(fallingExponential(0)).toBe(1);
    expect(fallingExponential(64)).toBe(0);
    expect(fallingExponential(1e300)).toBe(0);
    expect(fallingExponential(Number.NaN)).toBeNaN();
  });
});
