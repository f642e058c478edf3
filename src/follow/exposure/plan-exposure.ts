import {
  type Noise,
  readVariance_e2,
  signalToNoise,
  splitExposure,
} from '../../science/photometry/ccd-equation.js';
import type { Detector, Setup } from '../settings.js';

/** Signal and noise of one star in one setup, per second. */
export interface Rates {
  readonly signal_ePerS: number;
  readonly noise: Noise;
  /** Electrons per second of the star in its brightest pixel, without the background. */
  readonly peak_ePerS: number;
}

/** The same for a star brighter or fainter by some magnitudes. */
export function fainterBy(rates: Rates, shift_mag: number): Rates {
  const factor = 10 ** (-0.4 * shift_mag);
  return { ...rates, signal_ePerS: rates.signal_ePerS * factor, peak_ePerS: rates.peak_ePerS * factor };
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
/** Below this no shutter and no readout is to be trusted. */
const SHORTEST_S = 0.1;
/** A star needs this much signal to be seen at all (common practice). */
const LEAST_SNR = 4;

/** Electrons a pixel may collect: the well, or where the digits end. */
export function pixelLimit_e(detector: Detector): number {
  return Math.min(detector.fullWell_e, (2 ** detector.bits - 1) * detector.gain_ePerAdu);
}

/** Solves for the setup's S/N, splits by saturation and the longest exposure, and rounds to tidy times. */
export function planExposure(setup: Setup, rates: Rates): PlannedExposure {
  const saturation_s =
    (SAFE_SHARE * pixelLimit_e(setup.detector)) / (rates.peak_ePerS + rates.noise.background_ePerSPerPixel);
  if (saturation_s < SHORTEST_S) {
    return impossible(`too bright: the peak pixel fills in ${(saturation_s / SAFE_SHARE).toPrecision(1)} s`);
  }
  const longest_s = Math.min(setup.maxSingle_s, saturation_s);
  const { time_s, count } = splitExposure(
    setup.targetSnr,
    rates.signal_ePerS,
    rates.noise,
    longest_s,
    setup.minCount,
  );
  const each_s = tidyTime_s(time_s / count, longest_s);
  // Rounding down at the limit may cost a little: one more exposure then makes up for it.
  const enough =
    signalToNoise(rates.signal_ePerS, rates.noise, each_s * count, count) >= setup.targetSnr * 0.999;
  const taken = enough ? count : count + 1;
  const total_s = setup.acquire_s + taken * (each_s + setup.detector.readout_s);
  const snr = signalToNoise(rates.signal_ePerS, rates.noise, each_s * taken, taken);
  if (!(total_s <= setup.maxTotal_s)) return tooFaint(setup, rates, longest_s);
  return {
    possible: true,
    count: taken,
    each_s,
    total_s,
    snr,
    limitedBy: limitOf(rates, taken, each_s, saturation_s <= setup.maxSingle_s && taken > setup.minCount),
  };
}

/** What can be had in the longest time allowed. */
function tooFaint(setup: Setup, rates: Rates, longest_s: number): PlannedExposure {
  const open = setup.maxTotal_s - setup.acquire_s;
  const count = Math.max(1, Math.floor(open / (longest_s + setup.detector.readout_s)));
  const each_s = tidyTime_s(longest_s, longest_s);
  const snr = signalToNoise(rates.signal_ePerS, rates.noise, count * each_s, count);
  const reached = snr < LEAST_SNR ? 'not reliably detectable' : `S/N ${snr.toFixed(0)} at most`;
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
