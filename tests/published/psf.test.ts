import { describe, expect, it } from 'vitest';
import { bestRadius_fwhm } from '../../src/science/photometry/aperture.js';
import { exposureCount, signalToNoise } from '../../src/science/photometry/ccd-equation.js';
import { enclosedFraction, peakPixelFraction, slitFraction } from '../../src/science/photometry/moffat.js';
import { saturationTime_s } from '../../src/science/photometry/saturation.js';
import { scintillation_s } from '../../src/science/photometry/scintillation.js';
import { seeing_arcsec } from '../../src/science/photometry/seeing.js';
import {
  slitSkyRate_ePerSPerPixel,
  spectralRate_ePerSPerPixel,
} from '../../src/science/photometry/spectrum.js';
import { dispersion_arcsec } from '../../src/science/sky/dispersion.js';
import { type Calculation, type Check, readChecks, testChecks } from './checks.js';
import text from './data/checks_psf.csv';

const MMHG_PER_HPA = 0.750062;

const gaussian: Calculation = { notOurs: 'images are Moffat profiles here' };

/** Share of a Gaussian image within a radius in FWHM, and within a slit through its middle: for the checks alone. */
const gaussEnclosed = (radius_fwhm: number) => 1 - Math.exp(-4 * Math.LN2 * radius_fwhm ** 2);
const gaussSlit = (width_fwhm: number) => {
  const steps = 4000;
  const density = (x: number) => Math.sqrt((4 * Math.LN2) / Math.PI) * Math.exp(-4 * Math.LN2 * x * x);
  const middles = Array.from({ length: steps }, (_, i) => ((i + 0.5) / steps - 0.5) * width_fwhm);
  return middles.reduce((sum, x) => sum + density(x), 0) * (width_fwhm / steps);
};

/** The best aperture of the rows with a Gaussian image: radius and S/N. */
function bestAperture(check: Check) {
  const snr = (radius_fwhm: number) =>
    signalToNoise(
      check.input('N_total') * gaussEnclosed(radius_fwhm),
      {
        pixels: (Math.PI * (radius_fwhm * check.input('FWHM')) ** 2) / check.input('pixel') ** 2,
        background_ePerSPerPixel: check.input('background_variance_per_pixel'),
        readNoise_e: 0,
        gain_ePerAdu: 0,
        scintillation_s: 0,
      },
      1,
      1,
    );
  const radius_fwhm = bestRadius_fwhm(snr);
  return { radius_arcsec: radius_fwhm * check.input('FWHM'), snr: snr(radius_fwhm) };
}

function spectralRate(check: Check): number {
  const absorbed = 10 ** (-0.4 * (check.input('m') + check.input('k') * check.input('X')));
  return spectralRate_ePerSPerPixel(check.input('F0') * absorbed, check.input('slit'), {
    area_cm2: check.input('A_cm2'),
    throughput: check.input('eta'),
    width_Angstrom: check.input('A_per_pix'),
  });
}

/** S/N of so many spectral pixels taken together. */
function spectralSnr(check: Check, pixels: number): number {
  const noise = {
    pixels: check.input('n_spatial') * pixels,
    background_ePerSPerPixel: check.input('sky_rate') + check.input('dark_rate'),
    readNoise_e: check.input('R'),
    gain_ePerAdu: check.input('G'),
    scintillation_s: 0,
  };
  return signalToNoise(spectralRate(check) * pixels, noise, check.input('t_s'), 1);
}

const longest = (check: Check) =>
  Math.min(check.input('t_sat'), check.input('t_cosmic'), check.input('t_track'));
const subCount = (check: Check) =>
  exposureCount(check.input('T_total'), longest(check), check.input('n_min'));

function againstNoReadNoise(check: Check): number {
  const noise = {
    pixels: check.input('npix_eff'),
    background_ePerSPerPixel: check.input('background_rate'),
    readNoise_e: check.input('R'),
    gain_ePerAdu: check.input('G'),
    scintillation_s: 0,
  };
  const snr = (readNoise_e: number, gain_ePerAdu: number) =>
    signalToNoise(
      check.input('S'),
      { ...noise, readNoise_e, gain_ePerAdu },
      check.input('T_total'),
      subCount(check),
    );
  return snr(noise.readNoise_e, noise.gain_ePerAdu) / snr(0, 0);
}

