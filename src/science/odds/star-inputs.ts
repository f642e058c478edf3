import type { Band } from '../bands.js';

/** Stars to be classified, as columns; NaN where something was not measured. */
export interface StarInputs {
  readonly count: number;
  readonly bands: readonly Band[];
  /** One array per band: apparent magnitude and its standard error. */
  readonly mag: readonly Float64Array[];
  readonly sigma_mag: readonly Float64Array[];
  readonly parallax_mas: Float64Array;
  readonly parallaxSigma_mas: Float64Array;
  readonly pmRa_masPerYear: Float64Array;
  readonly pmDec_masPerYear: Float64Array;
  /** E(B-V) of the star itself, where the table carries one. */
  readonly reddening_EBV: Float64Array;
}
