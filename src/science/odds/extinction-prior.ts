import { slabExtinction_AV } from '../dust-slab.js';
import type { FieldPrior } from './field.js';

/**
 * What is known of a star's A_V before its colours speak: the same for the whole field, or growing with distance
 * where the profile describes the dust.
 *
 * A node tells how far away the star would be, m - M = mu + A_V(mu), and so how much dust lies before it: the table
 * inverts that once for the field, so that a node costs a look-up.
 */
export class ExtinctionPrior {
  /** True where the extinction follows the distance. */
  readonly growsWithDistance: boolean;
  /** Largest A_V any distance can bring. */
  readonly most_AV: number;
  private readonly byApparentModulus = new Float64Array(COUNT);

  constructor(private readonly field: FieldPrior) {
    const { dust } = field;
    this.growsWithDistance = dust !== undefined;
    if (dust === undefined) {
      this.most_AV = field.extinction_AV;
      return;
    }
    for (let i = 0; i < COUNT; i++) this.byApparentModulus[i] = this.solve(NEAREST_MAG + i * STEP_MAG);
    this.most_AV = this.byApparentModulus[COUNT - 1];
  }

  /** Mean A_V at a true distance modulus. */
  atModulus(modulus_mag: number): number {
    const { dust, extinction_AV } = this.field;
    return dust === undefined ? extinction_AV : slabExtinction_AV(dust, 10 ** (modulus_mag / 5 + 1));
  }

  /** Mean A_V where m - M, extinction included, is this; nil where that is not known, as for the nearest and faintest. */
  atApparentModulus(apparentModulus_mag: number): number {
    if (!this.growsWithDistance) return this.field.extinction_AV;
    const position = (apparentModulus_mag - NEAREST_MAG) / STEP_MAG;
    if (!(position > 0)) return 0;
    const i = Math.min(COUNT - 2, Math.floor(position));
    const share = Math.min(1, position - i);
    return this.byApparentModulus[i] + share * (this.byApparentModulus[i + 1] - this.byApparentModulus[i]);
  }

  /** Variance about a mean A_V: from star to star in the field, and from the clumpiness of the dust. */
  variance(mean_AV: number): number {
    const { dust, extinctionSigma_AV } = this.field;
    return extinctionSigma_AV ** 2 + (dust === undefined ? 0 : (dust.patchiness * mean_AV) ** 2);
  }

  /** mu + A_V(mu) rises, so halving finds the one root. */
  private solve(apparentModulus_mag: number): number {
    let low = NEAREST_MAG - 1;
    let high = apparentModulus_mag;
    for (let step = 0; step < HALVINGS; step++) {
      const middle = (low + high) / 2;
      if (middle + this.atModulus(middle) < apparentModulus_mag) low = middle;
      else high = middle;
    }
    return this.atModulus((low + high) / 2);
  }
}

/** Table from 10^-0.4 of ten parsecs to far beyond the Galaxy. */
const NEAREST_MAG = -4;
const STEP_MAG = 0.1;
const COUNT = 400;
const HALVINGS = 40;
