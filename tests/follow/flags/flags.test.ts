import { describe, expect, it } from 'vitest';
import { DEFAULT_FLAGS, FLAG_CODES, raiseFlags, type StarEvidence } from '../../../src/follow/flags/index.js';
import { meritOf } from '../../../src/follow/merit.js';
import { CLASSES, type StarClass } from '../../../src/science/classes.js';

const odds = (given: Partial<Record<StarClass, number>>) =>
  Object.fromEntries(CLASSES.map(name => [name, given[name] ?? 0])) as Record<StarClass, number>;

const white: StarEvidence = {
  axes: { colour: { blue: 'B', red: 'V' }, band: 'V' },
  odds: odds({ WD: 0.99, V: 0.01 }),
  absMag: 11.3,
  absMagSigma: 0.06,
  colour: 0.05,
  colourSigma: 0.02,
  intrinsicColour: 0.05,
  dwarfAbsMag: 2.4,
  whiteDwarfAbsMag: 11.2,
  subtype: Number.NaN,
  subtypeSigma: Number.NaN,
  teff_K: 11_000,
  teffSigma_K: 500,
  logLuminosity: -2.6,
  properMotion_masPerYr: Number.NaN,
  fitModulus_mag: 4.6,
  fitModulusSigma_mag: 0.05,
  distance: 'parallax',
  parallax_mas: 12.1,
  parallaxSigma_mas: 0.3,
  modulus_mag: Number.NaN,
  memberOdds: 0,
  turnOffAbsMag: Number.NaN,
  readings: 4,
  suspectReadings: 0,
  changes: { bands: [], paired: undefined },
  starsSearched: 1000,
};

const codes = (evidence: StarEvidence) => raiseFlags(evidence, DEFAULT_FLAGS).flags.map(flag => flag.code);

