import { describe, expect, it } from 'vitest';
import { CLASS_INDEX } from '../../src/science/classes.js';
import { parseTable } from '../../src/science/table.js';
import dwarfsText from '../../src/tables/dwarfs.csv';
import whiteDwarfsText from '../../src/tables/white_dwarfs.csv';
import { classifyAll, GAIA_AXES } from '../support/star-inputs.js';

/**
 * Gentile Fusillo et al. 2019, MNRAS 482, 4570: the four inequalities in BP-RP and M_G that select white
 * dwarfs from Gaia. As stored in src/tables/loci.csv.
 */
function passesCuts(x: number, absG: number): boolean {
  return (
    absG > 5 && absG > 5.93 + 5.047 * x && absG > 6 * x ** 3 - 21.77 * x ** 2 + 27.91 * x + 0.897 && x < 1.7
  );
}

/** A star of the given place at 50 pc, with an excellent parallax. */
function gaiaStar(absG: number, bpRp: number, gRp: number) {
  const modulus = 5 * Math.log10(50) - 5;
  const g = absG + modulus;
  return { mags: { G: g, RP: g - gRp, BP: g - gRp + bpRp }, parallax_mas: 20, parallaxSigma_mas: 0.05 };
}

const BANDS = ['G', 'BP', 'RP'] as const;

describe('white-dwarf odds against the cuts of Gentile Fusillo et al. 2019', () => {
  it('every model white dwarf passes the cuts and has odds above one half', () => {
    const rows = parseTable(whiteDwarfsText).rows;
    const stars = rows.map(row => gaiaStar(row.number('M_G'), row.number('BP_RP'), row.number('G_RP')));
    const classified = classifyAll(stars, BANDS, GAIA_AXES);
    expect(rows.length).toBe(63);
    rows.forEach((row, i) => {
      const name = `${row.text('type')} ${row.text('Teff')} K: ${classified[i].text}`;
      expect(passesCuts(row.number('BP_RP'), row.number('M_G')), name).toBe(true);
      expect(classified[i].odds.WD, name).toBeGreaterThan(0.5);
    });
  });

  it('no dwarf of the table passes the cuts, and none has white-dwarf odds above 1 %', () => {
    const rows = parseTable(dwarfsText).rows.filter(
      row => !Number.isNaN(row.number('M_G') + row.number('BP_RP')),
    );
    const stars = rows.map(row => gaiaStar(row.number('M_G'), row.number('BP_RP'), row.number('G_RP')));
    const classified = classifyAll(stars, BANDS, GAIA_AXES);
    expect(rows.length).toBeGreaterThan(60);
    rows.forEach((row, i) => {
      expect(passesCuts(row.number('BP_RP'), row.number('M_G')), row.text('SpT')).toBe(false);
      expect(classified[i].odds.WD, row.text('SpT')).toBeLessThan(0.01);
    });
  });

  it('knows its own class index', () => expect(CLASS_INDEX.WD).toBe(7));
});
