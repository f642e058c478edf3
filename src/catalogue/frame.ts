import type { Band } from '../science/bands.js';
import type { SafeText } from './safe-text.js';

/** What one photometry file says of its exposure. NaN: the file does not say. */
export interface FrameFacts {
  /** Name of the file, for people. */
  readonly name: SafeText;
  /** Middle of the exposure, Unix time in ms; NaN for a plain catalogue without a time. */
  readonly mid_ms: number;
  readonly exposure_s: number;
  readonly fwhm_arcsec: number;
  /** Magnitude of 1 ADU/s (or whatever the pipeline calls its zero point): only changes matter. */
  readonly zeroPoint_mag: number;
  readonly sky_magPerArcsec2: number;
  readonly airmass: number;
  readonly object: SafeText;
}

/** Magnitudes of one band in a file; NaN where a star has none. */
export interface BandColumn {
  readonly band: Band;
  readonly mag: Float64Array;
  readonly sigma_mag: Float64Array;
}

/** The rows of one photometry file as columns, one array element a row, NaN where not given. */
export interface ReadingColumns {
  readonly rows: number;
  /** Empty strings where the file has no identifier column. */
  readonly ids: readonly SafeText[];
  /** Were the identifiers in the file (true) or are they all empty (false)? */
  readonly hasIds: boolean;
  readonly ra_deg: Float64Array;
  readonly dec_deg: Float64Array;
  readonly parallax_mas: Float64Array;
  readonly parallax_sigma_mas: Float64Array;
  readonly pmRa_masPerYear: Float64Array;
  readonly pmDec_masPerYear: Float64Array;
  /** E(B-V) per star where the file carries it. */
  readonly reddening_EBV: Float64Array;
  /** 1 where the file's own quality columns (saturated, blended, edge, flags) speak against the reading. */
  readonly suspect: Uint8Array;
  readonly bands: readonly BandColumn[];
}

/** The readable rows of a file, and what its header says. */
export interface FrameReadings extends ReadingColumns {
  readonly facts: FrameFacts;
}
