import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { CLASSES } from '../../../src/science/classes.js';
import { BV_AXES, classifyAll, OPEN_FIELD } from '../../support/star-inputs.js';

const star = (absMag: number, bv: number, more: object = {}) => ({
  mags: { V: absMag + 5, B: absMag + 5 + bv },
  parallax_mas: 10,
  parallaxSigma_mas: 0.1,
  ...more,
});

const CLUSTER = {
  ...OPEN_FIELD,
  population: 'disc-cluster' as const,
  modulus_mag: 9.4,
  modulusSigma_mag: 0.05,
  memberShare: 0.7,
  age_Gyr: 0.5,
};

describe('odds', () => {
  it('sum to 1 for any star, near or far, with or without parallax', () => {
    fc.assert(
      fc.property(
        fc.record({
          absMag: fc.double({ min: -9, max: 18, noNaN: true }),
          bv: fc.double({ min: -0.8, max: 2.5, noNaN: true }),
          parallax_mas: fc.constantFrom(10, 0.3, -0.5, Number.NaN),
          parallaxSigma_mas: fc.constantFrom(0.05, 0.5, 5),
          sigma_mag: fc.constantFrom(0.001, 0.02, 0.3),
        }),
        ({ absMag, bv, ...rest }) => {
          const [result] = classifyAll([star(absMag, bv, rest)], ['B', 'V'], BV_AXES);
          const sum = CLASSES.reduce((total, name) => total + result.odds[name], 0);
          expect(sum).toBeGreaterThan(0.9999);
          expect(sum).toBeLessThan(1.0001);
        },
      ),
      { numRuns: 60, seed: 17 },
    );
  });

  it('do not depend on the order of the stars or of the bands', () => {
    const stars = [star(4.8, 0.65), star(11.5, 0.05), star(0.7, 1.05)];
    const forward = classifyAll(stars, ['B', 'V'], BV_AXES);
    const backward = [...classifyAll([...stars].reverse(), ['V', 'B'], BV_AXES)].reverse();
    forward.forEach((result, i) => {
      for (const name of CLASSES) expect(backward[i].odds[name]).toBeCloseTo(result.odds[name], 6);
    });
  });

  it('flatten when all errors grow', () => {
    const [sharp, blunt] = classifyAll(
      [star(3, 0.9), star(3, 0.9, { sigma_mag: 0.2, parallaxSigma_mas: 3 })],
      ['B', 'V'],
      BV_AXES,
    );
    const largest = (odds: Readonly<Record<string, number>>) => Math.max(...Object.values(odds));
    expect(largest(blunt.odds)).toBeLessThan(largest(sharp.odds));
  });

  it('a consistent further band never makes the right class much less likely', () => {
    // A K0 giant: V-Ic 1.014 of the giants table.
    const [two] = classifyAll([star(0.7, 1.0)], ['B', 'V'], BV_AXES);
    const [three] = classifyAll(
      [{ ...star(0.7, 1.0), mags: { V: 5.7, B: 6.7, Ic: 5.7 - 1.014 } }],
      ['B', 'V', 'Ic'],
      BV_AXES,
    );
    expect(three.odds.III).toBeGreaterThan(two.odds.III - 0.05);
  });

  it('a star without any magnitude is not known, not guessed', () => {
    const [nothing] = classifyAll(
      [{ mags: {}, parallax_mas: 10, parallaxSigma_mas: 0.1 }],
      ['B', 'V'],
      BV_AXES,
    );
    expect(nothing.odds.V).toBeNaN();
    expect(nothing.text).toBe('not known');
  });

  it('a star far from every sequence fits no class', () => {
    const [odd] = classifyAll([star(9, 0.45)], ['B', 'V'], BV_AXES);
    expect(odd.best).toBe('none');
    expect(odd.odds.none).toBeGreaterThan(0.9);
  });
});

