import { median, sigmaFromMad } from '../statistics.js';

export interface ZeroPointShift {
  readonly shift_mag: number;
  readonly sigma_mag: number;
  readonly stars: number;
}

const HUBER_C = 1.345;
const HUBER_FROM = 8;
const LEAST_STARS = 3;
const MOST_STEPS = 200;

/**
 * Median of the differences; its error is 1.2533 sigma/sqrt(n) with sigma from the median absolute deviation
 * (standard statistics, Gaussian core).
 */
export function medianShift(differences_mag: ArrayLike<number>): ZeroPointShift {
  const n = differences_mag.length;
  const sigma_mag = (1.2533 * sigmaFromMad(differences_mag)) / Math.sqrt(n);
  return { shift_mag: median(differences_mag), sigma_mag, stars: n };
}

/**
 * Huber's estimate of location (Huber 1964, Ann. Math. Stat. 35, 73), c = 1.345, scale fixed to the errors:
 * near the weighted mean for quiet stars, hardly moved by variables. Error from the sandwich formula.
 */
export function huberShift(
  differences_mag: ArrayLike<number>,
  sigmas_mag: ArrayLike<number>,
): ZeroPointShift {
  const n = differences_mag.length;
  let shift = median(differences_mag);
  for (let step = 0; step < MOST_STEPS; step++) {
    let weights = 0;
    let weighted = 0;
    for (let i = 0; i < n; i++) {
      const u = Math.abs(differences_mag[i] - shift) / sigmas_mag[i];
      const weight = Math.min(1, HUBER_C / u) / sigmas_mag[i] ** 2;
      weights += weight;
      weighted += weight * differences_mag[i];
    }
    const next = weighted / weights;
    const done = Math.abs(next - shift) < 1e-12;
    shift = next;
    if (done) break;
  }
  let squares = 0;
  let slope = 0;
  for (let i = 0; i < n; i++) {
    const u = (differences_mag[i] - shift) / sigmas_mag[i];
    squares += Math.max(-HUBER_C, Math.min(HUBER_C, u)) ** 2;
    if (Math.abs(u) <= HUBER_C) slope += 1 / sigmas_mag[i];
  }
  return { shift_mag: shift, sigma_mag: Math.sqrt(squares) / slope, stars: n };
}

/**
 * Shift between two frames from the stars they share: Huber from eight stars on, the median of three to seven,
 * undefined below. `floor_mag` is added in quadrature to the errors, so that a few bright stars do not decide.
 */
export function zeroPointShift(
  differences_mag: ArrayLike<number>,
  sigmas_mag: ArrayLike<number>,
  floor_mag = 0.003,
): ZeroPointShift | undefined {
  if (differences_mag.length < LEAST_STARS) return undefined;
  if (differences_mag.length < HUBER_FROM) return medianShift(differences_mag);
  return huberShift(
    differences_mag,
    Float64Array.from(sigmas_mag, sigma => Math.hypot(sigma, floor_mag)),
  );
}
