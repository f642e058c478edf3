import { describe, expect, it } from 'vitest';
import {
  chanceOfAny,
  chiSquareChance,
  gaussianUpperTail,
  interquartileRange,
  mean,
  quantile,
  sigmaFromMad,
} from '../../src/science/statistics.js';
import { parseTable, type Row } from '../../src/science/table.js';
import {
  excessVariance,
  peakToPeakSignificance,
  testConstancy,
} from '../../src/science/variability/chi-square.js';
import { solveEnsemble } from '../../src/science/variability/ensemble.js';
import type { Series } from '../../src/science/variability/series.js';
import {
  stetsonJOfPairs,
  stetsonJOfSingles,
  stetsonK,
  welchStetsonI,
} from '../../src/science/variability/stetson.js';
import { vonNeumannMoments, vonNeumannRatio } from '../../src/science/variability/von-neumann.js';
import { huberShift, medianShift } from '../../src/science/variability/zero-point-shift.js';
import checks from './data/checks_variability.csv';

/** checks_variability.csv: independent computations; von Neumann 1941, Stetson 1996, Huber 1964, Honeycutt 1992. */
const rows = parseTable(checks).rows;

/** What the program does not offer: the clipped mean stands in the file for contrast only. */
const FOR_CONTRAST = [
  '3-sigma-clipped weighted mean',
  '3-sigma-clipped weighted mean error',
  'stars kept by the clip',
];

/** Two standard deviations of our own smaller simulation are added to the file's tolerance. */
const DRAWS = 20_000;

function tuples(row: Row): number[][] {
  const text = row
    .text('inputs')
    .split(';')[0]
    .replace(/^[^=]*=/, '');
  return text.split('|').map(tuple => tuple.split(',').map(Number));
}

function series(row: Row, mag = 1): Series {
  const values = tuples(row);
  return { mag: values.map(tuple => tuple[mag]), sigma_mag: values.map(tuple => tuple[mag + 1]) };
}

function input(row: Row, key: string): number {
  const pairs = row
    .text('inputs')
    .split(';')
    .map(pair => pair.split('=') as [string, string]);
  return Number(new Map(pairs).get(key));
}

function shift(row: Row): number {
  const stars = tuples(row);
  const differences = stars.map(([mA, , mB]) => mB - mA);
  const sigmas = stars.map(([, eA, , eB]) => Math.hypot(eA, eB));
  const output = row.text('output');
  if (output === 'median shift') return medianShift(differences).shift_mag;
  if (output.startsWith('robust sigma')) return sigmaFromMad(differences);
  if (output.startsWith('standard error of median')) return medianShift(differences).sigma_mag;
  if (output === 'Huber c=1.345 shift') return huberShift(differences, sigmas).shift_mag;
  if (output.startsWith('Huber standard error')) return huberShift(differences, sigmas).sigma_mag;
  if (output.startsWith('plain mean')) return mean(differences);
  throw new Error(`no function for ${output}`);
}

function ensemble(row: Row): number {
  const readings = tuples(row);
  const column = (k: number) => readings.map(tuple => tuple[k]);
  const solution = solveEnsemble(
    { frame: column(0), star: column(1), mag: column(2), sigma_mag: column(3) },
    4,
    6,
  );
  const place = Number(row.text('output').split(' ').at(-1));
  return row.text('output').startsWith('offset') ? solution.offset_mag[place] : solution.star_mag[place];
}

