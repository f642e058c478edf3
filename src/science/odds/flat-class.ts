import { BAND_INDEX } from '../bands.js';
import type { Node } from './nodes.js';

/**
 * The class 'none': a star of any colour at all. At each absolute magnitude it is given a small share of all
 * the stars there, spread evenly over colour, so that it wins only where no sequence comes near.
 */
export class FlatClass {
  readonly absMag: Float64Array;
  readonly density: Float64Array;

  constructor(nodes: readonly Node[], densities: Float64Array) {
    const count = Math.round((FAINTEST - BRIGHTEST) / STEP_MAG) + 1;
    this.absMag = Float64Array.from({ length: count }, (_, i) => BRIGHTEST + i * STEP_MAG);
    this.density = this.absMag.map(mag => {
      let density = 0;
      nodes.forEach((node, i) => {
        const z = (node.absMag[BAND_INDEX.V] - mag) / SMOOTHING_MAG;
        if (Math.abs(z) < 5) {
          density += (densities[i] * Math.exp(-0.5 * z * z)) / (SMOOTHING_MAG * Math.sqrt(2 * Math.PI));
        }
      });
      return density * SHARE * STEP_MAG;
    });
  }
}

const BRIGHTEST = -10;
const FAINTEST = 20;
const STEP_MAG = 0.5;
const SMOOTHING_MAG = 1;

/**
 * Stars that fit no sequence, as a share of all: judgement. With 1e-4 a dwarf has to lie about five sigma off
 * in colour before 'none' takes over, and a hot subdwarf (6e-7 per cubic parsec) is still preferred to it.
 */
const SHARE = 1e-4;

/** Density per magnitude of one colour under 'none': even over four magnitudes. */
export const FLAT_COLOUR_PER_MAG = 0.25;

/** Variance that bridges the steps between its magnitudes. */
export const FLAT_SCATTER_MAG2 = 0.3 ** 2;
