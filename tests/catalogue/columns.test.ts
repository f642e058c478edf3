import { describe, expect, it } from 'vitest';
import { COLOURS, isMeaning } from '../../src/catalogue/columns/meanings.js';
import { NameIndex } from '../../src/catalogue/columns/name-index.js';
import { BAND_STEMS, PLAIN_NAMES } from '../../src/catalogue/columns/names.js';
import { Recogniser } from '../../src/catalogue/columns/recogniser.js';
import { plainUnit, splitNameAndUnit, unitFactor } from '../../src/catalogue/columns/units.js';
import { BandNames } from '../../src/catalogue/readings/band-name.js';
import { safeText } from '../../src/catalogue/safe-text.js';
import { BANDS } from '../../src/science/bands.js';
import { codes, frameOf, INPUT, magsOf, read, sigmasOf } from './input.js';

const names = new NameIndex();

describe('column names', () => {
  it.each([
    ['RAJ2000', 'ra'],
    ['_DEJ2000', 'dec'],
    ['RA_ICRS', 'ra'],
    ['ra_deg', 'ra'],
    ['Plx', 'parallax'],
    ['parallax_mas', 'parallax'],
    ['e_Plx', 'parallax_error'],
    ['pmRA', 'pmra'],
    ['pmDE', 'pmdec'],
    ['E(B-V)', 'ebv'],
    ['Vmag', 'mag.V'],
    ['VMAG', 'mag.V'],
    ['e_Vmag', 'mag_error.V'],
    ['B-V', 'colour.B-V'],
    ['e_B-V', 'colour_error.B-V'],
    ['phot_g_mean_mag', 'mag.G'],
    ['phot_bp_mean_flux_over_error', 'flux_over_error.BP'],
    ['bp_rp', 'colour.BP-RP'],
    ['g_rp', 'colour.G-RP'],
    ['G-RP', 'colour.G-RP'],
    ['Gmag', 'mag.G'],
    ['gmag', 'mag.g'],
    ["g'mag", 'mag.g'],
    ['Kmag', 'mag.Ks'],
    ['j_m', 'mag.J'],
    ['k_msigcom', 'mag_error.Ks'],
    ['psfMag_u', 'mag.u'],
    ['gMeanPSFMag', 'mag.gP1'],
    ['J-K', 'colour.J-Ks'],
  ])('%s is %s', (name, meaning) => {
    expect(names.read(name)).toMatchObject({ meanings: [meaning], doubtful: false });
  });

  it.each(['R', 'Rmag', 'I', 'mag_I', 'V-R', 'V-I'])('%s may be Johnson or Cousins', name => {
    expect(names.read(name).doubtful).toBe(true);
  });

  it.each(['GMAG', 'UMAG', 'G_RP'])('%s may be two things', name => {
    expect(names.read(name).meanings).toHaveLength(2);
  });

  it.each(['x', 'y', 'X_IMAGE', 'sky', 'chi', '__proto__', 'constructor', ''])('%j means nothing', name => {
    expect(names.read(name).meanings).toEqual([]);
  });

  it('are settled one way in the tables themselves', () => {
    for (const [meaning, list] of Object.entries(PLAIN_NAMES)) {
      for (const name of list) expect([name, names.read(name).meanings]).toEqual([name, [meaning]]);
    }
    for (const band of BANDS) {
      for (const stem of BAND_STEMS[band]) {
        if (stem === 'G_RP' || stem === 'y') continue;
        expect([stem, names.read(`${stem}mag`).meanings]).toEqual([stem, [`mag.${band}`]]);
        expect([stem, names.read(`e_${stem}mag`).meanings]).toEqual([stem, [`mag_error.${band}`]]);
      }
    }
  });

  it('of a profile are checked for their meaning', () => {
    for (const meaning of ['ra', 'mag.V', 'mag_error.gP1', 'colour.B-V', 'flux_over_error.G']) {
      expect(isMeaning(meaning)).toBe(true);
    }
    for (const text of ['', 'mag.R', 'mag.', 'RA', 'colour.V-B', 'toString'])
      expect(isMeaning(text)).toBe(false);
    for (const [blue, red] of COLOURS) expect(isMeaning(`colour.${blue}-${red}`)).toBe(true);
  });
});

