/** Readings of stars on frames; frame and star are places in the solution. */
export interface EnsembleReadings {
  readonly frame: ArrayLike<number>;
  readonly star: ArrayLike<number>;
  readonly mag: ArrayLike<number>;
  readonly sigma_mag: ArrayLike<number>;
}

export interface Ensemble {
  /** Added to the true magnitudes on each frame; NaN for a frame without readings. */
  readonly offset_mag: Float64Array;
  readonly offsetSigma_mag: Float64Array;
  readonly star_mag: Float64Array;
}

/** Readings further off than this many sigma count less: variables must not shift a frame. */
const HUBER_SIGMA = 3;
const MOST_ROUNDS = 200;

/**
 * Frame offsets and star magnitudes together by weighted least squares (Honeycutt 1992, PASP 104, 435), solved by turns:
 * stars from the frames' offsets, offsets from the stars, until nothing moves by more than `tolerance_mag`. Readings
 * far off are weighted down (Huber 1964). Where every star is on every frame, one turn is exact. The offsets' median is
 * nil; frames that share no star with the others keep the zero point they came with.
 */
export function solveEnsemble(
  readings: EnsembleReadings,
  frames: number,
  stars: number,
  tolerance_mag = 1e-5,
): Ensemble {
  const { frame, star, mag, sigma_mag } = readings;
  const offset_mag = new Float64Array(frames);
  const star_mag = new Float64Array(stars);
  const weights = Float64Array.from(sigma_mag, sigma => 1 / (sigma * sigma));
  const base = weights.slice();
  const offsetSigma_mag = new Float64Array(frames);
  for (let round = 0; round < MOST_ROUNDS; round++) {
    average(star_mag, star, i => mag[i] - offset_mag[frame[i]], weights);
    const before = offset_mag.slice();
    const weightOfFrame = average(offset_mag, frame, i => mag[i] - star_mag[star[i]], weights);
    let largestMove = 0;
    for (let f = 0; f < frames; f++) {
      offsetSigma_mag[f] = 1 / Math.sqrt(weightOfFrame[f]);
      if (weightOfFrame[f] > 0) largestMove = Math.max(largestMove, Math.abs(offset_mag[f] - before[f]));
    }
    if (round > 0 && largestMove < tolerance_mag) break;
    for (let i = 0; i < weights.length; i++) {
      const off = Math.abs(mag[i] - offset_mag[frame[i]] - star_mag[star[i]]) / sigma_mag[i];
      weights[i] = base[i] * Math.min(1, HUBER_SIGMA / off);
    }
  }
  centre(offset_mag, star_mag);
  return { offset_mag, offsetSigma_mag, star_mag };
}

/** Weighted means of `value` by place, written to `out` (NaN where there is none); returns the sums of weights. */
function average(
  out: Float64Array,
  place: ArrayLike<number>,
  value: (i: number) => number,
  weights: Float64Array,
): Float64Array {
  const sums = new Float64Array(out.length);
  const total = new Float64Array(out.length);
  for (let i = 0; i < weights.length; i++) {
    sums[place[i]] += weights[i] * value(i);
    total[place[i]] += weights[i];
  }
  for (let k = 0; k < out.length; k++) out[k] = sums[k] / total[k];
  return total;
}

function centre(offset_mag: Float64Array, star_mag: Float64Array): void {
  const known = [...offset_mag].filter(value => !Number.isNaN(value)).sort((a, b) => a - b);
  const middle = known[known.length >> 1];
  for (let f = 0; f < offset_mag.length; f++) offset_mag[f] -= middle;
  for (let s = 0; s < star_mag.length; s++) star_mag[s] += middle;
}
