import { describe, expect, it } from 'vitest';
import { slitCaution } from '../../../src/follow/exposure/slit-caution.js';
import type { SpectrographSetup } from '../../../src/follow/settings.js';

const setup: SpectrographSetup = {
  kind: 'spectrograph',
  name: 'low-res spectrum',
  detector: {
    pixel_arcsec: 0.6,
    readNoise_e: 5,
    gain_ePerAdu: 1.1,
    dark_ePerS: 0.005,
    fullWell_e: 90_000,
    bits: 16,
    readout_s: 15,
  },
  targetSnr: 40,
  maxSingle_s: 1200,
  minCount: 1,
  acquire_s: 240,
  maxTotal_s: 10_800,
  wavelength_nm: 500,
  slit_arcsec: 2,
  dispersion_nmPerPixel: 0.2,
  resolution_nm: 0.7,
  throughput: 0.12,
};
const low = {
  airmass: 2,
  parallacticAngle_deg: 47.2,
  seeing_arcsec: 1.5,
  siteHeight_m: 1950,
  cloud_mag: 0,
  sky_magPerArcsec2: () => 21,
};

describe('the slit', () => {
  it('is to follow the air: Filippenko 1982 gives 1.10 arcsec from 500 to 400 nm at airmass 2 (checks_psf.csv, row 141)', () => {
    expect(slitCaution(setup, low)).toBe(
      'slit off the parallactic angle: at airmass 2.00 set it to 47 deg, or 400 nm falls 1.1 arcsec beside 500 nm',
    );
  });

  it('has no head: an angle and the opposite one are the same', () => {
    for (const parallacticAngle_deg of [-133, 47, 226.6, 179.7 - 132.7]) {
      expect(slitCaution(setup, { ...low, parallacticAngle_deg })).toContain('set it to 47 deg');
    }
    expect(slitCaution(setup, { ...low, parallacticAngle_deg: -0.2 })).toContain('set it to 0 deg');
  });

  it('may stand as it likes high up, in the infrared, or where it is wide; and where the star is, is not known', () => {
    expect(slitCaution(setup, { ...low, airmass: 1.3 })).toBe('');
    expect(slitCaution(setup, { ...low, airmass: 1.31 })).not.toBe('');
    expect(slitCaution({ ...setup, wavelength_nm: 2200 }, low)).toBe('');
    expect(slitCaution({ ...setup, slit_arcsec: 12 }, low)).toBe('');
    expect(slitCaution(setup, { ...low, parallacticAngle_deg: Number.NaN })).toBe('');
    expect(slitCaution(setup, { ...low, airmass: Number.NaN })).toBe('');
  });
});
