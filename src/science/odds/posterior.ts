import { BAND_COUNT, BANDS } from '../bands.js';
import type { ClassModel } from './model.js';
import { StarFit } from './star-fit.js';
import type { StarInputs } from './star-inputs.js';

/** What the model expects of one star in every band, seen from above the atmosphere. */
export interface PredictedMagnitudes {
  /** Laid out as BANDS; NaN where no likely node knows the band. */
  readonly mag: Float64Array;
  readonly sigma_mag: Float64Array;
}

/** Looks at single stars in detail, in buffers that are used again: meant for the stars on the screen. */
export class PosteriorReader {
  private readonly fit: StarFit;

  constructor(
    private readonly model: ClassModel,
    private readonly inputs: StarInputs,
  ) {
    this.fit = new StarFit(model, inputs);
  }

  /** Magnitudes of star i in every band. */
  predicted(i: number): PredictedMagnitudes {
    this.fit.fit(i);
    return predictMagnitudes(this.model, this.inputs, this.fit, i);
  }
}

/**
 * Magnitudes in every band from the posterior over nodes: each node predicts M_b + x + A_V a_b. A band that
 * was observed is quoted as observed, whose error is the smaller one.
 */
function predictMagnitudes(
  model: ClassModel,
  inputs: StarInputs,
  fit: StarFit,
  i: number,
): PredictedMagnitudes {
  const mag = new Float64Array(BAND_COUNT).fill(Number.NaN);
  const sigma_mag = new Float64Array(BAND_COUNT).fill(Number.NaN);
  for (let band = 0; band < BAND_COUNT; band++) {
    const observed = inputs.bands.indexOf(BANDS[band]);
    if (observed >= 0 && !Number.isNaN(inputs.mag[observed][i])) {
      mag[band] = inputs.mag[observed][i];
      sigma_mag[band] = Math.hypot(inputs.sigma_mag[observed][i], model.field.floor_mag);
      continue;
    }
    let weight = 0;
    let sum = 0;
    let sum2 = 0;
    for (let slot = 0; slot < fit.survivors; slot++) {
      const node = fit.node[slot];
      const absMag = model.absMag[band][node];
      if (Number.isNaN(absMag)) continue;
      const w = fit.weight[slot];
      const m = absMag + fit.offset_mag[slot] + fit.extinction_AV[slot] * model.extinctionRatio[band][node];
      weight += w;
      sum += w * m;
      sum2 += w * (m * m + model.nodes[node].bandScatter_mag ** 2);
    }
    if (weight < LEAST_WEIGHT) continue;
    mag[band] = sum / weight;
    sigma_mag[band] = Math.hypot(
      Math.sqrt(Math.max(0, sum2 / weight - mag[band] ** 2)),
      model.field.floor_mag,
    );
  }
  return { mag, sigma_mag };
}

/** A prediction needs nodes with at least this much of the weight behind it. */
const LEAST_WEIGHT = 0.05;
