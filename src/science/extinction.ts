import extinctionText from '../tables/extinction.csv';
import gaiaText from '../tables/extinction_gaia.csv';
import { BAND_COUNT, BAND_INDEX, type Band } from './bands.js';
import { parseTable } from './table.js';

/**
 * Extinction per band as a fraction of A_V, for R_V = 3.1.
 *
 * UBVRI, JHKs, SDSS and Pan-STARRS: Schlafly & Finkbeiner 2011, ApJ 737, 103, Table 6, divided by its V.
 * Gaia G, BP, RP depend on the star's colour: Casagrande et al. 2021, MNRAS 507, 2684 (Fitzpatrick 1999 law
 * renormalised after Schlafly & Finkbeiner), divided by the same 2.742, so that both sets share one law.
 */
export class ExtinctionLaw {
  private readonly fixed = new Float64Array(BAND_COUNT).fill(Number.NaN);
  private readonly gaia = new Map<number, readonly number[]>();

  constructor() {
    for (const row of parseTable(extinctionText).rows) {
      this.fixed[BAND_INDEX[row.text('band') as Band]] = row.number('A_over_AV');
    }
    for (const row of parseTable(gaiaText).rows) {
      if (row.text('set') !== 'C21_F99' || row.text('photometry') !== 'EDR3') continue;
      const coefficients = ['c0', 'c1', 'c2', 'c3']
        .map(name => row.number(name))
        .filter(c => !Number.isNaN(c));
      this.gaia.set(BAND_INDEX[row.text('band') as Band], coefficients);
    }
  }

  /**
   * A_band / A_V. The Gaia relations were fitted for giants and dwarfs of -0.5 < BP-RP < 3: beyond, the value
   * at the edge holds; with an unknown colour, the value at BP-RP 0.8.
   */
  ratio(band: Band, intrinsicBpRp: number): number {
    const index = BAND_INDEX[band];
    const coefficients = this.gaia.get(index);
    if (coefficients === undefined) return this.fixed[index];
    const x = Number.isNaN(intrinsicBpRp) ? 0.8 : Math.max(-0.5, Math.min(3, intrinsicBpRp));
    return coefficients.reduceRight((sum, c) => sum * x + c, 0) / SF11_AV_PER_EBV;
  }
}

/** A_V for E(B-V) = 1 on the scale of the Schlegel et al. maps (Schlafly & Finkbeiner 2011). */
const SF11_AV_PER_EBV = 2.742;
