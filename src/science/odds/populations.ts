import { BAND_INDEX } from '../bands.js';
import { CLASSES, type StarClass } from '../classes.js';
import { MainSequenceLifetime } from '../main-sequence-lifetime.js';
import type { FieldPrior, Population } from './field.js';
import type { Node } from './nodes.js';

/**
 * Factors on the local densities, by class. Judgement guided by the usual picture: a halo field is old and
 * metal-poor (no young luminous stars, subdwarfs in place of dwarfs), a disc cluster has hardly any
 * metal-poor star, an association is rich in everything young.
 */
const FACTORS: Readonly<Record<Population, Readonly<Partial<Record<StarClass, number>>>>> = {
  field: {},
  'disc-cluster': { sd: 0.02, WD: 0.3, sdOB: 1 },
  halo: { V: 0.1, IV: 0.3, III: 0.5, II: 0.02, Ib: 0.002, Iab: 0.001, Ia: 0.001, sd: 30, sdOB: 3 },
  'ob-association': { WD: 0.01, sd: 0.01, sdOB: 0.01, Ib: 100, Iab: 100, Ia: 100, II: 30 },
};

/** A cluster keeps this share of its dwarfs above the turn-off: merged and mass-transfer stars. */
const STRAGGLER_SHARE = 0.01;
/** Age of the local disc, over which short-lived stars have been thinned out. */
const DISC_AGE_GYR = 10;

/**
 * Density of each node in a population (arbitrary unit, one unit within a population).
 *
 * In a coeval population the dwarfs brighter than the turn-off are gone, and those below have not been
 * thinned out by age as the field's have: the field's density is divided by the share still alive.
 */
export function populationDensities(
  nodes: readonly Node[],
  population: Population,
  field: FieldPrior,
): Float64Array {
  const lifetimes = new MainSequenceLifetime();
  const coeval = population === 'disc-cluster' || population === 'ob-association';
  const turnOff = lifetimes.turnOff_absMagV(field.age_Gyr);
  return Float64Array.from(nodes, node => {
    const starClass = CLASSES[node.classIndex];
    const factor = (FACTORS[population][starClass] ?? 1) * (field.classScale[starClass] ?? 1);
    if (!coeval || starClass !== 'V') return node.density_perPc3 * factor;
    const absMagV = node.absMag[BAND_INDEX.V];
    const alive = Math.min(1, lifetimes.lifetime_Gyr(absMagV) / DISC_AGE_GYR);
    const past = absMagV < turnOff ? STRAGGLER_SHARE : 1;
    return (node.density_perPc3 * factor * past) / alive;
  });
}
