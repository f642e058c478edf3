/** One star on one frame: the frame and star are places in the solution. */
export interface EnsembleReadings {
  readonly frame: ArrayLike<number>;
  readonly star: ArrayLike<number>;
  readonly mag: ArrayLike<number>;
  readonly sigma_mag: ArrayLike<number>;
}

export interface EnsembleSolution {
  /** Added to the true magnitudes on each frame; 0 on the reference frame, NaN where no star links it. */
  readonly offset_mag: Float64Array;
  /** NaN for stars only on frames that nothing links to the reference. */
  readonly star_mag: Float64Array;
}

/**
 * Least squares for frame offsets and star magnitudes together, frame 0 as reference (Honeycutt 1992, PASP
 * 104, 435). The stars are eliminated first, so that the system has the size of the frames.
 */
export function solveEnsemble(
  readings: EnsembleReadings,
  frameCount: number,
  starCount: number,
): EnsembleSolution {
  const { frame, star, mag, sigma_mag } = readings;
  const weightOf = (i: number) => 1 / sigma_mag[i] ** 2;
  const starWeight = new Float64Array(starCount);
  const starSum = new Float64Array(starCount);
  const byStar: number[][] = Array.from({ length: starCount }, () => []);
  for (let i = 0; i < mag.length; i++) {
    starWeight[star[i]] += weightOf(i);
    starSum[star[i]] += weightOf(i) * mag[i];
    byStar[star[i]].push(i);
  }

  const matrix = Array.from({ length: frameCount }, () => new Float64Array(frameCount));
  const right = new Float64Array(frameCount);
  for (let s = 0; s < starCount; s++) {
    for (const i of byStar[s]) {
      const f = frame[i];
      matrix[f][f] += weightOf(i);
      right[f] += weightOf(i) * (mag[i] - starSum[s] / starWeight[s]);
      for (const j of byStar[s]) matrix[f][frame[j]] -= (weightOf(i) * weightOf(j)) / starWeight[s];
    }
  }
  const linked = framesLinkedToFirst(matrix);
  const unknown = linked.filter(f => f !== 0);
  const solved = solvePositiveDefinite(
    unknown.map(f => Float64Array.from(unknown, g => matrix[f][g])),
    Float64Array.from(unknown, f => right[f]),
  );
  const offset_mag = new Float64Array(frameCount).fill(Number.NaN);
  offset_mag[0] = 0;
  unknown.forEach((f, i) => {
    offset_mag[f] = solved[i];
  });

  const corrected = new Float64Array(starCount);
  for (let i = 0; i < mag.length; i++) corrected[star[i]] += weightOf(i) * (mag[i] - offset_mag[frame[i]]);
  return { offset_mag, star_mag: corrected.map((sum, s) => sum / starWeight[s]) };
}

/** Frames that share stars with frame 0, directly or through other frames. */
function framesLinkedToFirst(matrix: readonly Float64Array[]): number[] {
  const linked = new Set([0]);
  // A set visits what is added to it on the way.
  for (const f of linked) {
    for (let g = 0; g < matrix.length; g++) if (matrix[f][g] !== 0) linked.add(g);
  }
  return [...linked];
}

/** Cholesky decomposition; the frames that are linked to the reference make the matrix positive definite. */
function solvePositiveDefinite(matrix: readonly Float64Array[], right: Float64Array): Float64Array {
  const n = right.length;
  const lower = Array.from({ length: n }, () => new Float64Array(n));
  for (let i = 0; i < n; i++) {
    for (let j = 0; j <= i; j++) {
      let sum = matrix[i][j];
      for (let k = 0; k < j; k++) sum -= lower[i][k] * lower[j][k];
      lower[i][j] = i === j ? Math.sqrt(sum) : sum / lower[j][j];
    }
  }
  const solution = Float64Array.from(right);
  for (let i = 0; i < n; i++) {
    for (let k = 0; k < i; k++) solution[i] -= lower[i][k] * solution[k];
    solution[i] /= lower[i][i];
  }
  for (let i = n - 1; i >= 0; i--) {
    for (let k = i + 1; k < n; k++) solution[i] -= lower[k][i] * solution[k];
    solution[i] /= lower[i][i];
  }
  return solution;
}
