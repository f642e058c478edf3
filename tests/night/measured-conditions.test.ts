import { readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { describe, expect, it } from 'vitest';
import { MeasuredConditions } from '../../src/night/measured-conditions.js';
import { parseProfile } from '../../src/night/profile/parse.js';
import type { FrameSummary } from '../../src/night/view.js';
import { readPassbands } from '../../src/science/passbands.js';
import { ROOT } from '../support/built.js';

const { profile } = parseProfile(readFileSync(resolve(ROOT, 'profiles/demo.toml'), 'utf8'), 'demo.toml');
const START = Date.UTC(2026, 10, 8, 20);

const frame = (i: number, given: Partial<FrameSummary>): FrameSummary => ({
  index: i,
  name: `f${i}.csv`,
  mid_ms: START + i * 600_000,
  bands: ['V'],
  rows: 100,
  fwhm_arcsec: Number.NaN,
  airmass: Number.NaN,
  zeroPoint_mag: Number.NaN,
  sky_magPerArcsec2: Number.NaN,
  ...given,
});
const measured = (frames: readonly Partial<FrameSummary>[]) =>
  new MeasuredConditions(
    frames.map((given, i) => frame(i, given)),
    profile!,
    readPassbands(),
  );

describe('tonight as the frames show it', () => {
  it('without frames everything is the profile', () => {
    const none = measured([]);
    expect([none.seeing_arcsec(), none.isSeeingMeasured, none.cloud_mag()]).toEqual([1.5, false, 0]);
  });

  it('seeing is brought to the zenith and 500 nm, and the newest frames count', () => {
    const conditions = measured([
      { fwhm_arcsec: 9 },
      ...[1, 2, 3, 4].map(() => ({ fwhm_arcsec: 2 * 2 ** 0.6, airmass: 2 })),
    ]);
    // V at 545 nm: (545/500)^-0.2.
    expect(conditions.seeing_arcsec()).toBeCloseTo(2 / (545 / 500) ** -0.2, 6);
    expect(conditions.isSeeingMeasured).toBe(true);
  });

  it('cloud is the loss against the best of the night, freed of the extinction at each airmass', () => {
    // The profile's V extinction is 0.14 mag per airmass: these are all equally clear.
    const clear = [1, 1.5, 2, 2.5].map(airmass => ({ airmass, zeroPoint_mag: 22.7 - 0.14 * airmass }));
    expect(measured(clear).cloud_mag()).toBe(0);
    const cloudy = [...clear, { airmass: 1, zeroPoint_mag: 22.16 }, { airmass: 1, zeroPoint_mag: 22.16 }];
    expect(measured(cloudy).cloud_mag()).toBeCloseTo(0.4, 6);
  });

  it('bands are compared with themselves', () => {
    const both = [
      { bands: ['B'] as const, zeroPoint_mag: 22.2 },
      { bands: ['V'] as const, zeroPoint_mag: 22.7 },
      { bands: ['B'] as const, zeroPoint_mag: 22.2 },
    ];
    expect(measured(both).cloud_mag()).toBe(0);
  });

  it('a measured sky moves the model by its difference', () => {
    const noMoon = {
      phaseAngle_deg: 180,
      separation_deg: 90,
      moonZenithDistance_deg: 120,
      targetZenithDistance_deg: 0,
      sunAltitude_deg: -40,
    };
    const conditions = measured([{ sky_magPerArcsec2: 20.7 }, { sky_magPerArcsec2: 20.7 }]);
    // The profile's dark V sky is 21.2 at the zenith.
    expect(conditions.skyOffset_mag('V', () => noMoon)).toBeCloseTo(-0.5, 6);
    expect(conditions.skyOffset_mag('B', () => noMoon)).toBe(0);
  });
});
