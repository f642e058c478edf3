import { BANDS, type Band } from '../../science/bands.js';
import type { StarInputs } from '../../science/odds/index.js';
import { median } from '../../science/statistics.js';

/** How well a survey measures a star of a magnitude. NaN: not at all. */
export interface MeasurementErrors {
  readonly sigma_mag: (band: Band, mag: number) => number;
  readonly parallaxSigma_mas: (mag: number) => number;
  /** Magnitude of the last stars worth having, in the band of the diagram. */
  readonly depth_mag: number;
  /** For people: where the errors come from. */
  readonly words: string;
}

/** Even the brightest star is no better than this. */
const BEST_MAG = 0.005;
/** Error at a signal-to-noise ratio of 10. */
const SNR_TEN_MAG = 0.1086;

/**
 * Parallax errors of Gaia DR3 by magnitude: 0.02-0.03 mas to G 15, 0.07 at 17, 0.5 at 20, 1.3 at 21 (Gaia Collaboration,
 * Vallenari et al. 2023, A&A 674, A1; from memory).
 */
const GAIA_PARALLAX: readonly (readonly [number, number])[] = [
  [15, 0.025],
  [17, 0.07],
  [20, 0.5],
  [21, 1.3],
];

/** A survey limited by the sky, with S/N 10 at `depth_mag` in every band, and Gaia's parallaxes. */
export function errorsToDepth(depth_mag: number): MeasurementErrors {
  return {
    sigma_mag: (_, mag) => Math.hypot(BEST_MAG, SNR_TEN_MAG * 10 ** (0.4 * (mag - depth_mag))),
    parallaxSigma_mas: gaiaParallaxSigma_mas,
    depth_mag,
    words: `S/N 10 at ${depth_mag.toFixed(1)} mag in every band, parallaxes as good as those of Gaia DR3`,
  };
}

function gaiaParallaxSigma_mas(mag: number): number {
  if (mag <= GAIA_PARALLAX[0][0]) return GAIA_PARALLAX[0][1];
  const i = Math.max(
    1,
    GAIA_PARALLAX.findIndex(([limit]) => limit > mag),
  );
  const [m0, e0] = GAIA_PARALLAX[i - 1];
  const [m1, e1] = GAIA_PARALLAX[i];
  return e0 * (e1 / e0) ** ((mag - m0) / (m1 - m0));
}

const BIN_MAG = 0.5;

/** The errors that stars of a real field have: medians in half-magnitude bins; the nearest bin beyond their ends. */
export function errorsOfField(inputs: StarInputs, diagramBand: Band, name: string): MeasurementErrors {
  const b = inputs.bands.indexOf(diagramBand);
  const curves = new Map(
    inputs.bands.map((band, i) => [band, medians(inputs.mag[i], inputs.sigma_mag[i])] as const),
  );
  const parallax = medians(inputs.mag[b], inputs.parallaxSigma_mas);
  const mags = [...inputs.mag[b]].filter(mag => !Number.isNaN(mag)).sort((x, y) => x - y);
  return {
    sigma_mag: (band, mag) => nearest(curves.get(band), mag),
    parallaxSigma_mas: mag => nearest(parallax, mag),
    depth_mag: mags[Math.floor(0.95 * (mags.length - 1))],
    words: `errors of ${mags.length} stars of ${name}${parallax.size === 0 ? ', no parallaxes' : ''}`,
  };
}

function medians(mag: Float64Array, sigma: Float64Array): ReadonlyMap<number, number> {
  const bins = new Map<number, number[]>();
  for (let i = 0; i < mag.length; i++) {
    if (Number.isNaN(mag[i] + sigma[i])) continue;
    const bin = Math.floor(mag[i] / BIN_MAG);
    const members = bins.get(bin);
    if (members === undefined) bins.set(bin, [sigma[i]]);
    else members.push(sigma[i]);
  }
  return new Map([...bins].map(([bin, members]) => [bin, median(members)]));
}

function nearest(bins: ReadonlyMap<number, number> | undefined, mag: number): number {
  const wanted = Math.floor(mag / BIN_MAG);
  let best = Number.NaN;
  let apart = Number.POSITIVE_INFINITY;
  for (const [bin, sigma] of bins ?? []) {
    if (Math.abs(bin - wanted) >= apart) continue;
    apart = Math.abs(bin - wanted);
    best = sigma;
  }
  return best;
}

/** The bands of a diagram that a survey's errors are known in. */
export function bandsOf(errors: MeasurementErrors, candidates: readonly Band[]): readonly Band[] {
  return BANDS.filter(
    band => candidates.includes(band) && !Number.isNaN(errors.sigma_mag(band, errors.depth_mag)),
  );
}
