import type { StarCatalogue } from '../catalogue/stars.js';
import type { Band } from '../science/bands.js';
import { solveEnsemble } from '../science/variability/ensemble.js';

/** What a frame lost against the others of its band, by the stars they share. */
export interface FrameOffset {
  readonly offset_mag: number;
  readonly sigma_mag: number;
}

/** So many stars settle a frame to a millimagnitude; more would only cost time. */
const ENSEMBLE_STARS = 300;
/** A star that is on few frames links few. */
const LEAST_READINGS = 3;
/** Bright stars' errors are never quite what they say: a few must not decide. */
const FLOOR_MAG = 0.003;

/** Offsets of the frames of one band, by frame; empty where too few stars are shared. */
export function frameOffsets(catalogue: StarCatalogue, band: Band): ReadonlyMap<number, FrameOffset> {
  const stars = ensembleStars(catalogue, band);
  const places = new Map<number, number>();
  const frame: number[] = [];
  const star: number[] = [];
  const mag: number[] = [];
  const sigma_mag: number[] = [];
  stars.forEach((index, place) => {
    const curve = catalogue.lightCurve(index, band);
    for (let i = 0; i < curve.mag.length; i++) {
      if (curve.suspect[i] === 1) continue;
      if (!places.has(curve.frame[i])) places.set(curve.frame[i], places.size);
      frame.push(places.get(curve.frame[i]) as number);
      star.push(place);
      mag.push(curve.mag[i]);
      sigma_mag.push(Math.hypot(curve.sigma_mag[i], FLOOR_MAG));
    }
  });
  const solution = solveEnsemble({ frame, star, mag, sigma_mag }, places.size, stars.length);
  return new Map(
    [...places].map(([index, place]) => [
      index,
      { offset_mag: solution.offset_mag[place], sigma_mag: solution.offsetSigma_mag[place] },
    ]),
  );
}

/** The stars with the most readings, the better measured first. */
function ensembleStars(catalogue: StarCatalogue, band: Band): number[] {
  const counts = catalogue.readingsIn(band);
  const sigmas = catalogue.sigma(band);
  return [...counts.keys()]
    .filter(star => counts[star] >= LEAST_READINGS)
    .sort((a, b) => counts[b] - counts[a] || sigmas[a] - sigmas[b])
    .slice(0, ENSEMBLE_STARS);
}
