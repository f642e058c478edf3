import { describe, expect, it } from 'vitest';
import { distancePosterior } from '../../src/science/distance/distance-posterior.js';
import { type Check, readChecks, testChecks } from './checks.js';
import text from './data/checks_distance.csv';

const posterior = (check: Check) =>
  distancePosterior(check.input('parallax_mas'), check.input('error_mas'), check.input('L_pc'));
const quantile = (share: number) => (check: Check) => posterior(check).quantile_pc(share);
const magnitudeAt = (share: number) => (check: Check) =>
  check.input('m') - 5 * Math.log10(posterior(check).quantile_pc(share)) + 5 - check.input('A');
const arithmetic = { notOurs: 'plain arithmetic, done inside the track fit' };

describe('distance posterior, Bailer-Jones 2015', () => {
  it('reads every row of the file', () => expect(readChecks(text)).toHaveLength(209));

  testChecks(text, {
    distance_inverse: arithmetic,
    M_from_parallax: arithmetic,
    sigma_M: arithmetic,
    n_real_roots: arithmetic,
    r_mode: check => posterior(check).mode_pc,
    'quantile_0.05': quantile(0.05),
    'quantile_0.1587': quantile(0.1587),
    'quantile_0.5': quantile(0.5),
    'quantile_0.8413': quantile(0.8413),
    'quantile_0.95': quantile(0.95),
    'M_at_distance_quantile_0.05': magnitudeAt(0.05),
    'M_at_distance_quantile_0.1587': magnitudeAt(0.1587),
    'M_at_distance_quantile_0.5': magnitudeAt(0.5),
    'M_at_distance_quantile_0.8413': magnitudeAt(0.8413),
    'M_at_distance_quantile_0.95': magnitudeAt(0.95),
    M_from_modulus: arithmetic,
    mean_parallax: { notOurs: 'the cluster modulus comes from the profile' },
    mean_parallax_error: { notOurs: 'the cluster modulus comes from the profile' },
    membership_z: { notOurs: 'membership is a probability here' },
    corrected_parallax: arithmetic,
    delta_M: arithmetic,
  });
});
