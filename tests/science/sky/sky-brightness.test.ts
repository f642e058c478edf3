import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { airmass } from '../../../src/science/sky/airmass.js';
import { brighteningInBand_mag, moonBrightening_mag } from '../../../src/science/sky/moonlight.js';
import { darkSky_magPerArcsec2 } from '../../../src/science/sky/night-sky.js';
import { twilightAlone_magPerArcsec2 } from '../../../src/science/sky/twilight.js';

const number = (min: number, max: number) => fc.double({ min, max, noNaN: true });
const runs = { numRuns: 200, seed: 31 };

describe('airmass', () => {
  it('grows towards the horizon, near 1 / sin h while high', () => {
    fc.assert(
      fc.property(number(0, 89), altitude => {
        expect(airmass(altitude)).toBeGreaterThan(airmass(altitude + 0.5));
        if (altitude > 30) expect(airmass(altitude) * Math.sin((altitude * Math.PI) / 180)).toBeCloseTo(1, 2);
      }),
      runs,
    );
  });
});

describe('moonlight', () => {
  const moon = fc.record({
    phaseAngle_deg: number(5, 170),
    separation_deg: number(10, 80),
    moonZenithDistance_deg: number(0, 85),
    targetZenithDistance_deg: number(1, 70),
  });

  it('brightens the sky, more so near a fuller Moon, and most in the blue', () => {
    fc.assert(
      fc.property(moon, geometry => {
        const brightening = (changes = {}) => moonBrightening_mag(21.6, { ...geometry, ...changes }, 0.17);
        expect(brightening()).toBeGreaterThan(0);
        expect(brightening({ phaseAngle_deg: geometry.phaseAngle_deg - 4 })).toBeGreaterThan(brightening());
        expect(brightening({ separation_deg: geometry.separation_deg - 5 })).toBeGreaterThan(brightening());
        const [blue, visual, red] = [440, 545, 800].map(nm => brighteningInBand_mag(brightening(), nm));
        expect(blue).toBeGreaterThan(visual);
        expect(visual).toBeGreaterThan(red);
      }),
      runs,
    );
  });

  it('is none with the Moon down, and finite on the Moon itself', () => {
    const up = {
      phaseAngle_deg: 20,
      separation_deg: 0,
      moonZenithDistance_deg: 40,
      targetZenithDistance_deg: 40,
    };
    expect(moonBrightening_mag(21.6, up, 0.17)).toBeLessThan(15);
    expect(moonBrightening_mag(21.6, { ...up, moonZenithDistance_deg: 90.1 }, 0.17)).toBeCloseTo(0, 9);
  });
});

describe('dark sky and twilight', () => {
  it('the sky brightens towards the horizon, down to 60 degrees', () => {
    expect(darkSky_magPerArcsec2(21.6, 0.17, 0)).toBe(21.6);
    expect(darkSky_magPerArcsec2(21.6, 0.17, 60)).toBeLessThan(21.4);
  });

  it('fades all the way to 18 degrees without a jump, and is not known above 5', () => {
    for (const wavelength of [366, 438, 545, 641, 798]) {
      let before = 0;
      for (let depression = 5; depression < 18; depression += 0.25) {
        const mag = twilightAlone_magPerArcsec2(depression, wavelength);
        expect(mag, `${wavelength} nm, ${depression} deg`).toBeGreaterThanOrEqual(before);
        before = mag;
      }
      expect(twilightAlone_magPerArcsec2(18, wavelength)).toBe(Number.POSITIVE_INFINITY);
      expect(twilightAlone_magPerArcsec2(4.9, wavelength)).toBeNaN();
    }
  });
});
