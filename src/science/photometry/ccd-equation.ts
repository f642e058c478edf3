/** Noise of the detector behind an aperture. */
export interface Noise {
  /** Pixels in the aperture, not rounded; already multiplied by 1 + n_pix/n_background where that matters. */
  readonly pixels: number;
  /** Sky and dark current together, electrons per second and pixel. */
  readonly background_ePerSPerPixel: number;
  readonly readNoise_e: number;
  readonly gain_ePerAdu: number;
  /** Scintillation: relative variance times exposure time, seconds; 0 for none. */
  readonly scintillation_s: number;
}

/** Rounding to whole ADU has the variance of a uniform distribution, 1/12. */
const DIGITISATION_VARIANCE_ADU2 = 1 / 12;

/** Variance of one read of one pixel, electrons squared: read noise and digitisation. */
export function readVariance_e2(readNoise_e: number, gain_ePerAdu: number): number {
  return readNoise_e ** 2 + gain_ePerAdu ** 2 * DIGITISATION_VARIANCE_ADU2;
}

/**
 * Signal-to-noise of `count` exposures that add up to `time_s`: the CCD equation (Merline & Howell 1995, Exp.
 * Astron. 6, 163; Howell, Handbook of CCD Astronomy, 2nd ed. 2006, ch. 4), with scintillation added.
 */
export function signalToNoise(signal_ePerS: number, noise: Noise, time_s: number, count: number): number {
  const electrons = signal_ePerS * time_s;
  const variance =
    electrons +
    noise.pixels * noise.background_ePerSPerPixel * time_s +
    noise.pixels * count * readVariance_e2(noise.readNoise_e, noise.gain_ePerAdu) +
    signal_ePerS ** 2 * noise.scintillation_s * time_s;
  return electrons / Math.sqrt(variance);
}

/** Total time, seconds, at which `count` reads reach the wanted S/N: the CCD equation solved (a quadratic). */
export function exposureTime_s(wanted: number, signal_ePerS: number, noise: Noise, count: number): number {
  const a = signal_ePerS ** 2;
  const b =
    wanted ** 2 *
    (signal_ePerS +
      noise.pixels * noise.background_ePerSPerPixel +
      signal_ePerS ** 2 * noise.scintillation_s);
  const c = wanted ** 2 * noise.pixels * count * readVariance_e2(noise.readNoise_e, noise.gain_ePerAdu);
  return (b + Math.sqrt(b * b + 4 * a * c)) / (2 * a);
}

/** How many exposures a total time takes when none may last longer than `longest_s`. */
export function exposureCount(time_s: number, longest_s: number, leastCount: number): number {
  return Math.max(leastCount, Math.ceil(time_s / longest_s - 1e-9));
}

/**
 * Total time and number of exposures when none may last longer than `longest_s`. A rate or background that is not
 * known gives a time that is not known (NaN); a star without signal an infinite one.
 */
export function splitExposure(
  wanted: number,
  signal_ePerS: number,
  noise: Noise,
  longest_s: number,
  leastCount: number,
): { readonly time_s: number; readonly count: number } {
  let count = leastCount;
  while (true) {
    const time_s = exposureTime_s(wanted, signal_ePerS, noise, count);
    const needed = exposureCount(time_s, longest_s, leastCount);
    // Each further read costs a little time, so the count only ever grows, in a few steps.
    if (!(needed > count && Number.isFinite(needed))) return { time_s, count };
    count = needed;
  }
}
