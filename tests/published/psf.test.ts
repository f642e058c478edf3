import { describe } from 'vitest';
import {
  bestRadius_fwhm,
  enclosedFraction,
  peakPixelFraction,
  slitFraction,
} from '../../src/science/photometry/moffat.js';
import { scintillation_s } from '../../src/science/photometry/scintillation.js';
import { seeing_arcsec } from '../../src/science/photometry/seeing.js';
import { type Calculation, testChecks } from './checks.js';
import text from './data/checks_psf.csv';

const gaussian: Calculation = { notOurs: 'images are Moffat profiles here' };
const later: Calculation = { notOurs: 'not computed by the program' };

describe('image profile, slit, seeing, scintillation', () => {
  testChecks(text, {
    enclosed_gauss: gaussian,
    enclosed_moffat: check => enclosedFraction(check.input('r_over_FWHM'), check.input('beta')),
    peak_pixel_gauss: gaussian,
    peak_pixel_moffat: check =>
      check.word('offset') === 'centre'
        ? peakPixelFraction(check.input('pixel') / check.input('FWHM'), check.input('beta'))
        : 'the worst case, a centred star, is the one in use',
    optimal_aperture_gauss_background_limited: gaussian,
    optimal_aperture_moffat_background_limited: check => {
      const radius = bestRadius_fwhm(check.input('beta'));
      return check.output === 'r/FWHM' ? radius : enclosedFraction(radius, check.input('beta'));
    },
    optimal_aperture_general: later,
    slit_transmission_gauss: gaussian,
    slit_transmission_moffat: check => slitFraction(check.input('slit_over_FWHM'), check.input('beta')),
    slit_transmission_gauss_offset: gaussian,
    seeing_fwhm: check =>
      seeing_arcsec(check.input('FWHM_zenith_500nm'), check.input('X'), check.input('lambda_nm')),
    seeing_outer_scale: later,
    saturation_time: gaussian,
    sigma_young: { notOurs: 'Osborn et al. 2015 corrects it' },
    sigma_osborn: check =>
      Math.sqrt(
        scintillation_s(check.input('D_m'), check.input('X'), check.input('h_m')) / check.input('t_s'),
      ) *
      (check.input('C_Y') / 1.5),
    ratio: later,
    rate_per_pixel: later,
    snr_per_pixel: later,
    snr_per_resel: later,
    sky_rate_per_pixel_slit: later,
    t_min_readnoise: later,
    split: later,
    snr_relative_to_no_readnoise: later,
    wall_time: later,
    differential_refraction: later,
  });
});