describe('flags', () => {
  it('says why, with the numbers in it', () => {
    const { flags, cautions } = raiseFlags(white, DEFAULT_FLAGS);
    expect(flags).toEqual([
      {
        code: 'white-dwarf',
        odds: 0.99,
        because:
          'M_V +11.3 at B-V 0.05 lies 8.9 mag below the dwarfs; white dwarf odds 0.99; parallax 12.1 ± 0.3 mas',
      },
    ]);
    expect(cautions).toEqual([]);
  });

  it('every default setting belongs to a flag and every flag has one', () => {
    expect(Object.keys(DEFAULT_FLAGS).sort()).toEqual([...FLAG_CODES].sort());
  });

  it.each([
    ['white-dwarf', { WD: 1 }],
    ['hot-subdwarf', { sdOB: 1 }],
    ['supergiant', { Ib: 0.4, Iab: 0.3, Ia: 0.3 }],
    ['bright-giant', { II: 1 }],
    ['subdwarf', { sd: 1 }],
  ] as const)('%s is raised at its threshold and not below it', (code, full) => {
    const { threshold } = DEFAULT_FLAGS[code];
    const scaled = (share: number): StarEvidence => ({
      ...white,
      odds: odds({
        ...Object.fromEntries(Object.entries(full).map(([name, value]) => [name, value * share])),
        V: 1 - share,
      }),
    });
    expect(codes(scaled(threshold + 0.01))).toContain(code);
    expect(codes(scaled(threshold - 0.01))).not.toContain(code);
  });

  it('fits-none and between-sequences share the flat class by where the star lies', () => {
    const lost = { ...white, odds: odds({ none: 0.9, V: 0.1 }) };
    const between = { ...lost, absMag: 8, intrinsicColour: 0.4, dwarfAbsMag: 3.2, whiteDwarfAbsMag: 13.2 };
    expect(codes(between)).toEqual(['between-sequences']);
    expect(codes({ ...between, absMag: 5.1 })).toEqual(['fits-none']);
    expect(codes({ ...between, absMag: 12.3 })).toEqual(['fits-none']);
  });

  it('above-main-sequence: an equal pair of K dwarfs, not a single one, and not among stars that age', () => {
    const pair = {
      ...white,
      odds: odds({ V: 1 }),
      colour: 1.0,
      intrinsicColour: 1.0,
      dwarfAbsMag: 6.6,
      absMag: 5.85,
      colourSigma: 0.005,
    };
    expect(codes(pair)).toContain('above-main-sequence');
    expect(codes({ ...pair, absMag: 6.4 })).toEqual([]);
    expect(codes({ ...pair, dwarfAbsMag: 4.5, absMag: 3.75 })).toEqual([]);
  });

  it('blue-straggler: a member on the main sequence above the turn-off', () => {
    const straggler = {
      ...white,
      odds: odds({ V: 1 }),
      absMag: -0.5,
      turnOffAbsMag: 0.8,
      memberOdds: 0.95,
      distance: 'cluster' as const,
      modulus_mag: 9.4,
    };
    expect(codes(straggler)).toContain('blue-straggler');
    expect(codes({ ...straggler, absMag: 0.7 })).toEqual([]);
    expect(codes({ ...straggler, memberOdds: 0.3 })).toEqual([]);
  });

  it('ultracool: M7 and later', () => {
    const late = { ...white, odds: odds({ V: 1 }), subtype: 68, subtypeSigma: 0.5 };
    expect(codes(late)).toEqual(['ultracool']);
    expect(codes({ ...late, subtype: 65 })).toEqual([]);
  });

  const change = {
    band: 'V' as const,
    readings: 18,
    scatterChance: 1e-12,
    orderChance: 0.3,
    interquartileRange_mag: 0.2,
    reducedChi2: 9,
    range_mag: 0.5,
    change_mag: 0.45,
    changeSigma_mag: 0.03,
    from_ms: Date.UTC(2026, 10, 8, 19, 10),
    to_ms: Date.UTC(2026, 10, 8, 23, 40),
  };
  const dwarf = { ...white, odds: odds({ V: 1 }) };
  const restless = (...bands: (typeof change)[]): StarEvidence => ({
    ...dwarf,
    changes: { bands, paired: undefined },
  });

  it('faded and brightened carry the sign, and take the place of variable', () => {
    expect(codes(restless(change))).toEqual(['faded']);
    expect(codes(restless({ ...change, change_mag: -0.45 }))).toEqual(['brightened']);
    expect(codes(restless({ ...change, change_mag: 0.02 }))).toEqual(['variable']);
    const { flags } = raiseFlags(restless(change), DEFAULT_FLAGS);
    expect(flags[0].because).toBe(
      '0.45 ± 0.03 mag fainter in V than at 19:10 UT (15 sigma, 18 readings to 23:40 UT)',
    );
  });

  it('chance alone, among many stars, raises nothing', () => {
    const luck = { ...change, change_mag: 0.12, changeSigma_mag: 0.03, scatterChance: 1e-5 };
    expect(codes(restless(luck))).toEqual([]);
  });

  it('variable: order in time and both bands together can carry what scatter alone does not', () => {
    const slight = { ...change, change_mag: 0.02, scatterChance: 1e-4, orderChance: 0.5 };
    const paired = { bands: ['V', 'B'] as const, pairs: 12, stetsonJ: 2.4, chance: 1e-12 };
    expect(codes(restless(slight))).toEqual([]);
    expect(codes(restless({ ...slight, orderChance: 1e-8 }))).toEqual(['variable']);
    const { flags } = raiseFlags({ ...dwarf, changes: { bands: [slight], paired } }, DEFAULT_FLAGS);
    expect(flags[0].because).toBe(
      'V ranges over 0.50 mag in 18 readings (middle half 0.20), reduced chi-square 9.0, V and B together by J 2.40 of 12 pairs; chance of that below 1e-9',
    );
    expect(codes(restless({ ...change, change_mag: 0.02, range_mag: 0.09 }))).toEqual([]);
  });

  it('colour-changed: one band fades more than the other', () => {
    const inB = { ...change, band: 'B' as const, change_mag: 0.7, changeSigma_mag: 0.02 };
    const inV = { ...change, change_mag: 0.45, changeSigma_mag: 0.02 };
    const evidence = restless(inV as typeof change, inB as unknown as typeof change);
    expect(codes(evidence)).toEqual(['faded', 'colour-changed']);
    const { flags } = raiseFlags(evidence, DEFAULT_FLAGS);
    expect(flags[1].because).toBe('B-V 0.25 ± 0.03 mag redder than at 19:10 UT (9 sigma)');
    const alike = { ...inB, change_mag: 0.5 } as unknown as typeof change;
    expect(codes(restless(inV as typeof change, alike))).toEqual(['faded']);
  });
});

