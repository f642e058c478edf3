import type { ReadingColumns } from '../frame.js';

/** A file's rows on the way to readings: whole columns, and which rows are still wanted. */
export interface Draft extends ReadingColumns {
  /** 0 for rows that have to go. */
  readonly kept: Uint8Array;
  /** Line of each row in the file. */
  readonly lines: Uint32Array;
}

/** Tells rows of the same star apart from others: by identifier, else by position to 0.04 arcsec. */
export function starKey(draft: Draft, row: number): string {
  if (draft.hasIds && draft.ids[row] !== '') return draft.ids[row];
  return `${draft.ra_deg[row].toFixed(5)} ${draft.dec_deg[row].toFixed(5)}`;
}
