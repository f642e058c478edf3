import type { StarClass } from '../classes.js';

/** Sets of space densities: the solar neighbourhood, an open cluster, the halo, a young association. */
export type Population = 'field' | 'disc-cluster' | 'halo' | 'ob-association';

/** What is known of a field before a star is measured. */
export interface FieldPrior {
  readonly population: Population;
  /** True distance modulus of the cluster; NaN where there is none. */
  readonly modulus_mag: number;
  readonly modulusSigma_mag: number;
  /** Share of the stars at a given magnitude that belong to the cluster, 0 to 1. */
  readonly memberShare: number;
  /** Mean proper motion of the cluster (RA times cos dec), and the spread of its members with their errors; NaN unknown. */
  readonly pmRa_masPerYear: number;
  readonly pmDec_masPerYear: number;
  readonly pmSigma_masPerYear: number;
  /** Spread of the field stars' proper motions about nil. */
  readonly fieldPmSigma_masPerYear: number;
  /** NaN where unknown. */
  readonly age_Gyr: number;
  readonly extinction_AV: number;
  readonly extinctionSigma_AV: number;
  /** Length scale of the exponentially decreasing space density (Bailer-Jones 2015, PASP 127, 994). */
  readonly lengthScale_pc: number;
  readonly parallaxZeroPoint_mas: number;
  /** Photometric floor of every band, added in quadrature. */
  readonly floor_mag: number;
  readonly classScale: Readonly<Partial<Record<StarClass, number>>>;
}

export function hasCluster(field: FieldPrior): boolean {
  return !Number.isNaN(field.modulus_mag) && field.memberShare > 0;
}