describe('distance', () => {
  it('a good parallax gives M = m + 5 + 5 log10(parallax) within its own error', () => {
    const [result] = classifyAll([star(4.8, 0.65)], ['B', 'V'], BV_AXES);
    expect(result.absMag).toBeCloseTo(4.8, 1);
  });

  it('a negative parallax is used, not cut: the star is far, so the red one is a giant', () => {
    const [far] = classifyAll(
      [{ mags: { V: 13, B: 14.05 }, parallax_mas: -0.05, parallaxSigma_mas: 0.1 }],
      ['B', 'V'],
      BV_AXES,
    );
    expect(far.odds.III).toBeGreaterThan(0.9);
  });

  it('the grid of weak parallaxes meets the closed form of good ones where they join (S/N 10)', () => {
    const of = (sigma: number) =>
      classifyAll([star(2.2, 0.95, { parallaxSigma_mas: sigma })], ['B', 'V'], BV_AXES)[0];
    const good = of(0.999);
    const weak = of(1.001);
    for (const name of CLASSES) expect(Math.abs(good.odds[name] - weak.odds[name])).toBeLessThan(0.06);
    expect(Math.abs(good.absMag - weak.absMag)).toBeLessThan(0.05);
  });

  it('cluster members without parallax take the modulus of the cluster', () => {
    const [member] = classifyAll([{ mags: { V: 9.4 + 4.8, B: 9.4 + 5.45 } }], ['B', 'V'], BV_AXES, CLUSTER);
    expect(member.columns.memberOdds[0]).toBeGreaterThan(0.6);
    expect(Math.abs(member.absMag - 4.8)).toBeLessThan(0.4);
  });

  it('a parallax that contradicts the cluster makes a non-member', () => {
    const [foreground] = classifyAll(
      [{ mags: { V: 16.4, B: 16.45 }, parallax_mas: 10, parallaxSigma_mas: 0.1 }],
      ['B', 'V'],
      BV_AXES,
      CLUSTER,
    );
    expect(foreground.columns.memberOdds[0]).toBeLessThan(0.01);
    expect(foreground.odds.WD).toBeGreaterThan(0.95);
  });
});

describe('membership', () => {
  const cluster = {
    ...CLUSTER,
    memberShare: 0.4,
    pmRa_masPerYear: 7.4,
    pmDec_masPerYear: -9.1,
    pmSigma_masPerYear: 0.4,
  };
  const moving = (pmRa_masPerYear: number, pmDec_masPerYear: number) => ({
    mags: { V: 9.4 + 4.8, B: 9.4 + 5.45 },
    parallax_mas: 1.32,
    parallaxSigma_mas: 0.03,
    pmRa_masPerYear,
    pmDec_masPerYear,
  });
  it('proper motion raises it and lowers it; without one it stays between', () => {
    const stars = [moving(7.5, -9.0), moving(Number.NaN, Number.NaN), moving(-3, 4)];
    const [along, unknown, against] = classifyAll(stars, ['B', 'V'], BV_AXES, cluster).map(
      (_, i, all) => all[0].columns.memberOdds[i],
    );
    expect(along).toBeGreaterThan(0.98);
    expect(against).toBeLessThan(0.001);
    expect(unknown).toBeGreaterThan(0.5);
    expect(unknown).toBeLessThan(along);
  });
});

