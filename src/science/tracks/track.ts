import { BAND_COUNT, BAND_INDEX, type Band } from '../bands.js';
import type { StarClass } from '../classes.js';

/** One tabulated star of a mean sequence. NaN: the sources do not give it. */
export interface TrackPoint {
  /** Running subtype number, see spectral-subtype.ts; NaN for white dwarfs. */
  readonly subtype: number;
  readonly teff_K: number;
  readonly bolometricCorrection_V: number;
  /** Absolute magnitude in every band, laid out as BANDS. */
  readonly absMag: Float64Array;
}

/** A published mean sequence as a curve through the HR diagram. */
export interface Track {
  readonly name: string;
  readonly starClass: StarClass;
  readonly points: readonly TrackPoint[];
  /** Scatter of the transformation a band was filled by, laid out as BANDS; 0 where the source gives the band. */
  readonly fillSigma_mag: Float64Array;
}

/** Fills the bands a point lacks, and notes the scatter of what filled them. */
export type FillMissing = (absMag: Float64Array, fillSigma_mag: Float64Array) => void;

/** Absolute magnitudes by band, all unknown. */
export function unknownMagnitudes(): Float64Array {
  return new Float64Array(BAND_COUNT).fill(Number.NaN);
}

/** Sets a band unless it is already known: published values come before derived ones. */
export function fillBand(absMag: Float64Array, band: Band, value: number): void {
  const index = BAND_INDEX[band];
  if (Number.isNaN(absMag[index])) absMag[index] = value;
}

/** U, B, V, Rc and Ic from M_V and the colours a table gives, NaN where it does not. */
export function fillFromColours(
  absMag: Float64Array,
  v: number,
  colours: { readonly B_V: number; readonly U_B: number; readonly V_Rc: number; readonly V_Ic: number },
): void {
  const b = v + colours.B_V;
  fillBand(absMag, 'V', v);
  fillBand(absMag, 'B', b);
  fillBand(absMag, 'U', b + colours.U_B);
  fillBand(absMag, 'Rc', v - colours.V_Rc);
  fillBand(absMag, 'Ic', v - colours.V_Ic);
}

/** SDSS g and r that keep a table's own g-r, placed by V-g = -0.0038 - 0.5784 (g-r) of Lupton 2005 (transforms.csv). */
export function fillFromGr(absMag: Float64Array, v: number, gr: number): void {
  fillBand(absMag, 'g', v + 0.0038 + 0.5784 * gr);
  fillBand(absMag, 'r', magnitude(absMag, 'g') - gr);
}

export function magnitude(absMag: Float64Array, band: Band): number {
  return absMag[BAND_INDEX[band]];
}
