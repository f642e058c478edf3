import { describe, expect, it } from 'vitest';
import { BAND_INDEX, type Band } from '../../src/science/bands.js';
import { logLuminosity, stellarRadius } from '../../src/science/luminosity.js';
import { parseTable } from '../../src/science/table.js';
import { readTracks } from '../../src/science/tracks/index.js';
import dwarfsText from '../../src/tables/dwarfs.csv';
import lociText from '../../src/tables/loci.csv';
import whiteDwarfsText from '../../src/tables/white_dwarfs.csv';
import { BV_AXES, classifyAll, GAIA_AXES } from '../support/star-inputs.js';

const radius = (logL: number, teff_K: number) =>
  stellarRadius({ logLuminosity: logL, logLuminositySigma: 0, teff_K, teffSigma_K: 0 }).radius_Rsun;

describe('luminosity and radius', () => {
  it('the Sun: M_bol 4.74 is one Sun (IAU 2015 B2), and with 5772 K one solar radius (B3)', () => {
    expect(logLuminosity(4.74)).toBeCloseTo(0, 12);
    expect(radius(0, 5772)).toBe(1);
  });

  it('dwarfs: M_V + BC gives the table log L to 0.06, and its radius to 10 % (Pecaut & Mamajek 2013)', () => {
    // The table is off itself by so much at a few types (G8, K3, M1): its head names them.
    const rows = parseTable(dwarfsText).rows.filter(
      row => row.number('Teff') > 3000 && !Number.isNaN(row.number('M_V') + row.number('BC_V')),
    );
    expect(rows.length).toBeGreaterThan(70);
    for (const row of rows) {
      const logL = logLuminosity(row.number('M_V') + row.number('BC_V'));
      expect(Math.abs(logL - row.number('logL')), row.text('SpT')).toBeLessThan(0.06);
      const published = row.number('R_sun');
      if (Number.isNaN(published)) continue;
      expect(Math.abs(radius(logL, row.number('Teff')) / published - 1), row.text('SpT')).toBeLessThan(0.1);
    }
  });

  it('white dwarfs of log g 8: R^2 = G M / g gives the same radius to 2 % (Montreal models, with their masses)', () => {
    const rows = parseTable(whiteDwarfsText).rows.filter(row => row.number('Teff') >= 5000);
    for (const row of rows) {
      // Solar surface gravity: log g 4.438.
      const fromGravity = Math.sqrt(row.number('mass') / 10 ** (row.number('logg') - 4.438));
      const fromLight = radius(logLuminosity(row.number('M_V') + row.number('BC_V')), row.number('Teff'));
      expect(Math.abs(fromLight / fromGravity - 1), `${row.text('type')} ${row.text('Teff')}`).toBeLessThan(
        0.02,
      );
    }
  });

  it('a star like the Sun at 10 pc comes out with one Sun and one radius', () => {
    const [sun] = classifyAll(
      [{ mags: { B: 5.463, V: 4.81 }, parallax_mas: 100, parallaxSigma_mas: 0.5 }],
      ['B', 'V'],
      BV_AXES,
    );
    const { logLuminosity: logL, logLuminositySigma, teff_K, teffSigma_K } = sun.columns;
    expect(Math.abs(logL[0])).toBeLessThan(0.03);
    const size = stellarRadius({
      logLuminosity: logL[0],
      logLuminositySigma: logLuminositySigma[0],
      teff_K: teff_K[0],
      teffSigma_K: teffSigma_K[0],
    });
    expect(Math.abs(size.radius_Rsun - 1)).toBeLessThan(2 * size.sigma_Rsun);
    expect(size.sigma_Rsun).toBeLessThan(0.1);
  });
});

describe('the red clump', () => {
  const clump = (quantity: string) =>
    parseTable(lociText).rows.find(
      row => row.text('class') === 'red_clump' && row.text('quantity') === quantity,
    )!;
  const giants = readTracks().find(track => track.name === 'giants')!;

  it.each([
    ['M_Ks', 'Ks'],
    ['M_G', 'G'],
  ])(
    '%s of Hawkins et al. 2017 lies within 0.35 mag of the giants track between G8 and K1',
    (quantity, band) => {
      const published = clump(quantity).number('value');
      const track = giants.points
        .filter(point => point.subtype >= 48 && point.subtype <= 51)
        .map(point => point.absMag[BAND_INDEX[band as Band]])
        .filter(value => !Number.isNaN(value));
      expect(track.length).toBeGreaterThan(1);
      const middle = track.reduce((sum, value) => sum + value, 0) / track.length;
      expect(Math.abs(middle - published)).toBeLessThan(0.35);
    },
  );

  it('a clump star (M_G 0.44, BP-RP 1.25) is a giant of about G8-K2', () => {
    const [star] = classifyAll(
      [{ mags: { G: 10.44, BP: 11.03, RP: 9.78 }, parallax_mas: 1, parallaxSigma_mas: 0.02 }],
      ['G', 'BP', 'RP'],
      GAIA_AXES,
    );
    expect(star.best).toBe('III');
    expect(star.subtype).toBeGreaterThan(47);
    expect(star.subtype).toBeLessThan(53);
  });
});
