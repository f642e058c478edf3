import type { ExtinctionPrior } from './extinction-prior.js';
import type { FieldPrior } from './field.js';
import type { Node } from './nodes.js';

/**
 * How many stars per magnitude a population shows at an apparent magnitude, in the unit of its densities.
 * The profile's member share is meant at a given magnitude, so each population is divided by its own counts.
 */
export function magnitudeCounts(setting: {
  readonly nodes: readonly Node[];
  readonly band: number;
  readonly field: FieldPrior;
  readonly extinction: ExtinctionPrior;
}) {
  const { nodes, band, field, extinction } = setting;
  /** True distance modulus at which a node shows a magnitude. */
  const modulusAt = (node: Node, mag: number) => {
    const apparent_mag = mag - node.absMag[band];
    return apparent_mag - node.extinctionRatio[band] * extinction.atApparentModulus(apparent_mag);
  };

  const tabulate = (contribution: (node: Node, mag: number) => number, densities: Float64Array) => {
    const table = new Float64Array(COUNT);
    for (let i = 0; i < COUNT; i++) {
      const mag = BRIGHTEST + i * STEP_MAG;
      for (let k = 0; k < nodes.length; k++) {
        if (densities[k] > 0 && !Number.isNaN(nodes[k].absMag[band])) {
          table[i] += densities[k] * contribution(nodes[k], mag);
        }
      }
    }
    return (mag: number) => {
      const position = Math.max(0, Math.min(COUNT - 1.001, (mag - BRIGHTEST) / STEP_MAG));
      const i = Math.floor(position);
      return table[i] + (position - i) * (table[i + 1] - table[i]);
    };
  };

  return {
    inField: (densities: Float64Array) =>
      tabulate((node, mag) => shellDensity(modulusAt(node, mag), field.lengthScale_pc), densities),
    inCluster: (densities: Float64Array) =>
      tabulate((node, mag) => {
        const variance = node.scatter_mag ** 2 + field.modulusSigma_mag ** 2;
        const difference = modulusAt(node, mag) - field.modulus_mag;
        return Math.exp((-0.5 * difference ** 2) / variance) / Math.sqrt(2 * Math.PI * variance);
      }, densities),
  };
}

/** p(mu) of the exponentially decreasing space density, see distance-term.ts. */
function shellDensity(modulus_mag: number, lengthScale_pc: number): number {
  const ratio = 10 ** ((modulus_mag + 5) / 5) / lengthScale_pc;
  return (Math.LN10 / 10) * ratio ** 3 * Math.exp(-ratio);
}

const BRIGHTEST = -3;
const STEP_MAG = 0.5;
const COUNT = 61;
