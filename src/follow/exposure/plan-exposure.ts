import {
  type Noise,
  readVariance_e2,
  signalToNoise,
  splitExposure,
} from '../../science/photometry/ccd-equation.js';
import { pixelLimit_e, saturationTime_s } from '../../science/photometry/saturation.js';
import type { Setup } from '../settings.js';

/** Signal and noise of one star in one setup, per second. */
export interface Rates {
  readonly signal_ePerS: number;
  readonly noise: Noise;
  /** Electrons per second of the star in its brightest pixel, without the background. */
  readonly peak_ePerS: number;
}

/** Number and length of the exposures, or the words that say why not. */
export interface PlannedExposure {
  readonly possible: boolean;
  readonly count: number;
  readonly each_s: number;
  readonly total_s: number;
  readonly snr: number;
  readonly limitedBy: string;
}

/** Exposures are kept below this share of what the detector can hold (common practice). */
const SAFE_SHARE = 0.7;
/** Peak pixels are worked out for seeing that gets this much better meanwhile. */
export const BETTER_SEEING = 0.8;
/** Below this no shutter and no readout is to be trusted. */
const SHORTEST_S = 0.1;
/** A star needs this much signal to be seen at all (common practice). */
const LEAST_SNR = 4;
/** An S/N this close to the wanted one counts as reached. */
const CLOSE_ENOUGH = 0.999;

/** Solves for the setup's S/N, splits by saturation and the longest exposure, and rounds to tidy times. */
export function planExposure(setup: Setup, rates: Rates): PlannedExposure {
  const { detector } = setup;
  const { signal_ePerS, noise, peak_ePerS } = rates;
  if (Number.isNaN(noise.background_ePerSPerPixel)) return DAYLIGHT;
  const limit_e = SAFE_SHARE * pixelLimit_e(detector.fullWell_e, detector.bits, detector.gain_ePerAdu);
  const saturation_s = saturationTime_s(limit_e, peak_ePerS, noise.background_ePerSPerPixel);
  if (saturation_s < SHORTEST_S) {
    return impossible(`too bright: the peak pixel fills in ${(saturation_s / SAFE_SHARE).toPrecision(1)} s`);
  }
  const longest_s = Math.min(setup.maxSingle_s, saturation_s);
  const split = splitExposure(setup.targetSnr, signal_ePerS, noise, longest_s, setup.minCount);
  const each_s = tidyTime_s(split.time_s / split.count, longest_s);
  // Rounding down at the limit costs signal. S/N grows as the square root of the number of equal exposures, which
  // tells how many make up for it.
  const wanted = setup.targetSnr * CLOSE_ENOUGH;
  const count = Math.max(
    split.count,
    Math.ceil((wanted / signalToNoise(signal_ePerS, noise, each_s, 1)) ** 2 - 1e-9),
  );
  const total_s = wallTime_s(setup, count, each_s);
  if (!(total_s <= setup.maxTotal_s)) return tooFaint(setup, rates, longest_s);
  return {
    possible: true,
    count,
    each_s,
    total_s,
    snr: signalToNoise(signal_ePerS, noise, each_s * count, count),
    limitedBy: limitOf(rates, count, each_s, saturation_s <= setup.maxSingle_s && count > setup.minCount),
  };
}

/** Time on the clock: acquisition, exposures and readouts. */
export function wallTime_s(setup: Setup, count: number, each_s: number): number {
  return setup.acquire_s + count * (each_s + setup.detector.readout_s);
}

/** What can be had in the longest time allowed. */
function tooFaint(setup: Setup, rates: Rates, longest_s: number): PlannedExposure {
  const each_s = tidyTime_s(longest_s, longest_s);
  const open_s = setup.maxTotal_s - setup.acquire_s;
  const count = Math.max(1, Math.floor(open_s / (each_s + setup.detector.readout_s)));
  const snr = signalToNoise(rates.signal_ePerS, rates.noise, count * each_s, count);
  const reached = snr < LEAST_SNR ? 'not reliably detectable' : `S/N ${Math.floor(snr)} at most`;
  return impossible(`too faint: ${reached} in ${Math.round(setup.maxTotal_s / 60)} min`);
}

function impossible(why: string): PlannedExposure {
  return {
    possible: false,
    count: 0,
    each_s: Number.NaN,
    total_s: Number.NaN,
    snr: Number.NaN,
    limitedBy: why,
  };
}

/** No sky brightness is known there (see `Conditions`). */
const DAYLIGHT = impossible('daylight: the Sun is less than 5 deg below the horizon');

/** Times people set: 0.1 s below 1 s, 0.5 s below 10, whole seconds to 30, then fives; never above the limit. */
export function tidyTime_s(time_s: number, limit_s: number): number {
  const step = time_s < 1 ? 0.1 : time_s < 10 ? 0.5 : time_s <= 30 ? 1 : 5;
  const up = Math.ceil(time_s / step - 1e-9) * step;
  const tidy = up <= limit_s ? up : Math.floor(limit_s / step + 1e-9) * step;
  return Math.max(SHORTEST_S, Number(tidy.toFixed(1)));
}

/** The largest of the variances. */
function limitOf(rates: Rates, count: number, each_s: number, saturates: boolean): string {
  if (saturates) return 'saturation';
  const { noise, signal_ePerS } = rates;
  const time_s = count * each_s;
  const shares: readonly (readonly [string, number])[] = [
    ['star', signal_ePerS * time_s],
    ['sky', noise.pixels * noise.background_ePerSPerPixel * time_s],
    ['read noise', noise.pixels * count * readVariance_e2(noise.readNoise_e, noise.gain_ePerAdu)],
    ['scintillation', signal_ePerS ** 2 * noise.scintillation_s * time_s],
  ];
  return shares.reduce((largest, share) => (share[1] > largest[1] ? share : largest))[0];
}
