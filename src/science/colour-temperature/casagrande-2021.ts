import { coefficientsOf } from './relations.js';

/**
 * Effective temperature from the intrinsic BP-RP of Gaia DR3 by the infrared flux method: Casagrande et al. 2021,
 * MNRAS 507, 2684, Table 1, good to 60-80 K. Dwarfs (log g above 3.2) of 0.20 < BP-RP < 2.00, giants to 2.55; NaN
 * outside.
 */
export function teffFromBpRp_K(bpRp0: number, logg: number, metallicity_FeH: number): number {
  const isDwarf = logg > 3.2;
  if (!(bpRp0 > 0.2 && bpRp0 < (isDwarf ? 2 : 2.55))) return Number.NaN;
  const a = coefficientsOf('Casagrande2021 BP-RP (DR3)');
  const x = bpRp0;
  const f = metallicity_FeH;
  const powers = [1, x, x ** 2, x ** 3, x ** 5];
  const colour = powers.reduce((sum, power, i) => sum + a[i] * power, 0);
  const gravity = powers.reduce((sum, power, i) => sum + a[5 + i] * logg * power, 0);
  const metals = f * (a[10] + a[11] * x + a[12] * x ** 2 + a[13] * x ** 3 + a[14] * logg * x);
  return colour + gravity + metals;
}
