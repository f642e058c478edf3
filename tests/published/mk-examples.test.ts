import { describe, expect, it } from 'vitest';
import { CLASSES } from '../../src/science/classes.js';
import { subtypeNumber } from '../../src/science/spectral-subtype.js';
import { parseTable, type Row } from '../../src/science/table.js';
import { publishedSteps, step } from '../support/luminosity-groups.js';
import { BV_AXES, classifyAll, GAIA_AXES, type TestStar } from '../support/star-inputs.js';
import examplesText from './data/mk_examples.csv';

/**
 * Stars whose MK types are published (Astronomical Almanac list; van Leeuwen 2007; Gaia DR3; O'Brien et al.
 * 2024): sources row by row in data/mk_examples.csv.
 */
const rows = parseTable(examplesText).rows;
/**
 * The honest exceptions, each with its reason.
 *
 * Hot stars: beyond B2 the colour hardly changes (B-V -0.2 to -0.33 from B2 to O3) while M_V runs over four
 * magnitudes, so that two colours and a distance cannot separate a luminous B star from an earlier dwarf.
 */
const EXCEPTIONS: Readonly<Record<string, string>> = {
  'gamma Ori': 'B2 III at M_V -2.8 and B-V -0.22: the dwarf of the same colour is only 0.9 mag fainter',
  'alpha Dra':
    'A0 III at M_V -1.2 and B-V -0.05: the dwarf of that brightness is 0.06 mag bluer, and far commoner',
};

function toTestStar(row: Row): TestStar {
  const sun = row.text('name') === 'Sun';
  const v = sun ? row.number('M_V') : row.number('V');
  const av = row.number('A_V');
  const error = row.number('e_plx');
  const plx = sun ? 100 : row.number('plx_mas');
  return {
    mags: Number.isNaN(row.number('B_V')) ? { V: v } : { V: v, B: v + row.number('B_V') },
    parallax_mas: plx,
    parallaxSigma_mas: Number.isNaN(error) ? 0.01 * plx : error,
    ...(av > 0 ? { reddening_EBV: av / 3.1 } : {}),
  };
}

describe('published MK types from V, B-V and parallax', () => {
  const coloured = rows.filter(row => !Number.isNaN(row.number('B_V')));
  const classified = classifyAll(coloured.map(toTestStar), ['B', 'V'], BV_AXES);
  const byName = new Map(coloured.map((row, i) => [row.text('name'), classified[i]]));

  const normal = coloured.filter(row => publishedSteps(row.text('MK_type')).length > 0);
  it('covers most of the list', () => expect(normal.length).toBeGreaterThan(50));

  for (const row of normal) {
    const name = row.text('name');
    const type = row.text('MK_type');
    it(`${name}, ${type}`, () => {
      const star = byName.get(name)!;
      const off = Math.min(...publishedSteps(type).map(s => Math.abs(s - step(star.best))));
      if (name in EXCEPTIONS) expect(off).toBeGreaterThan(1);
      else expect(off, `came out as ${star.text}`).toBeLessThanOrEqual(1);
    });
  }

  it('subtypes of F to M dwarfs and G to K giants are within three', () => {
    for (const row of normal) {
      const published = subtypeNumber(row.text('MK_type'));
      const star = byName.get(row.text('name'))!;
      // Saturated B-V of late types says little: see the note on the colour.
      if (published < 30 || row.number('B_V') > 1.45 || row.text('name') in EXCEPTIONS) continue;
      if (!['V', 'IV', 'III'].includes(star.best)) continue;
      expect(Math.abs(star.subtype - published), `${row.text('name')}: ${star.text}`).toBeLessThanOrEqual(
        3.5,
      );
    }
  });

  it.each(['Sirius B', '40 Eri B', 'van Maanen 2'])('%s is a white dwarf', name => {
    expect(byName.get(name)!.odds.WD).toBeGreaterThan(0.97);
  });

  it.each(['HD 149382', 'BD+28 4211', 'Feige 110'])('%s is a hot subdwarf', name => {
    expect(byName.get(name)!.odds.sdOB).toBeGreaterThan(0.7);
  });

  it('the Sun, M_V 4.81 and B-V 0.653, is a G2 dwarf within one subtype', () => {
    const sun = byName.get('Sun')!;
    expect(sun.best).toBe('V');
    expect(sun.odds.V).toBeGreaterThan(0.95);
    expect(Math.abs(sun.subtype - 42)).toBeLessThanOrEqual(1);
    expect(Math.abs(sun.teff_K - 5772)).toBeLessThan(100);
  });
});

describe('without a colour the odds stay honest', () => {
  it('a white dwarf seen only in V is not called one with certainty, nor ruled out silently', () => {
    const stars = rows.filter(row => Number.isNaN(row.number('B_V')) && !Number.isNaN(row.number('plx_mas')));
    expect(stars.length).toBeGreaterThan(5);
    for (const star of classifyAll(stars.map(toTestStar), ['B', 'V'], BV_AXES)) {
      // By numbers alone an M dwarf is some fifty times likelier at this brightness.
      expect(star.odds.WD).toBeGreaterThan(0.002);
      expect(star.odds.WD).toBeLessThan(0.5);
    }
  });
});

describe('published stars in the Gaia bands', () => {
  it('the Sun at BP-RP 0.82, M_G 4.67 (Casagrande & VandenBerg 2018) is a G2 dwarf', () => {
    const [sun] = classifyAll(
      [{ mags: { G: 4.67, BP: 4.67 + 0.365, RP: 4.67 - 0.455 }, parallax_mas: 100, parallaxSigma_mas: 0.1 }],
      ['G', 'BP', 'RP'],
      GAIA_AXES,
    );
    expect(sun.best).toBe('V');
    expect(Math.abs(sun.subtype - 42)).toBeLessThanOrEqual(1.5);
  });
});

it('knows every class it is asked about', () => {
  expect(CLASSES).toContain('none');
});
