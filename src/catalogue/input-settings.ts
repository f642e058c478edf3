import type { Band } from '../science/bands.js';

/** How files are read at this site. */
export interface InputSettings {
  /** Column meaning -> the name this pipeline uses, e.g. { 'mag.V': 'VMAG_CAL' }. */
  readonly columns: Readonly<Record<string, string>>;
  /** Band of files that carry a plain 'mag' column and do not name their band. */
  readonly band: Band | undefined;
  readonly matchRadius_arcsec: number;
  readonly missing: readonly string[];
}
