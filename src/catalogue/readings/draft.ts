import type { BandColumn } from '../frame.js';
import type { SafeText } from '../safe-text.js';

/** A file's rows on the way to readings: whole columns, and which rows are still wanted. */
export interface Draft {
  readonly rows: number;
  /** 0 for rows that have to go. */
  readonly kept: Uint8Array;
  readonly lines: Uint32Array;
  /** Empty where there is none. */
  readonly ids: readonly SafeText[];
  readonly hasIds: boolean;
  readonly ra_deg: Float64Array;
  readonly dec_deg: Float64Array;
  readonly parallax_mas: Float64Array;
  readonly parallax_sigma_mas: Float64Array;
  readonly pmRa_masPerYear: Float64Array;
  readonly pmDec_masPerYear: Float64Array;
  readonly reddening_EBV: Float64Array;
  readonly suspect: Uint8Array;
  readonly bands: readonly BandColumn[];
}

/** Tells rows of the same star apart from others: by identifier, else by position to 0.04 arcsec. */
export function starKey(draft: Draft, row: number): string {
  if (draft.hasIds && draft.ids[row] !== '') return draft.ids[row];
  return `${draft.ra_deg[row].toFixed(5)} ${draft.dec_deg[row].toFixed(5)}`;
}
