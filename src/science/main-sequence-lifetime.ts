import dwarfsText from '../tables/dwarfs.csv';
import { parseTable } from './table.js';

/** Solar lifetime on the main sequence, Gyr (common practice). */
const SOLAR_LIFETIME_GYR = 10;

/**
 * How long a dwarf stays on the main sequence: 10 Gyr x M/L (common practice: fuel over consumption), with
 * mass and luminosity of the dwarf table (Pecaut & Mamajek 2013). Good to a factor of about 1.5, which is
 * 0.3 mag at the turn-off.
 */
export class MainSequenceLifetime {
  /** M_V and lifetime of each tabulated type, from bright to faint. */
  private readonly entries: readonly { readonly absMagV: number; readonly lifetime_Gyr: number }[];

  constructor() {
    this.entries = parseTable(dwarfsText)
      .rows.map(row => ({
        absMagV: row.number('M_V'),
        lifetime_Gyr: (SOLAR_LIFETIME_GYR * row.number('M_sun')) / 10 ** row.number('logL'),
      }))
      .filter(entry => !Number.isNaN(entry.absMagV) && !Number.isNaN(entry.lifetime_Gyr));
  }

  /** Lifetime of a dwarf of this absolute magnitude, Gyr; the table's ends hold beyond them. */
  lifetime_Gyr(absMagV: number): number {
    const entries = this.entries;
    if (absMagV <= entries[0].absMagV) return entries[0].lifetime_Gyr;
    const i = entries.findIndex(entry => entry.absMagV > absMagV);
    if (i < 0) return entries[entries.length - 1].lifetime_Gyr;
    const from = entries[i - 1];
    const to = entries[i];
    const share = (absMagV - from.absMagV) / (to.absMagV - from.absMagV);
    return from.lifetime_Gyr * (to.lifetime_Gyr / from.lifetime_Gyr) ** share;
  }

  /** M_V at which the main sequence of a cluster of this age ends; NaN for an unknown age. */
  turnOff_absMagV(age_Gyr: number): number {
    if (Number.isNaN(age_Gyr)) return Number.NaN;
    const entries = this.entries;
    const i = entries.findIndex(entry => entry.lifetime_Gyr > age_Gyr);
    if (i < 0) return entries[entries.length - 1].absMagV;
    if (i === 0) return entries[0].absMagV;
    const from = entries[i - 1];
    const to = entries[i];
    const share = Math.log(age_Gyr / from.lifetime_Gyr) / Math.log(to.lifetime_Gyr / from.lifetime_Gyr);
    return from.absMagV + share * (to.absMagV - from.absMagV);
  }
}
