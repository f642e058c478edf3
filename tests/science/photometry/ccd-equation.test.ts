import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { bestRadius_fwhm } from '../../../src/science/photometry/aperture.js';
import {
  exposureTime_s,
  type Noise,
  signalToNoise,
  splitExposure,
} from '../../../src/science/photometry/ccd-equation.js';
import { enclosedFraction, slitFraction } from '../../../src/science/photometry/moffat.js';
import { pixelLimit_e } from '../../../src/science/photometry/saturation.js';

const number = (min: number, max: number) => fc.double({ min, max, noNaN: true });
const setting = fc.record({
  signal: number(0.05, 1e5),
  wanted: number(3, 300),
  count: fc.integer({ min: 1, max: 30 }),
  noise: fc.record({
    pixels: number(1, 500),
    background_ePerSPerPixel: number(0, 100),
    readNoise_e: number(0, 20),
    gain_ePerAdu: number(0.1, 5),
    scintillation_s: number(0, 1e-4),
  }),
});
const runs = { numRuns: 300, seed: 21 };

describe('CCD equation', () => {
  it('S/N grows with time and with brightness, and falls with every noise', () => {
    fc.assert(
      fc.property(setting, number(0.1, 3000), ({ signal, count, noise }, time_s) => {
        const snr = (changes: Partial<Noise> = {}, brighter = 1, longer = 1) =>
          signalToNoise(signal * brighter, { ...noise, ...changes }, time_s * longer, count);
        expect(snr({}, 1, 1.1)).toBeGreaterThan(snr());
        expect(snr({}, 1.1)).toBeGreaterThan(snr());
        expect(snr({ background_ePerSPerPixel: noise.background_ePerSPerPixel + 1 })).toBeLessThan(snr());
        expect(snr({ readNoise_e: noise.readNoise_e + 1 })).toBeLessThan(snr());
        expect(snr({ pixels: noise.pixels + 5 })).toBeLessThanOrEqual(snr());
        expect(snr({ scintillation_s: noise.scintillation_s + 1e-4 })).toBeLessThan(snr());
      }),
      runs,
    );
  });

  it('the exposure time is its inverse, and falls with brightness', () => {
    fc.assert(
      fc.property(setting, ({ signal, wanted, count, noise }) => {
        const time_s = exposureTime_s(wanted, signal, noise, count);
        expect(signalToNoise(signal, noise, time_s, count) / wanted).toBeCloseTo(1, 6);
        expect(exposureTime_s(wanted, signal * 1.2, noise, count)).toBeLessThan(time_s);
      }),
      runs,
    );
  });

  it('a split keeps to the longest and the least number', () => {
    fc.assert(
      fc.property(setting, number(0.5, 2000), ({ signal, wanted, count, noise }, longest_s) => {
        const split = splitExposure(wanted, signal, noise, longest_s, count);
        expect(split.count).toBeGreaterThanOrEqual(count);
        expect(split.time_s / split.count).toBeLessThanOrEqual(longest_s * (1 + 1e-8));
        expect(signalToNoise(signal, noise, split.time_s, split.count) / wanted).toBeCloseTo(1, 6);
      }),
      runs,
    );
  });

  it('what is not known stays not known, and what is not there takes for ever', () => {
    const noise = {
      pixels: 20,
      background_ePerSPerPixel: 2,
      readNoise_e: 5,
      gain_ePerAdu: 1,
      scintillation_s: 0,
    };
    const unknown = splitExposure(50, 100, { ...noise, background_ePerSPerPixel: Number.NaN }, 60, 3);
    expect(unknown.time_s).toBeNaN();
    expect(splitExposure(50, Number.NaN, noise, 60, 3).time_s).toBeNaN();
    expect(splitExposure(50, 0, noise, 60, 3).time_s).toBe(Number.POSITIVE_INFINITY);
  });
});

describe('image and detector', () => {
  it('shares grow with the size, to all of the light', () => {
    fc.assert(
      fc.property(number(0.05, 5), number(1.6, 6), (size, beta) => {
        for (const share of [enclosedFraction, slitFraction]) {
          expect(share(size, beta)).toBeGreaterThan(0);
          expect(share(size * 1.1, beta)).toBeGreaterThan(share(size, beta));
          expect(share(size, beta)).toBeLessThan(1);
        }
        // A slit lets through what a circle of its width does, and more.
        expect(slitFraction(2 * size, beta)).toBeGreaterThan(enclosedFraction(size, beta));
      }),
      runs,
    );
  });

  it('the best radius is where the merit peaks', () => {
    expect(bestRadius_fwhm(radius => -((radius - 1.3) ** 2))).toBeCloseTo(1.3, 4);
  });

  it('a pixel ends at its well or at its last digit', () => {
    expect(pixelLimit_e(90_000, 16, 1.2)).toBe(65_535 * 1.2);
    expect(pixelLimit_e(50_000, 16, 1.2)).toBe(50_000);
  });
});
