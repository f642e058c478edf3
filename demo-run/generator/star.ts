import type { Random } from '../../src/science/random.js';
import { AB_PER_AV, SCENARIO } from './scenario.js';

/** One invented star, as it would look from above the atmosphere without noise. */
export interface DemoStar {
  readonly ra_deg: number;
  readonly dec_deg: number;
  readonly distance_pc: number;
  readonly V: number;
  readonly B: number;
  readonly pmRa_masPerYear: number;
  readonly pmDec_masPerYear: number;
  /** Change of brightness at a time, magnitudes to add; absent for a constant star. */
  readonly change?: (time_ms: number) => number;
}

export interface Place {
  readonly ra_deg: number;
  readonly dec_deg: number;
}

/** Puts absolute magnitudes at a distance behind dust. */
export function placed(
  place: Place,
  absMag: { readonly V: number; readonly B: number },
  distance_pc: number,
  extinction_AV: number,
  motion: { readonly ra: number; readonly dec: number },
): DemoStar {
  const modulus = 5 * Math.log10(distance_pc) - 5;
  return {
    ...place,
    distance_pc,
    V: absMag.V + modulus + extinction_AV,
    B: absMag.B + modulus + AB_PER_AV * extinction_AV,
    pmRa_masPerYear: motion.ra,
    pmDec_masPerYear: motion.dec,
  };
}

/** Anywhere in the square field. */
export function anywhere(random: Random): Place {
  const { ra_deg, dec_deg, width_deg } = SCENARIO.field;
  const dec = dec_deg + random.between(-0.5, 0.5) * width_deg;
  const ra = ra_deg + (random.between(-0.5, 0.5) * width_deg) / Math.cos((dec_deg * Math.PI) / 180);
  return { ra_deg: ra, dec_deg: dec };
}

/** Random proper motion of a disc star: 25 km/s per axis at its distance. */
export function randomMotion(random: Random, distance_pc: number, speed_kmPerS = 25) {
  const scale = (speed_kmPerS * 1000) / (4.74 * distance_pc);
  return { ra: random.normal(0, scale), dec: random.normal(0, scale) };
}