describe('the profile', () => {
  const text = 'STAR,ALPHA_X,DELTA_X,VCAL,VCAL_ERR\ns1,10,20,12.5,0.02\n';
  const columns = { id: 'STAR', ra: 'ALPHA_X', dec: 'DELTA_X', 'mag.V': 'VCAL', 'mag_error.V': 'VCAL_ERR' };

  it('names columns that no rule knows', async () => {
    expect(codes(await read(text))).toContain('no-position');
    const frame = await frameOf(text, { columns });
    expect([frame.ra_deg[0], frame.dec_deg[0], frame.ids[0]]).toEqual([10, 20, 's1']);
    expect(magsOf(frame, 'V')).toEqual([12.5]);
    expect(sigmasOf(frame, 'V')).toEqual([0.02]);
  });

  it('settles what is doubtful, and what has two candidates', async () => {
    const doubtful = 'id,ra,dec,R,e_R\na,10,20,12.5,0.01\n';
    expect((await read(doubtful)).frame).toBeUndefined();
    const settled = await read(doubtful, { columns: { 'mag.Rc': 'R', 'mag_error.Rc': 'e_R' } });
    expect(settled.problems).toEqual([]);
    expect(settled.frame?.bands[0].band).toBe('Rc');
    const two = 'id,ra,dec,V,Vmag,e_V\na,10,20,12.5,13,0.01\n';
    expect(magsOf(await frameOf(two, { columns: { 'mag.V': 'Vmag' } }), 'V')).toEqual([13]);
  });

  it('says what a filter is called', async () => {
    const single = '# FILTER = R\nid,ra,dec,mag,mag_err\na,10,20,12.5,0.01\n';
    expect((await read(single, { columns: { 'mag.Rc': 'R' } })).frame?.bands[0].band).toBe('Rc');
    expect((await read(single, { band: 'Rc' })).frame?.bands[0].band).toBe('Rc');
    expect((await read(single, { band: 'V' })).frame).toBeUndefined();
  });

  it('gives the band of files that say none, and words and numbers that mean "missing"', async () => {
    const text = 'id,ra,dec,mag,mag_err\na,10,20,12.5,0.01\nb,11,20,none,0.01\nc,12,20,33.3,0.01\n';
    const frame = await frameOf(text, { band: 'B', missing: ['33.3'] });
    expect(frame.ids).toEqual(['a']);
    expect(magsOf(frame, 'B')).toEqual([12.5]);
  });
});

describe('descriptors', () => {
  const head = (name: string, ucd: string) => ({
    name: safeText(name),
    unit: safeText(''),
    ucd: safeText(ucd),
  });
  const recogniser = new Recogniser(INPUT);

  it('count before names for positions', () => {
    expect(recogniser.read(head('c1', 'pos.eq.ra;meta.main')).meanings).toEqual(['ra']);
    expect(recogniser.read(head('c2', 'stat.error;pos.parallax')).meanings).toEqual(['parallax_error']);
  });

  it('do not count for magnitudes, whose systems they do not tell apart', () => {
    expect(recogniser.read(head('BPmag', 'phot.mag;em.opt.B')).meanings).toEqual(['mag.BP']);
    expect(recogniser.read(head('c3', 'phot.mag;em.opt.R')).meanings).toEqual([]);
  });
});

describe('units', () => {
  it.each([
    ['mas.yr**-1', 'mas/yr'],
    ['mas yr-1', 'mas/yr'],
    ['"/yr', 'arcsec/yr'],
    ['Degrees', 'deg'],
    ['"h:m:s"', 'sexagesimal'],
  ])('%s is %s', (raw, plain) => expect(plainUnit(raw)).toBe(plain));

  it('convert where they can', () => {
    expect(unitFactor('hourangle', 'deg')).toBe(15);
    expect(unitFactor('rad', 'deg')).toBeCloseTo(57.29577951308232, 12);
    expect(unitFactor('arcsec', 'mas')).toBe(1000);
    expect(unitFactor('mmag', 'mag')).toBe(0.001);
    expect(unitFactor('', 'mas')).toBe(1);
    expect(unitFactor('kpc', 'mas')).toBeUndefined();
    expect(unitFactor('mag', 'deg')).toBeUndefined();
  });

  it('stand behind names', () => {
    expect(splitNameAndUnit('RA (deg)')).toEqual({ name: 'RA', unit: 'deg' });
    expect(splitNameAndUnit('E(B-V)')).toEqual({ name: 'E(B-V)', unit: '' });
    expect(splitNameAndUnit('(B-V)')).toEqual({ name: '(B-V)', unit: '' });
  });
});

describe('band names', () => {
  const bands = new BandNames(INPUT);

  it.each([
    ['V', 'V'],
    ['Johnson V', 'V'],
    ['V_Johnson', 'V'],
    ['Bessell R', 'Rc'],
    ['Cousins-I', 'Ic'],
    ['Rc', 'Rc'],
    ['SDSS g', 'g'],
    ['sdss_r', 'r'],
    ["i'", 'i'],
    ['g', 'g'],
    ['G', 'G'],
    ['Gaia BP', 'BP'],
    ['PS1 y', 'yP1'],
    ['2MASS K', 'Ks'],
    ['K', 'Ks'],
  ])('%s is %s', (name, band) => expect(bands.read(name).band).toBe(band));

  it.each(['R', 'I'])('%s may be Johnson or Cousins', name => {
    expect(bands.read(name)).toEqual({ band: undefined, maybe: `${name}c` });
  });

  it.each(['Halpha', 'clear', 'Johnson R', '', 'mag'])('%j is none', name => {
    expect(bands.read(name)).toEqual({ band: undefined, maybe: undefined });
  });

  it.each([
    ['M67_V_003.csv', 'V'],
    ['night1-Ic.12.txt', 'Ic'],
    ['g.csv', 'g'],
  ])('of the file %s: %s', async (name, band) => {
    const text = 'id,ra,dec,mag,mag_err\na,10,20,12.5,0.01\n';
    expect((await read(text, {}, name)).frame?.bands[0].band).toBe(band);
  });

  it('two in a file name are none', async () => {
    expect(codes(await read('id,ra,dec,mag,mag_err\na,10,20,12.5,0.01\n', {}, 'B_V_1.csv'))).toEqual([
      'no-band',
    ]);
  });
});