describe('motion and pulsation', () => {
  const dwarf = { ...white, odds: odds({ V: 1 }) };

  it('high-velocity: above 200 km/s across the sky, whatever the colour', () => {
    // 4.74 km/s for 1 arcsec/yr at 1 pc: at 83 pc 600 mas/yr are 236 km/s.
    const fast = { ...dwarf, properMotion_masPerYr: 600 };
    expect(codes(fast)).toEqual(['high-velocity']);
    expect(codes({ ...fast, colour: Number.NaN })).toEqual(['high-velocity']);
    expect(codes({ ...fast, properMotion_masPerYr: 490 })).toEqual([]);
    expect(codes({ ...fast, distance: 'none' })).toEqual([]);
    expect(raiseFlags(fast, DEFAULT_FLAGS).flags[0].because).toMatch(
      /^600 mas\/yr at 83 pc are 237 km\/s across the sky; odds 1\.00 of more than 200 km\/s/,
    );
  });

  it('instability-strip: a luminous star between the edges; a faint one only when it is restless', () => {
    const cepheid = {
      ...dwarf,
      odds: odds({ II: 0.5, V: 0.5 }),
      logLuminosity: 3.5,
      teff_K: 5700,
      teffSigma_K: 100,
    };
    expect(codes(cepheid)).toEqual(['instability-strip']);
    // Edges at log L 3.5: 5100 and 6210 K (loci.csv).
    expect(codes({ ...cepheid, teff_K: 6500 })).toEqual([]);
    expect(codes({ ...cepheid, teff_K: 4900 })).toEqual([]);
    const aStar = { ...dwarf, logLuminosity: 1.2, teff_K: 7500, teffSigma_K: 150 };
    expect(codes(aStar)).toEqual([]);
    const hint = {
      band: 'V' as const,
      readings: 12,
      scatterChance: 1e-4,
      orderChance: 0.5,
      reducedChi2: 3,
      range_mag: 0.05,
      interquartileRange_mag: 0.02,
      change_mag: 0.01,
      changeSigma_mag: 0.01,
      from_ms: 0,
      to_ms: 1,
    };
    expect(codes({ ...aStar, changes: { bands: [hint], paired: undefined } })).toEqual(['instability-strip']);
    const calm = { ...hint, scatterChance: 0.005 };
    expect(codes({ ...aStar, changes: { bands: [calm], paired: undefined } })).toEqual([]);
  });
});

describe('cautions', () => {
  it('a weak parallax holds a white dwarf back and says what would settle it', () => {
    const { flags, cautions } = raiseFlags({ ...white, parallax_mas: 0.7 }, DEFAULT_FLAGS);
    expect(flags).toEqual([]);
    expect(cautions.at(-1)).toMatch(
      /^perhaps white dwarf \(odds 0\.99\), but its parallax is only 2\.3 sigma/,
    );
  });

  it('a supergiant is allowed its small parallax', () => {
    expect(
      codes({
        ...white,
        odds: odds({ Ib: 0.9, II: 0.1 }),
        absMag: -5,
        parallax_mas: 0.05,
        parallaxSigma_mas: 0.04,
      }),
    ).toEqual(['supergiant']);
  });

  it.each([
    ['every reading marked', { suspectReadings: 4 }, /every reading is marked/],
    ['no colour', { colour: Number.NaN }, /no B-V yet/],
    ['a poor colour', { colourSigma: 0.3 }, /uncertain by 0.30 mag/],
    ['no distance', { distance: 'none' as const }, /no parallax and no cluster/],
  ])('%s holds class flags back', (_, fault, wording) => {
    const { flags, cautions } = raiseFlags({ ...white, ...fault }, DEFAULT_FLAGS);
    expect(flags).toEqual([]);
    expect(cautions.join('\n')).toMatch(wording);
  });
});

describe('merit', () => {
  it('is the largest weight x odds', () => {
    const { flags } = raiseFlags(white, DEFAULT_FLAGS);
    expect(meritOf(flags, DEFAULT_FLAGS)).toBeCloseTo(9.9, 6);
    expect(meritOf([], DEFAULT_FLAGS)).toBe(0);
  });
});
