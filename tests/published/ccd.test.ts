import { describe, expect, it } from 'vitest';
import {
  exposureTime_s,
  type Noise,
  signalToNoise,
  splitExposure,
} from '../../src/science/photometry/ccd-equation.js';
import {
  collectingArea_cm2,
  countRate_ePerS,
  zeroPoint_mag,
} from '../../src/science/photometry/count-rate.js';
import { type Check, readChecks, testChecks } from './checks.js';
import text from './data/checks_ccd.csv';

/** The files count background pixels separately; our noise carries the factor already. */
function pixels(check: Check): number {
  const background = check.input('n_B');
  return check.input('n_pix') * (background > 0 ? 1 + check.input('n_pix') / background : 1);
}

/** Rows in electrons per exposure are a one-second exposure. Rows without digitisation have sigma_f = 0. */
function framed(check: Check): Noise {
  const digitised = check.input('sigma_f') > 0;
  return {
    pixels: pixels(check),
    background_ePerSPerPixel: check.input('N_sky') + check.input('N_dark'),
    readNoise_e: check.input('R'),
    gain_ePerAdu: digitised ? check.input('G') : 0,
    scintillation_s: 0,
  };
}

function timed(check: Check): Noise {
  return {
    pixels: pixels(check),
    background_ePerSPerPixel: check.input('sky_rate') + check.input('dark_rate'),
    readNoise_e: check.input('R'),
    gain_ePerAdu: check.input('G'),
    scintillation_s: check.input('scint_c'),
  };
}

/** A flat-field floor is no part of our equation; its rows are the ones with flat_floor above 0. */
const FLOOR = 'a flat-field floor is no part of the equation in use';
const solvable = (check: Check) => check.input('flat_floor') === 0;
const snr = (check: Check) => signalToNoise(check.input('N_star'), framed(check), 1, 1);

describe('CCD equation, exposure time and count rate', () => {
  it('reads every row of the file', () => expect(readChecks(text)).toHaveLength(81));

  testChecks(text, {
    snr,
    mag_error: { notOurs: 'exposures are given as S/N' },
    mag_error_asym: { notOurs: 'exposures are given as S/N' },
    solve_time_simple: check =>
      exposureTime_s(
        check.input('target_snr'),
        check.input('S'),
        {
          pixels: Math.PI * check.input('aperture_radius_pix') ** 2,
          background_ePerSPerPixel: check.input('sky_rate'),
          readNoise_e: check.input('R'),
          gain_ePerAdu: 0,
          scintillation_s: 0,
        },
        1,
      ),
    solve_time: check =>
      solvable(check) ? exposureTime_s(check.input('target_snr'), check.input('S'), timed(check), 1) : FLOOR,
    snr_at_time: check =>
      solvable(check) ? signalToNoise(check.input('S'), timed(check), check.input('t'), 1) : FLOOR,
    solve_with_subs: check => {
      const split = splitExposure(
        check.input('target_snr'),
        check.input('S'),
        timed(check),
        check.input('t_limit'),
        check.input('n_min'),
      );
      return check.output === 'n_sub' ? split.count : split.time_s;
    },
    collecting_area: check => collectingArea_cm2(check.input('D_m'), check.input('central_obstruction')),
    zp_electrons: zeroPoint,
    zp_adu: check => zeroPoint(check) - 2.5 * Math.log10(check.input('G')),
    count_rate: check =>
      countRate_ePerS(check.input('m'), zeroPoint(check), check.input('k'), check.input('X')),
    m_from_counts: check =>
      check.input('ZP_adu_instr') - 2.5 * Math.log10(check.input('counts_adu') / check.input('t')),
    photon_flux_R: check => check.input('F0') * check.input('W_A') * 10 ** (-0.4 * check.input('m')),
    zp_from_frame: { notOurs: 'zero points come with the frames' },
    throughput_from_zp: { notOurs: 'zero points come with the frames' },
    transparency_drop: { notOurs: 'zero points come with the frames' },
  });
});

function zeroPoint(check: Check): number {
  return zeroPoint_mag(
    check.input('F0'),
    check.input('W_A') / 10,
    collectingArea_cm2(check.input('D_m'), check.input('central_obstruction')),
    check.input('optics') * check.input('QE'),
  );
}
