import { BAND_COUNT, BAND_INDEX, BANDS, type Band } from '../bands.js';
import { CLASSES, type StarClass } from '../classes.js';
import { floorOf } from './field.js';
import type { ClassModel } from './model.js';
import { StarFit } from './star-fit.js';
import type { StarInputs } from './star-inputs.js';

/** What the model expects of one star in every band, seen from above the atmosphere. */
export interface PredictedMagnitudes {
  /** Laid out as BANDS; NaN where no likely node knows the band. */
  readonly mag: Float64Array;
  readonly sigma_mag: Float64Array;
}

/** The best node of one class for one star: what it would have the star be, and how far off that is. */
export interface ClassEvidence {
  readonly starClass: StarClass;
  readonly odds: number;
  readonly subtype: number;
  readonly teff_K: number;
  readonly modulus_mag: number;
  readonly extinction_AV: number;
  /** Observed minus predicted in each band, in units of its error and the class's colour scatter together. */
  readonly misfits: readonly { readonly band: Band; readonly sigma: number }[];
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

  /** The evidence behind the odds of star i, best class first; classes without a node that could be are left out. */
  evidence(i: number): readonly ClassEvidence[] {
    this.fit.fit(i);
    const best = new Map<number, number>();
    for (let slot = 0; slot < this.fit.survivors; slot++) {
      const c = this.model.classIndex[this.fit.node[slot]];
      const known = best.get(c);
      if (known === undefined || this.fit.weight[slot] > this.fit.weight[known]) best.set(c, slot);
    }
    return [...best].map(([c, slot]) => this.evidenceOf(i, c, slot)).sort((a, b) => b.odds - a.odds);
  }

  private evidenceOf(i: number, c: number, slot: number): ClassEvidence {
    const { fit, model, inputs } = this;
    const node = fit.node[slot];
    const { subtype, teff_K, bandScatter_mag } = model.nodes[node];
    const misfits = inputs.bands.flatMap((band, b) => {
      const index = BAND_INDEX[band];
      const predicted =
        model.absMag[index][node] +
        fit.offset_mag[slot] +
        fit.extinction_AV[slot] * model.extinctionRatio[index][node];
      const error = Math.hypot(inputs.sigma_mag[b][i], floorOf(model.field, band), bandScatter_mag[index]);
      const sigma = (inputs.mag[b][i] - predicted) / error;
      return Number.isNaN(sigma) ? [] : [{ band, sigma }];
    });
    return {
      starClass: CLASSES[c],
      odds: fit.classOdds[c],
      subtype,
      teff_K,
      modulus_mag: fit.modulus_mag[slot],
      extinction_AV: fit.extinction_AV[slot],
      misfits,
    };
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
      sigma_mag[band] = Math.hypot(inputs.sigma_mag[observed][i], floorOf(model.field, BANDS[band]));
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
      sum2 += w * (m * m + model.nodes[node].bandScatter_mag[band] ** 2);
    }
    if (weight < LEAST_WEIGHT) continue;
    mag[band] = sum / weight;
    sigma_mag[band] = Math.hypot(
      Math.sqrt(Math.max(0, sum2 / weight - mag[band] ** 2)),
      floorOf(model.field, BANDS[band]),
    );
  }
  return { mag, sigma_mag };
}

/** A prediction needs nodes with at least this much of the weight behind it. */
const LEAST_WEIGHT = 0.05;
