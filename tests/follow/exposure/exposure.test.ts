import { readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { imagerRates } from '../../../src/follow/exposure/imager.js';
import { darkZenith } from '../../../src/follow/exposure/limits.js';
import {
  planExposure,
  type Rates,
  tidyTime_s,
  wallTime_s,
} from '../../../src/follow/exposure/plan-exposure.js';
import { ExposureAdviser } from '../../../src/follow/exposure/suggest.js';
import type { ImagerSetup } from '../../../src/follow/settings.js';
import { parseProfile } from '../../../src/night/profile/parse.js';
import { BAND_COUNT } from '../../../src/science/bands.js';
import { seeing_arcsec } from '../../../src/science/photometry/seeing.js';
import { ROOT } from '../../support/built.js';

const { profile } = parseProfile(
  readFileSync(resolve(ROOT, 'profiles/northern-80cm.toml'), 'utf8'),
  'n.toml',
);
const adviser = new ExposureAdviser(profile!);
const star = (mag: number) => ({
  mag: new Float64Array(BAND_COUNT).fill(mag),
  sigma_mag: new Float64Array(BAND_COUNT).fill(0.1),
});
const clear = { ...darkZenith(profile!), airmass: 1.2 };
const [imaging, spectrum] = [0, 1];
const suggest = (mag: number, setup: number, conditions = clear) =>
  adviser.suggest(star(mag), conditions)[setup];

/** S/N of an imager by brute force: the CCD equation written out again, term by term. */
function snrAgain(rates: Rates, each_s: number, count: number): number {
  const electrons = rates.signal_ePerS * each_s * count;
  let variance = electrons;
  variance += rates.noise.pixels * rates.noise.background_ePerSPerPixel * each_s * count;
  variance +=
    count * rates.noise.pixels * (rates.noise.readNoise_e ** 2 + rates.noise.gain_ePerAdu ** 2 / 12);
  variance += electrons ** 2 * (rates.noise.scintillation_s / (each_s * count));
  return electrons / Math.sqrt(variance);
}

describe('exposures', () => {
  it('reach what was asked for, and the S/N belongs to the rounded times', () => {
    for (const setup of [imaging, spectrum]) {
      for (const mag of [9, 11, 13, 15]) {
        const exposure = suggest(mag, setup);
        expect(exposure.possible, `${exposure.setup} ${mag}`).toBe(true);
        expect(exposure.snr).toBeGreaterThanOrEqual(profile!.setups[setup].targetSnr * 0.999);
        expect(exposure.each_s).toBeLessThanOrEqual(profile!.setups[setup].maxSingle_s);
      }
    }
  });

  it('agree with the equation written out again', () => {
    const rates: Rates = {
      signal_ePerS: 210,
      noise: {
        pixels: 28,
        background_ePerSPerPixel: 6,
        readNoise_e: 8.5,
        gain_ePerAdu: 1.6,
        scintillation_s: 2e-6,
      },
      peak_ePerS: 30,
    };
    const planned = planExposure(profile!.setups[imaging], rates);
    expect(planned.snr).toBeCloseTo(snrAgain(rates, planned.each_s, planned.count), 6);
    // A step less in each exposure would miss it.
    expect(snrAgain(rates, planned.each_s - 6, planned.count)).toBeLessThan(
      profile!.setups[imaging].targetSnr,
    );
  });

  it('take longer for a fainter star, through more air, in worse seeing, under cloud, under a brighter sky', () => {
    fc.assert(
      fc.property(fc.double({ min: 13, max: 15.5, noNaN: true }), mag => {
        const base = suggest(mag, spectrum).total_s;
        const worse = [
          suggest(mag + 0.3, spectrum),
          suggest(mag, spectrum, { ...clear, airmass: 2 }),
          suggest(mag, spectrum, { ...clear, seeing_arcsec: 3 }),
          suggest(mag, spectrum, { ...clear, cloud_mag: 0.4 }),
          suggest(mag, spectrum, { ...clear, sky_magPerArcsec2: () => 18 }),
        ];
        for (const exposure of worse)
          expect(exposure.possible ? exposure.total_s : Infinity).toBeGreaterThan(base);
      }),
      { numRuns: 40, seed: 11 },
    );
  });

  it('0.4 mag of cloud costs a star-limited exposure 10^(0.4 x 0.4) = 1.45 times the time', () => {
    const setup = profile!.setups[spectrum];
    const open = (exposure: { count: number; each_s: number }) => exposure.count * exposure.each_s;
    const ratio = open(suggest(13, spectrum, { ...clear, cloud_mag: 0.4 })) / open(suggest(13, spectrum));
    expect(setup.kind).toBe('spectrograph');
    expect(ratio).toBeGreaterThan(1.4);
    expect(ratio).toBeLessThan(1.55);
  });

  it('a star too bright or too faint says so', () => {
    expect(suggest(-3, imaging)).toMatchObject({
      possible: false,
      limitedBy: expect.stringMatching(/^too bright/),
    });
    expect(suggest(24.5, imaging)).toMatchObject({
      possible: false,
      limitedBy: expect.stringMatching(/^too faint: not reliably/),
    });
    expect(suggest(Number.NaN, imaging)).toMatchObject({
      possible: false,
      limitedBy: 'not known: the brightness in this band',
    });
  });

  it('in daylight there is no sky brightness, and no exposure: words, and an end to the search', () => {
    for (const setup of [imaging, spectrum]) {
      expect(suggest(14, setup, { ...clear, sky_magPerArcsec2: () => Number.NaN })).toMatchObject({
        possible: false,
        limitedBy: 'daylight: the Sun is less than 5 deg below the horizon',
      });
    }
  });

  it('reach the S/N asked for, however saturation and the longest exposure round, or say that they cannot', () => {
    const noise = { readNoise_e: 8, gain_ePerAdu: 1.5, scintillation_s: 2e-6 };
    fc.assert(
      fc.property(
        fc.record({
          wanted: fc.double({ min: 5, max: 500, noNaN: true }),
          longest_s: fc.double({ min: 1, max: 300, noNaN: true }),
          logSignal: fc.double({ min: -1, max: 5, noNaN: true }),
          peakShare: fc.double({ min: 0.005, max: 0.3, noNaN: true }),
          background: fc.double({ min: 0.01, max: 50, noNaN: true }),
          pixels: fc.double({ min: 3, max: 300, noNaN: true }),
        }),
        ({ wanted, longest_s, logSignal, peakShare, background, pixels }) => {
          const setup = { ...profile!.setups[imaging], targetSnr: wanted, maxSingle_s: longest_s };
          const rates = {
            signal_ePerS: 10 ** logSignal,
            peak_ePerS: peakShare * 10 ** logSignal,
            noise: { ...noise, pixels, background_ePerSPerPixel: background },
          };
          const planned = planExposure(setup, rates);
          if (!planned.possible) {
            expect(planned.limitedBy).toMatch(/^too (faint|bright): /);
            return;
          }
          expect(planned.snr).toBeGreaterThanOrEqual(wanted * 0.999 - 1e-9);
          expect(planned.snr).toBeCloseTo(snrAgain(rates, planned.each_s, planned.count), 6);
          expect(planned.each_s).toBeLessThanOrEqual(longest_s * (1 + 1e-6));
          expect(planned.each_s * (rates.peak_ePerS + background)).toBeLessThan(
            profile!.setups[0].detector.fullWell_e,
          );
          expect(planned.total_s).toBeLessThanOrEqual(setup.maxTotal_s);
        },
      ),
      { numRuns: 500, seed: 12 },
    );
  });

  it('wall time is acquisition, exposures and readouts', () => {
    const setup = { ...profile!.setups[imaging], acquire_s: 60 };
    const readout_s = 2.5;
    // Row 127 of checks_psf.csv: 60 + 15 x (20 + 2.5).
    expect(wallTime_s({ ...setup, detector: { ...setup.detector, readout_s } }, 15, 20)).toBe(397.5);
  });

  it('a bright star gets a wider aperture: more of its light than the best against the sky alone', () => {
    const setup = profile!.setups[imaging] as ImagerSetup;
    const settings = profile!.bands.find(entry => entry.band === setup.band)!;
    const passband = adviser.passbands.get(setup.band)!;
    const pixels = (mag: number) =>
      imagerRates(profile!.telescope, settings, passband, setup, clear, mag).noise.pixels;
    expect(pixels(8)).toBeGreaterThan(2 * pixels(20));
    // Against the sky alone the best radius of a Moffat image of beta 2.5 is 0.75061 FWHM (checks_psf.csv, row 44).
    const fwhm = seeing_arcsec(clear.seeing_arcsec, clear.airmass, passband.wavelength_nm);
    expect(Math.sqrt((pixels(26) * setup.detector.pixel_arcsec ** 2) / Math.PI) / fwhm).toBeCloseTo(
      0.7506,
      2,
    );
  });

  it('the range of one sigma in brightness encloses the suggestion', () => {
    const exposure = suggest(14, spectrum);
    expect(exposure.totalBright_s).toBeLessThan(exposure.total_s);
    expect(exposure.totalFaint_s).toBeGreaterThan(exposure.total_s);
  });

  it('times are tidy and never above the limit', () => {
    expect([0.23, 3.2, 17.1, 31, 298].map(time => tidyTime_s(time, 300))).toEqual([0.3, 3.5, 18, 35, 300]);
    expect(tidyTime_s(300, 297)).toBe(295);
  });
});
