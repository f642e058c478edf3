import { describe, expect, it } from 'vitest';
import { ExtinctionLaw } from '../../src/science/extinction.js';
import { MainSequenceLifetime } from '../../src/science/main-sequence-lifetime.js';
import { subtypeNumber, subtypeText } from '../../src/science/spectral-subtype.js';
import { parseTable } from '../../src/science/table.js';
import { readTracks } from '../../src/science/tracks/index.js';
import { subdwarfOffset_mag } from '../../src/science/tracks/subdwarfs.js';
import { magnitude } from '../../src/science/tracks/track.js';
import { applyTransform, findTransform, readTransforms } from '../../src/science/transforms.js';
import dwarfsText from '../../src/tables/dwarfs.csv';
import extinctionText from '../../src/tables/extinction.csv';
import giantsText from '../../src/tables/giants.csv';
import supergiantsText from '../../src/tables/supergiants.csv';
import whiteDwarfsText from '../../src/tables/white_dwarfs.csv';

const tracks = readTracks();
const dwarfs = tracks.find(track => track.name === 'dwarfs')!;

function dwarf(type: string) {
  return dwarfs.points.find(point => point.subtype === subtypeNumber(type))!;
}

describe('the dwarf table, Pecaut & Mamajek 2013 (extended 2024.05.15)', () => {
  it('holds 112 types, with the published values of a few', () => {
    const rows = parseTable(dwarfsText).rows;
    expect(rows.length).toBe(112);
    const g2 = rows.find(row => row.text('SpT') === 'G2V')!;
    expect([g2.number('Teff'), g2.number('M_V'), g2.number('B_V'), g2.number('BP_RP')]).toEqual([
      5770, 4.8, 0.65, 0.823,
    ]);
    const a0 = rows.find(row => row.text('SpT') === 'A0V')!;
    expect([a0.number('Teff'), a0.number('M_V'), a0.number('B_V')]).toEqual([9700, 0.99, 0]);
  });

  it('is monotone: hotter is brighter and bluer', () => {
    const known = dwarfs.points.filter(point => !Number.isNaN(magnitude(point.absMag, 'V')));
    for (let i = 1; i < known.length; i++) {
      expect(known[i].teff_K).toBeLessThan(known[i - 1].teff_K);
      expect(magnitude(known[i].absMag, 'V')).toBeGreaterThan(magnitude(known[i - 1].absMag, 'V'));
    }
    const colours = known
      .map(point => magnitude(point.absMag, 'B') - magnitude(point.absMag, 'V'))
      .filter(colour => !Number.isNaN(colour));
    for (let i = 1; i < colours.length; i++) expect(colours[i]).toBeGreaterThan(colours[i - 1] - 1e-9);
  });
});

describe('the other tables', () => {
  it('have the rows their heads announce', () => {
    expect(parseTable(giantsText).rows.length).toBe(41);
    expect(parseTable(supergiantsText).rows.length).toBe(105);
    expect(parseTable(whiteDwarfsText).rows.length).toBe(63);
  });

  it('white dwarfs cool along the sequence: fainter as they cool (Montreal models)', () => {
    for (const track of tracks.filter(t => t.starClass === 'WD')) {
      for (let i = 1; i < track.points.length; i++) {
        expect(magnitude(track.points[i].absMag, 'V')).toBeLessThan(
          magnitude(track.points[i - 1].absMag, 'V'),
        );
        expect(track.points[i].teff_K).toBeGreaterThan(track.points[i - 1].teff_K);
      }
    }
  });

  it('giants at K0 stand at M_V +0.7, B-V 1.00 (Cox 2000; Schmidt-Kaler 1982)', () => {
    const k0 = tracks.find(t => t.name === 'giants')!.points.find(point => point.subtype === 50)!;
    expect(magnitude(k0.absMag, 'V')).toBeCloseTo(0.7, 6);
    expect(magnitude(k0.absMag, 'B') - magnitude(k0.absMag, 'V')).toBeCloseTo(1.0, 6);
  });
});

