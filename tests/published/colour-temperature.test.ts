import { describe, expect, it } from 'vitest';
import { teffFromBpRp_K } from '../../src/science/colour-temperature/casagrande-2021.js';
import { bolometricCorrection_V, teffFromBV_K } from '../../src/science/colour-temperature/flower-1996.js';
import { teffFromBpRpMucciarelli_K } from '../../src/science/colour-temperature/mucciarelli-2021.js';
import { ExtinctionLaw } from '../../src/science/extinction.js';
import { parseTable } from '../../src/science/table.js';
import dwarfsText from '../../src/tables/dwarfs.csv';

describe('Casagrande et al. 2021, MNRAS 507, 2684', () => {
  it('HD 122563: 4678 K from BP-RP 1.2188, E(B-V) 0.003, log g 1.40, [Fe/H] -2.75 (its worked star)', () => {
    const law = new ExtinctionLaw();
    // Its coefficients are per E(B-V) on the scale of the maps, A_V = 2.742 E(B-V).
    const reddening = 0.003 * 2.742 * (law.ratio('BP', 1.2188) - law.ratio('RP', 1.2188));
    expect(Math.abs(teffFromBpRp_K(1.2188 - reddening, 1.4, -2.75) - 4678)).toBeLessThan(1);
  });

  it('the Sun: 5768 K at BP-RP 0.818, log g 4.44', () => {
    expect(Math.abs(teffFromBpRp_K(0.818, 4.44, 0) - 5768)).toBeLessThan(1);
  });

  it('is not known outside the colours it was made for', () => {
    expect(teffFromBpRp_K(0.19, 4.4, 0)).toBeNaN();
    expect(teffFromBpRp_K(2.1, 4.4, 0)).toBeNaN();
    expect(teffFromBpRp_K(2.1, 2.5, 0)).toBeGreaterThan(3500);
  });
});

describe('Mucciarelli, Bellazzini & Massari 2021, A&A 653, A90', () => {
  it('dwarf of BP-RP 0.82: 5684 K, giant of 1.2: 4774 K (from the published coefficients)', () => {
    expect(Math.abs(teffFromBpRpMucciarelli_K(0.82, 0, 'dwarfs') - 5684)).toBeLessThan(1);
    expect(Math.abs(teffFromBpRpMucciarelli_K(1.2, 0, 'giants') - 4774)).toBeLessThan(1);
    expect(teffFromBpRpMucciarelli_K(0.3, 0, 'dwarfs')).toBeNaN();
  });
});

describe('Flower 1996 in the form of Torres 2010, AJ 140, 1158', () => {
  it('B-V 0.65: 5718 K; BC at 5770 K: -0.081', () => {
    expect(Math.abs(teffFromBV_K(0.65, 'V, IV, III') - 5718)).toBeLessThan(1);
    expect(bolometricCorrection_V(5770)).toBeCloseTo(-0.081, 3);
    expect(teffFromBV_K(1.9, 'V, IV, III')).toBeNaN();
  });

  it('corrections of the dwarf table (Pecaut & Mamajek 2013) agree within 0.12 mag from 4000 K to 30,000 K', () => {
    const rows = parseTable(dwarfsText).rows.filter(
      row => row.number('Teff') > 4000 && row.number('Teff') < 30_000 && !Number.isNaN(row.number('BC_V')),
    );
    expect(rows.length).toBeGreaterThan(40);
    for (const row of rows) {
      const difference = bolometricCorrection_V(row.number('Teff')) - row.number('BC_V');
      expect(Math.abs(difference), row.text('SpT')).toBeLessThan(0.12);
    }
  });
});

describe('the dwarf table against the colour relations', () => {
  it('Teff of FGK dwarfs within 130 K of Casagrande 2021 at their BP-RP', () => {
    const rows = parseTable(dwarfsText).rows.filter(
      row => row.number('BP_RP') > 0.4 && row.number('BP_RP') < 1.5,
    );
    expect(rows.length).toBeGreaterThan(25);
    for (const row of rows) {
      const difference = teffFromBpRp_K(row.number('BP_RP'), 4.45, 0) - row.number('Teff');
      expect(Math.abs(difference), row.text('SpT')).toBeLessThan(130);
    }
  });
});
