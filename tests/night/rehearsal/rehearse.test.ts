import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { parseProfile } from '../../../src/night/profile/parse.js';
import { kindsOf } from '../../../src/night/rehearsal/kinds.js';
import {
  errorsOfField,
  errorsToDepth,
  type MeasurementErrors,
} from '../../../src/night/rehearsal/measurement-errors.js';
import { type Rehearsal, rehearse } from '../../../src/night/rehearsal/rehearse.js';
import { buildModel } from '../../../src/science/odds/index.js';
import { BV_AXES, starInputs } from '../../support/star-inputs.js';

const profile = parseProfile(readFileSync('profiles/northern-80cm.toml', 'utf8'), 'northern-80cm.toml')
  .profile!;
const model = buildModel(profile.field, BV_AXES, ['B', 'V']);

function rehearsal(errors: MeasurementErrors, starsPerKind = 120, seed = 3): Rehearsal {
  const steps = rehearse({ profile, model, bands: ['B', 'V'], errors, starsPerKind, seed });
  for (;;) {
    const step = steps.next();
    if (step.done) return step.value;
  }
}

const flagOf = (result: Rehearsal, code: string) => result.flags.find(({ flag }) => flag === code)!;

describe('a rehearsal', () => {
  const deep = rehearsal(errorsToDepth(18));

  it('finds white dwarfs where the survey is good and loses them where it ends', () => {
    const { bins, purity, kind } = flagOf(deep, 'white-dwarf');
    expect(kind).toBe('white dwarf');
    const good = bins.filter(({ from_mag, drawn }) => from_mag < 17 && drawn > 0);
    expect(good.length).toBeGreaterThan(1);
    for (const bin of good) expect(bin.completeness).toBeGreaterThan(0.9);
    expect(bins.at(-1)?.completeness).toBeLessThan(0.3);
    expect(purity).toBeGreaterThan(0.8);
  });

  it('says who imitates whom: white dwarfs with companions are taken for white dwarfs', () => {
    expect(flagOf(deep, 'white-dwarf').imitators[0].kind).toBe('white dwarf with a cool dwarf');
  });

  it('keeps every share between 0 and 1, and the bins in step with the edges', () => {
    expect(deep.edges_mag).toEqual([13, 14, 15, 16, 17, 18, 19]);
    for (const { completeness, purity, bins } of deep.flags) {
      expect(bins.map(({ from_mag }) => from_mag)).toEqual(deep.edges_mag.slice(0, -1));
      for (const share of [completeness, purity, ...bins.flatMap(bin => [bin.completeness, bin.purity])]) {
        if (share === null) continue;
        expect(share).toBeGreaterThanOrEqual(0);
        expect(share).toBeLessThanOrEqual(1);
      }
    }
  });

  it('gives the same for the same seed, and less for a shallower survey', () => {
    expect(rehearsal(errorsToDepth(18))).toEqual(deep);
    const shallow = rehearsal({ ...errorsToDepth(15), depth_mag: 18 });
    expect(flagOf(shallow, 'white-dwarf').completeness).toBeLessThan(
      flagOf(deep, 'white-dwarf').completeness as number,
    );
  });

  it('without parallaxes raises no class flag at all', () => {
    const blind = rehearsal({ ...errorsToDepth(18), parallaxSigma_mas: () => Number.NaN });
    expect(blind.flags.every(({ completeness }) => (completeness ?? 0) === 0)).toBe(true);
  });
});

describe('the kinds that are drawn', () => {
  it('share the nodes of a class without overlap: dwarfs, pairs and ultracool dwarfs', () => {
    const kinds = kindsOf(model);
    const ofDwarfs = ['dwarf', 'equal pair of cool dwarfs', 'ultracool dwarf'].flatMap(
      name => kinds.find(kind => kind.name === name)?.sources ?? [],
    );
    const keys = ofDwarfs.map(({ node, brighter_mag }) => `${node} ${brighter_mag}`);
    expect(new Set(keys).size).toBe(keys.length);
    const total = ofDwarfs.reduce((sum, source) => sum + source.fieldDensity, 0);
    const ofModel = model.nodes.reduce(
      (sum, node, k) => sum + (node.track === 'dwarfs' ? model.fieldDensity[k] : 0),
      0,
    );
    expect(total).toBeCloseTo(ofModel, 10);
  });

  it('have blue stragglers in clusters only', () => {
    expect(kindsOf(model).some(({ flag }) => flag === 'blue-straggler')).toBe(false);
    const cluster = {
      ...profile.field,
      modulus_mag: 9.4,
      memberShare: 0.5,
      age_Gyr: 0.5,
      population: 'disc-cluster' as const,
    };
    const kinds = kindsOf(buildModel(cluster, BV_AXES, ['B', 'V']));
    expect(kinds.some(({ flag }) => flag === 'blue-straggler')).toBe(true);
  });
});

describe('errors', () => {
  it('to a depth: S/N 10 there, and Gaia parallaxes as published for G 17', () => {
    const errors = errorsToDepth(18);
    expect(errors.sigma_mag('V', 18)).toBeCloseTo(0.1087, 3);
    expect(errors.sigma_mag('V', 10)).toBeCloseTo(0.005, 3);
    expect(errors.parallaxSigma_mas(17)).toBeCloseTo(0.07, 6);
  });

  it('of a real field: the medians of its stars, the nearest beyond them', () => {
    const stars = [12.1, 12.2, 12.3, 16.1, 16.2].map(v => ({
      mags: { B: v + 0.6, V: v },
      sigma_mag: v < 14 ? 0.01 : 0.05,
      parallax_mas: 2,
      parallaxSigma_mas: 0.1,
    }));
    const errors = errorsOfField(starInputs(stars, ['B', 'V']), 'V', 'field.csv');
    expect(errors.sigma_mag('V', 12.25)).toBe(0.01);
    expect(errors.sigma_mag('V', 19)).toBe(0.05);
    expect(errors.sigma_mag('J', 12)).toBeNaN();
    expect(errors.parallaxSigma_mas(12)).toBe(0.1);
    expect(errors.words).toBe('errors of 5 stars of field.csv');
  });
});
