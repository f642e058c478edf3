import type { Band } from '../bands.js';
import type { StarClass } from '../classes.js';
import type { DustSlab } from '../dust-slab.js';

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
  /** Mean A_V of the field; not used where `dust` says how it grows with distance. */
  readonly extinction_AV: number;
  /** Spread of A_V from star to star. */
  readonly extinctionSigma_AV: number;
  readonly dust: DustSlab | undefined;
  /** Length scale of the exponentially decreasing space density (Bailer-Jones 2015, PASP 127, 994). */
  readonly lengthScale_pc: number;
  readonly parallaxZeroPoint_mas: number;
  /** Photometric floor, added in quadrature: of every band, and of single bands where they differ. */
  readonly floor_mag: number;
  readonly bandFloor_mag: Readonly<Partial<Record<Band, number>>>;
  readonly classScale: Readonly<Partial<Record<StarClass, number>>>;
}

export function hasCluster(field: FieldPrior): boolean {
  return !Number.isNaN(field.modulus_mag) && field.memberShare > 0;
}

/** Photometric floor of a band. */
export function floorOf(field: FieldPrior, band: Band): number {
  return field.bandFloor_mag[band] ?? field.floor_mag;
}
