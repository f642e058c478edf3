import { coefficientsOf, polynomial } from './relations.js';

/**
 * Effective temperature from the intrinsic B-V: Flower 1996, ApJ 469, 355, coefficients as corrected by Torres 2010,
 * AJ 140, 1158, Table 2. One relation for classes V to III (-0.35 to 1.80), one for class I (-0.3 to 1.8); NaN outside.
 */
export function teffFromBV_K(bv0: number, kind: 'V, IV, III' | 'I'): number {
  const bluest = kind === 'I' ? -0.3 : -0.35;
  if (!(bv0 >= bluest && bv0 <= 1.8)) return Number.NaN;
  const id = kind === 'I' ? 'Flower1996/Torres2010 supergiants' : 'Flower1996/Torres2010 MS,IV,III';
  return 10 ** polynomial(coefficientsOf(id), bv0);
}

/**
 * Bolometric correction in V at a temperature: Flower 1996 in the form of Torres 2010, Table 1, three pieces joined
 * at log T = 3.70 and 3.90. Goes with a solar bolometric magnitude of 4.73.
 */
export function bolometricCorrection_V(teff_K: number): number {
  const x = Math.log10(teff_K);
  return polynomial(coefficientsOf(x < 3.7 ? 'BC_V cool' : x < 3.9 ? 'BC_V mid' : 'BC_V hot'), x);
}