describe('image profile, slit, seeing, scintillation, spectra, sub-exposures', () => {
  it('reads every row of the file', () => expect(readChecks(text)).toHaveLength(143));

  testChecks(text, {
    enclosed_gauss: gaussian,
    enclosed_moffat: check => enclosedFraction(check.input('r_over_FWHM'), check.input('beta')),
    peak_pixel_gauss: gaussian,
    peak_pixel_moffat: check =>
      check.word('offset') === 'centre'
        ? peakPixelFraction(check.input('pixel') / check.input('FWHM'), check.input('beta'))
        : 'the worst case, a centred star, is the one in use',
    optimal_aperture_gauss_background_limited: check => {
      const radius = bestRadius_fwhm(r => gaussEnclosed(r) / r);
      // A Gaussian's FWHM is 2.354820 sigma.
      if (check.output === 'r/sigma') return radius * 2.35482;
      return check.output === 'r/FWHM' ? radius : gaussEnclosed(radius);
    },
    optimal_aperture_moffat_background_limited: check => {
      const radius = bestRadius_fwhm(r => enclosedFraction(r, check.input('beta')) / r);
      return check.output === 'r/FWHM' ? radius : enclosedFraction(radius, check.input('beta'));
    },
    optimal_aperture_general: check =>
      check.output === 'snr' ? bestAperture(check).snr : bestAperture(check).radius_arcsec,
    slit_transmission_gauss: gaussian,
    slit_transmission_moffat: check => slitFraction(check.input('slit_over_FWHM'), check.input('beta')),
    slit_transmission_gauss_offset: gaussian,
    seeing_fwhm: check =>
      seeing_arcsec(check.input('FWHM_zenith_500nm'), check.input('X'), check.input('lambda_nm')),
    seeing_outer_scale: { notOurs: 'the measured seeing contains the outer scale' },
    saturation_time: check =>
      saturationTime_s(
        check.input('full_well_limit') - check.input('pedestal_e'),
        check.input('S') * gaussSlit(check.input('pixel') / check.input('FWHM')) ** 2,
        check.input('background_rate'),
      ),
    sigma_young: { notOurs: 'Osborn et al. 2015 corrects it' },
    sigma_osborn: check =>
      Math.sqrt(
        scintillation_s(check.input('D_m'), check.input('X'), check.input('h_m')) / check.input('t_s'),
      ) *
      (check.input('C_Y') / 1.5),
    ratio: { notOurs: 'compares with Young 1967, which is not in use' },
    rate_per_pixel: spectralRate,
    snr_per_pixel: check => spectralSnr(check, 1),
    snr_per_resel: check => spectralSnr(check, check.input('pix_per_resel')),
    sky_rate_per_pixel_slit: check =>
      slitSkyRate_ePerSPerPixel(
        check.input('F0') * 10 ** (-0.4 * check.input('mu')),
        check.input('slit_arcsec'),
        check.input('spatial_pixel_arcsec'),
        {
          area_cm2: check.input('A_cm2'),
          throughput: check.input('eta'),
          width_Angstrom: check.input('A_per_pix'),
        },
      ),
    t_min_readnoise: { notOurs: 'read noise is named as what limits the exposure instead' },
    split: check => (check.output === 'n_sub' ? subCount(check) : check.input('T_total') / subCount(check)),
    snr_relative_to_no_readnoise: againstNoReadNoise,
    wall_time: { notOurs: 'the rows dither; ours is checked in tests/follow/exposure' },
    differential_refraction: check =>
      dispersion_arcsec(
        1000 * check.input('lambda_um'),
        1000 * check.input('lambda0_um'),
        // The rows take the airmass for the secant of the zenith distance.
        (Math.acos(1 / check.input('X')) * 180) / Math.PI,
        {
          pressure_hPa: check.input('P_mmHg') / MMHG_PER_HPA,
          temperature_C: check.input('T_C'),
          vapour_hPa: check.input('f_mmHg') / MMHG_PER_HPA,
        },
      ),
  });
});