function value(row: Row): number {
  switch (row.text('function')) {
    case 'weighted_mean':
      return testConstancy(series(row)).mean_mag;
    case 'weighted_mean_error':
      return testConstancy(series(row)).meanSigma_mag;
    case 'chi2':
      return testConstancy(series(row)).chi2;
    case 'reduced_chi2':
      return testConstancy(series(row)).reducedChi2;
    case 'p_value':
      return testConstancy(series(row)).chance;
    case 'von_neumann_eta':
      return vonNeumannRatio(series(row).mag);
    case 'IQR':
      return interquartileRange(series(row).mag);
    case 'sigma_from_MAD':
      return sigmaFromMad(series(row).mag);
    case 'stetson_K':
      return stetsonK(series(row));
    case 'excess_variance':
      return excessVariance(series(row));
    case 'peak_to_peak_significance':
      return peakToPeakSignificance(series(row));
    case 'welch_stetson_I':
      return welchStetsonI(series(row), series(row, 3));
    case 'stetson_J_pairs':
      return stetsonJOfPairs(series(row), series(row, 3));
    case 'stetson_J_single':
      return stetsonJOfSingles(series(row));
    case 'gauss_upper_tail':
      return gaussianUpperTail(input(row, 'z'));
    case 'trials':
      return chanceOfAny(input(row, 'p_single'), input(row, 'n_stars'));
    case 'von_neumann_moments': {
      const moments = vonNeumannMoments(input(row, 'n'));
      return row.text('output') === 'variance' ? moments.variance : moments.expectation;
    }
    case 'zero_point_shift':
      return shift(row);
    case 'honeycutt_lsq':
      return ensemble(row);
    default:
      throw new Error(`no function for ${row.text('function')}`);
  }
}

/** A small seeded generator (mulberry32) with Box-Muller: the test is the same on every machine. */
function gaussians(seed: number): () => number {
  let state = seed;
  const uniform = () => {
    state = (state + 0x6d2b79f5) | 0;
    let t = Math.imul(state ^ (state >>> 15), 1 | state);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 2 ** 32;
  };
  return () => Math.sqrt(-2 * Math.log(1 - uniform())) * Math.cos(2 * Math.PI * uniform());
}

const NULL_STATISTICS: Readonly<Record<string, (a: Series, b: Series) => number>> = {
  von_neumann_low_quantile: a => vonNeumannRatio(a.mag),
  stetson_J_single_high_quantile: a => stetsonJOfSingles(a),
  stetson_J_pairs_high_quantile: (a, b) => stetsonJOfPairs(a, b),
  welch_stetson_I_high_quantile: (a, b) => welchStetsonI(a, b),
};

function simulatedQuantile(row: Row): number {
  const n = input(row, 'n');
  const p = input(row, 'p');
  const statistic = NULL_STATISTICS[row.text('function')];
  const next = gaussians(1);
  const draw = (): Series => ({
    mag: Array.from({ length: n }, next),
    sigma_mag: new Array<number>(n).fill(1),
  });
  const values = Float64Array.from({ length: DRAWS }, () => statistic(draw(), draw()));
  return quantile(values, row.text('function').includes('low') ? p : 1 - p);
}

const exactRows = rows.filter(row => !/quantile|threshold/.test(row.text('function')));
const offered = exactRows.filter(row => !FOR_CONTRAST.includes(row.text('output')));

describe('variability and zero points against checks_variability.csv', () => {
  it('has all rows', () => expect(rows).toHaveLength(183));

  it.each(offered.map(row => [`${row.text('id')} ${row.text('output')}`, row] as const))('%s', (_, row) => {
    const expected = row.number('expected');
    const allowed =
      row.text('tol_kind') === 'rel' ? Math.abs(expected) * row.number('tol') : row.number('tol');
    expect(Math.abs(value(row) - expected)).toBeLessThanOrEqual(allowed);
  });

  const thresholds = rows.filter(row => row.text('function') === 'chi2_reduced_threshold');
  it.each(thresholds.map(row => [row.text('inputs'), row] as const))('chi-square threshold %s', (_, row) => {
    const dof = input(row, 'dof');
    const chance = chiSquareChance(row.number('expected') * dof, dof);
    // The threshold is given to 1e-6; the tail changes by that times dof/2 at most.
    expect(chance / input(row, 'false_alarm')).toBeCloseTo(1, 4);
  });

  // One false alarm in a hundred can be simulated here; the rarer quantiles need the 400,000 draws of the file.
  const simulated = rows.filter(row => /quantile/.test(row.text('function')) && input(row, 'p') === 0.01);
  it.each(simulated.map(row => [`${row.text('function')} ${row.text('inputs')}`, row] as const))(
    'null distribution: %s',
    (_, row) => {
      expect(Math.abs(simulatedQuantile(row) - row.number('expected'))).toBeLessThanOrEqual(
        row.number('tol') + 0.03,
      );
    },
  );
});