describe('bands filled by transformation', () => {
  it('BP-RP of a G2 dwarf by V-Ic (Riello et al. 2021) is within its stated 0.05 of the dwarf table', () => {
    const relation = findTransform(readTransforms(), 'BP-RP', 'V-Ic', 'Riello');
    expect(applyTransform(relation, 0.713)).toBeGreaterThan(0.823 - relation.sigma_mag);
    expect(applyTransform(relation, 0.713)).toBeLessThan(0.823 + relation.sigma_mag);
  });

  it('says "not known" outside the published range', () => {
    const relation = findTransform(readTransforms(), 'G-V', 'V-Ic', 'Riello');
    expect(applyTransform(relation, 5.1)).toBeNaN();
    expect(applyTransform(relation, -0.5)).toBeNaN();
    expect(applyTransform(relation, 0)).toBeCloseTo(-0.01597, 8);
  });

  it('solar-type dwarfs: SDSS g-r 0.46 (table), Pan-STARRS g-r a little smaller (Tonry et al. 2012)', () => {
    const g2 = dwarf('G2V');
    expect(magnitude(g2.absMag, 'g') - magnitude(g2.absMag, 'r')).toBeCloseTo(0.46, 6);
    const ps1 = magnitude(g2.absMag, 'gP1') - magnitude(g2.absMag, 'rP1');
    // g-gP1 - (r-rP1) = 0.014 + 0.141 x + 0.012 x^2 at x = gP1-rP1.
    expect(0.46 - ps1).toBeCloseTo(0.014 + 0.141 * ps1 + 0.012 * ps1 ** 2, 5);
  });
});

describe('extinction', () => {
  const law = new ExtinctionLaw();
  it('SDSS and Johnson ratios are the published coefficients over 2.742 (Schlafly & Finkbeiner 2011)', () => {
    for (const row of parseTable(extinctionText).rows) {
      const published = row.number('SF11_A_over_EBV_SFD');
      if (Number.isNaN(published)) continue;
      expect(law.ratio(row.text('band') as 'V', Number.NaN)).toBeCloseTo(published / 2.742, 2);
    }
  });

  it('Gaia at BP-RP 0.8: G 2.26, BP 2.81, RP 1.64 per E(B-V) (Casagrande et al. 2021, F99 law)', () => {
    expect(law.ratio('G', 0.8) * 2.742).toBeCloseTo(2.26, 2);
    expect(law.ratio('BP', 0.8) * 2.742).toBeCloseTo(2.81, 2);
    expect(law.ratio('RP', 0.8) * 2.742).toBeCloseTo(1.64, 2);
  });
});

describe('metal-poor offsets', () => {
  it('0.51, 0.93, 1.26, 1.50 mag at [Fe/H] -0.5, -1, -1.5, -2 (Ivezic et al. 2008, eq. A2)', () => {
    expect([-0.5, -1, -1.5, -2].map(feh => Number(subdwarfOffset_mag(feh).toFixed(2)))).toEqual([
      0.51, 0.93, 1.26, 1.5,
    ]);
    expect(subdwarfOffset_mag(-3)).toBeNaN();
  });
});

describe('facts of the trade', () => {
  it('the class letters run O B A F G K M from hot to cool', () => {
    const hottest = [...'OBAFGKM'].map(letter =>
      Math.max(
        ...dwarfs.points.filter(point => subtypeText(point.subtype)[0] === letter).map(point => point.teff_K),
      ),
    );
    expect(hottest).toEqual([...hottest].sort((a, b) => b - a));
  });

  it('the Sun lives about 10 Gyr and a 100-Myr cluster turns off among the B stars (textbook)', () => {
    const lifetimes = new MainSequenceLifetime();
    expect(lifetimes.lifetime_Gyr(4.8)).toBeGreaterThan(8);
    expect(lifetimes.lifetime_Gyr(4.8)).toBeLessThan(12);
    const turnOff = lifetimes.turnOff_absMagV(0.1);
    expect(turnOff).toBeGreaterThan(magnitude(dwarf('B3V').absMag, 'V'));
    expect(turnOff).toBeLessThan(magnitude(dwarf('A0V').absMag, 'V'));
  });
});
