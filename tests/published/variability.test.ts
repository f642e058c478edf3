import { describe, expect, it } from 'vitest';
import { chiSquareChance, sigmaFromMad } from '../../src/science/statistics.js';
import { parseTable, type Row } from '../../src/science/table.js';
import { testConstancy } from '../../src/science/variability/chi-square.js';
import type { Series } from '../../src/science/variability/series.js';
import { huberShift, medianShift } from '../../src/science/variability/zero-point-shift.js';
import checks from './data/checks_variability.csv';

/** checks_variability.csv: independent computations; Huber 1964 for the zero points. */
const rows = parseTable(checks).rows;

/** Statistics of the file that the program does not use. */
const NOT_OURS =
  /^(IQR|excess_variance|gauss_upper_tail|honeycutt_lsq|peak_to_peak_significance|trials|(welch_)?stetson_\w+|von_neumann_\w+)$/;
/** Stand in the file for contrast only. */
const FOR_CONTRAST = [
  '3-sigma-clipped weighted mean',
  '3-sigma-clipped weighted mean error',
  'stars kept by the clip',
  'plain mean',
];

const isOurs = (row: Row) =>
  !NOT_OURS.test(row.text('function')) && !FOR_CONTRAST.some(words => row.text('output').startsWith(words));

function tuples(row: Row): number[][] {
  const text = row
    .text('inputs')
    .split(';')[0]
    .replace(/^[^=]*=/, '');
  return text.split('|').map(tuple => tuple.split(',').map(Number));
}

function series(row: Row): Series {
  const values = tuples(row);
  return { mag: values.map(([, mag]) => mag), sigma_mag: values.map(([, , sigma]) => sigma) };
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
  throw new Error(`no function for ${output}`);
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
    case 'sigma_from_MAD':
      return sigmaFromMad(series(row).mag);
    case 'zero_point_shift':
      return shift(row);
    default:
      throw new Error(`no function for ${row.text('function')}`);
  }
}

const thresholds = rows.filter(row => row.text('function') === 'chi2_reduced_threshold');
const exact = rows.filter(row => isOurs(row) && !thresholds.includes(row));

describe('variability and zero points against checks_variability.csv', () => {
  it('has all rows', () => expect(rows).toHaveLength(183));

  it.each(exact.map(row => [`${row.text('id')} ${row.text('output')}`, row] as const))('%s', (_, row) => {
    const expected = row.number('expected');
    const allowed =
      row.text('tol_kind') === 'rel' ? Math.abs(expected) * row.number('tol') : row.number('tol');
    expect(Math.abs(value(row) - expected)).toBeLessThanOrEqual(allowed);
  });

  it.each(thresholds.map(row => [row.text('inputs'), row] as const))('chi-square threshold %s', (_, row) => {
    const dof = input(row, 'dof');
    const chance = chiSquareChance(row.number('expected') * dof, dof);
    // The threshold is given to 1e-6; the tail changes by that times dof/2 at most.
    expect(chance / input(row, 'false_alarm')).toBeCloseTo(1, 4);
  });

  it.skip.each(rows.filter(row => !isOurs(row)).map(row => [row.text('id'), row.text('function')]))(
    '%s %s: not used by the program',
    () => {},
  );
});
