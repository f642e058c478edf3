import { coefficientsOf } from './relations.js';

/**
 * Effective temperature from the intrinsic BP-RP of Gaia (E)DR3: Mucciarelli, Bellazzini & Massari 2021, A&A 653, A90,
 * scatter 61 K for dwarfs (0.39-1.50), 83 K for giants (0.33-1.81); NaN outside.
 */
export function teffFromBpRpMucciarelli_K(
  bpRp0: number,
  metallicity_FeH: number,
  kind: 'dwarfs' | 'giants',
): number {
  const [bluest, reddest] = kind === 'dwarfs' ? [0.39, 1.5] : [0.33, 1.81];
  if (!(bpRp0 >= bluest && bpRp0 <= reddest)) return Number.NaN;
  const b = coefficientsOf(`MBM2021 ${kind}`);
  const f = metallicity_FeH;
  const theta = b[0] + b[1] * bpRp0 + b[2] * bpRp0 ** 2 + b[3] * f + b[4] * f ** 2 + b[5] * f * bpRp0;
  return 5040 / theta;
}