describe('reddening', () => {
  it('moves colour and magnitude together: a reddened Sun with its E(B-V) known is a G2 dwarf again', () => {
    const av = 1.24;
    const [sun] = classifyAll([star(4.8 + av, 0.65 + 0.4, { reddening_EBV: av / 3.1 })], ['B', 'V'], BV_AXES);
    expect(sun.best).toBe('V');
    expect(Math.abs(sun.subtype - 42)).toBeLessThan(2.5);
    expect(Math.abs(sun.columns.extinction_AV[0] - av)).toBeLessThan(0.15);
  });

  const DUST = { extinction_AVPerKpc: 1.5, scaleHeight_pc: 120, latitude_deg: 5, patchiness: 0.3 };
  const dusty = { ...OPEN_FIELD, extinctionSigma_AV: 0.02, dust: DUST };

  it('grows with the distance where the profile describes the dust: a near star hardly sees it', () => {
    const near = star(11.5, 0.05, { parallax_mas: 10 });
    const far = {
      mags: { V: 4.8 + 10 + 1.07, B: 5.45 + 10 + 1.42 },
      parallax_mas: 1,
      parallaxSigma_mas: 0.02,
    };
    const [white, sun] = classifyAll([near, far], ['B', 'V'], BV_AXES, dusty);
    expect(white.best).toBe('WD');
    expect(white.columns.extinction_AV[0]).toBeLessThan(0.2);
    expect(Math.abs(sun.columns.extinction_AV[1] - 1.07)).toBeLessThan(0.25);
    expect(sun.columns.extinctionSigma_AV[1]).toBeGreaterThan(0.05);
    expect(Math.abs(sun.subtype - 42)).toBeLessThan(4);
  });

  it('without a parallax follows the distance each class needs: a giant would be far and red, a dwarf near', () => {
    const colours = { V: 13, B: 13 + 1.35 };
    const stars = [{ mags: colours }];
    const [clear] = classifyAll(stars, ['B', 'V'], BV_AXES, OPEN_FIELD);
    const [dim] = classifyAll(stars, ['B', 'V'], BV_AXES, dusty);
    // A dwarf of V 13 and B-V 1.35 is at 80 pc and clean, a giant at several kpc and reddened: its subtype is earlier.
    expect(dim.columns.extinction_AV[0]).toBeGreaterThan(clear.columns.extinction_AV[0] + 0.3);
    expect(dim.subtype).toBeLessThan(clear.subtype - 1);
  });
});

describe('a star without a distance', () => {
  const colourOnly = (pmRa_masPerYear: number) => ({
    mags: { V: 15, B: 15.1 },
    pmRa_masPerYear,
    pmDec_masPerYear: 0,
  });
  it('is probably near when it moves fast: a white dwarf rather than an A star', () => {
    const [unknown, slow, fast] = classifyAll(
      [colourOnly(Number.NaN), colourOnly(1), colourOnly(180)],
      ['B', 'V'],
      BV_AXES,
    );
    expect(fast.odds.WD).toBeGreaterThan(0.95);
    expect(slow.odds.WD).toBeLessThan(unknown.odds.WD);
    expect(fast.columns.modulus_mag[2]).toBeLessThan(slow.columns.modulus_mag[1] - 5);
  });
});

describe('photometric floors', () => {
  it('a band that the profile trusts less counts less', () => {
    const odd = { mags: { B: 10.46, V: 9.81, Ic: 9.3 }, parallax_mas: 10, parallaxSigma_mas: 0.1 };
    const bands = ['B', 'V', 'Ic'] as const;
    const [trusted] = classifyAll([odd], bands, BV_AXES);
    const [doubted] = classifyAll([odd], bands, BV_AXES, { ...OPEN_FIELD, bandFloor_mag: { Ic: 0.5 } });
    expect(trusted.odds.none).toBeGreaterThan(doubted.odds.none);
    expect(doubted.odds.V).toBeGreaterThan(0.9);
  });
});

describe('one more band', () => {
  it.each([
    ['G2 V', 'V', { B: 10.45, V: 9.8, Ic: 9.087, J: 8.656, Ks: 8.236 }, 10],
    ['K0 III', 'III', { B: 11.7, V: 10.7, Ic: 9.7 }, 1],
    ['DA 12000 K', 'WD', { B: 16.75, V: 16.67, Ic: 16.72 }, 10],
  ] as const)(
    'that agrees never makes the right class much less likely: %s',
    (_, right, mags, parallax_mas) => {
      const all = Object.keys(mags) as (keyof typeof mags)[];
      const by = (count: number) => {
        const bands = all.slice(0, count);
        const [result] = classifyAll(
          [
            {
              mags: Object.fromEntries(bands.map(band => [band, mags[band]])),
              parallax_mas,
              parallaxSigma_mas: 0.05 * parallax_mas,
            },
          ],
          bands,
          BV_AXES,
        );
        return result.odds[right];
      };
      let before = by(2);
      expect(before).toBeGreaterThan(0.5);
      for (let count = 3; count <= all.length; count++) {
        const now = by(count);
        expect(now).toBeGreaterThan(before - 0.05);
        before = now;
      }
    },
  );
});
