import { describe, expect, it } from 'vitest';
import { BV_AXES, GAIA_AXES, OPEN_FIELD } from '../../support/star-inputs.js';
import { calibrate, drawField } from '../../support/synthetic-field.js';

/** Rare classes are made common, in the draw and in the prior alike: only so can their odds be judged. */
const MIXED = {
  ...OPEN_FIELD,
  extinction_AV: 0.15,
  extinctionSigma_AV: 0.06,
  classScale: { IV: 3, III: 3, II: 300, Ib: 1000, Iab: 1000, Ia: 1000, WD: 300, sd: 20, sdOB: 3000 },
};

describe('among stars given 0.8, about 80 % are right', () => {
  it.each([
    ['B and V, good parallaxes', ['B', 'V'] as const, 'V' as const, BV_AXES, 0.04],
    ['B and V, weak parallaxes', ['B', 'V'] as const, 'V' as const, BV_AXES, 0.4],
    ['Gaia bands', ['G', 'BP', 'RP'] as const, 'G' as const, GAIA_AXES, 0.06],
  ])(
    '%s: the expected calibration error is at most 0.03',
    (_, bands, selectedBy, axes, parallaxSigma_mas) => {
      const plan = {
        stars: 6000,
        bands,
        selectedBy,
        brightest: 8,
        faintest: 15,
        sigma_mag: 0.015,
        parallaxSigma_mas,
        seed: 41,
      };
      const result = calibrate(drawField(plan, MIXED), MIXED, axes);
      expect(result.expectedError, JSON.stringify(result.bins)).toBeLessThanOrEqual(0.03);
      expect(result.accuracy).toBeGreaterThan(0.5);
    },
  );
});
