import { BAND_COUNT } from '../bands.js';
import { CLASS_COUNT, CLASS_INDEX } from '../classes.js';
import { fallingExponential } from '../falling-exponential.js';
import { FLAT_COLOUR_PER_MAG } from './flat-class.js';
import { JointDistance } from './joint-distance.js';
import type { ClassModel } from './model.js';
import type { NoiseGroup } from './node-groups.js';
import { StarData } from './star-data.js';
import type { StarInputs } from './star-inputs.js';

/** Nodes further off in colour are not looked at: e^-12 of their density is far below the flat class. */
const MISFIT_LIMIT_CHI2 = 25;
/** Misfit in colour and distance together beyond which a node is dropped. */
const JOINT_LIMIT_CHI2 = 40;
/** Nodes with less of the weight than this, against the best one so far, are not kept. */
const NEGLIGIBLE = 1e-6;
/** An offset is stretched by less than this many sigma of the extinction prior. */
const EXTINCTION_SLACK_SIGMA = 7;
/** No band is dimmed by more than this per magnitude of A_V (U: 1.6). */
const LARGEST_RATIO = 1.6;
/** (2 pi)^(-n/2) for n colours. */
const COLOUR_NORM = Float64Array.from({ length: BAND_COUNT }, (_, n) => (2 * Math.PI) ** (-n / 2));
/** Density of n colours under the flat class. */
const FLAT_NORM = Float64Array.from({ length: BAND_COUNT + 1 }, (_, n) => FLAT_COLOUR_PER_MAG ** n);

/**
 * Fits one star at a time to every node of a model, in buffers that are used again for the next star.
 *
 * In band b a node predicts m_b = M_b + x + A_V a_b, where x = distance modulus + the star's own offset from
 * its sequence, common to all bands. With independent errors in each band and a Gaussian prior on A_V, the
 * misfit is quadratic in (x, A_V): A_V is integrated out exactly (Sherman-Morrison), x is left as a Gaussian
 * about its best value, and its integral against the distance posterior is JointDistance's.
 */
export class StarFit {
  /** Nodes that carry weight: results of the last `fit`, elements 0 to survivors - 1. */
  survivors = 0;
  readonly node: Uint32Array;
  /** Posterior weight of the node (field plus cluster), summing to 1 with the flat class. */
  readonly weight: Float64Array;
  readonly offset_mag: Float64Array;
  readonly modulus_mag: Float64Array;
  readonly modulusVariance_mag2: Float64Array;
  readonly extinction_AV: Float64Array;
  readonly extinctionVariance: Float64Array;

  /** Odds of the classes; all NaN when the star has no usable magnitude. */
  readonly classOdds = new Float64Array(CLASS_COUNT);
  memberOdds = 0;
  /** Moments of the flat class, weighted by its odds. */
  flatModulus_mag = 0;
  flatModulusVariance_mag2 = 0;
  flatExtinction_AV = 0;
  flatExtinctionVariance = 0;

  private readonly star: StarData;
  private readonly distance: JointDistance;
  private largest = 0;

  constructor(
    private readonly model: ClassModel,
    inputs: StarInputs,
  ) {
    const nodes = model.nodes.length;
    this.node = new Uint32Array(nodes);
    this.weight = new Float64Array(nodes);
    this.offset_mag = new Float64Array(nodes);
    this.modulus_mag = new Float64Array(nodes);
    this.modulusVariance_mag2 = new Float64Array(nodes);
    this.extinction_AV = new Float64Array(nodes);
    this.extinctionVariance = new Float64Array(nodes);
    this.star = new StarData(model, inputs);
    this.distance = new JointDistance(model);
  }

  /** Fits star i of the inputs. */
  fit(i: number): void {
    this.survivors = 0;
    this.memberOdds = 0;
    this.largest = 0;
    this.classOdds.fill(0);
    this.star.take(i);
    if (this.star.used === 0) {
      this.classOdds.fill(Number.NaN);
      return;
    }
    this.distance.prepare(this.star, JOINT_LIMIT_CHI2);
    this.normalise(this.fitNodes() + this.fitFlat());
  }

  /** Goes through the nodes near the star's colour, and those whose colour in the axes is not known. */
  private fitNodes(): number {
    const { star } = this;
    const { groups, colours, largestReddening } = this.model;
    const { blueSlot, redSlot } = star;
    let total = 0;
    for (let g = 0; g < groups.length; g++) {
      const group = groups[g];
      if (blueSlot < 0 || redSlot < 0) {
        total += this.fitRange(g, group.first, group.end);
        continue;
      }
      // The misfit limit turned into a range of intrinsic colours.
      const variance =
        1 / star.weights[g * star.stride + blueSlot] + 1 / star.weights[g * star.stride + redSlot];
      const reach = Math.sqrt(
        MISFIT_LIMIT_CHI2 * (variance + star.priorAVVariance * largestReddening * largestReddening),
      );
      const colour = star.mags[blueSlot] - star.mags[redSlot];
      const bluest = colour - star.priorAV * largestReddening - reach;
      const from = firstAtLeast(colours, bluest, group.silentEnd, group.end);
      const to = firstAtLeast(colours, colour + reach, from, group.end);
      total += this.fitRange(g, group.first, group.silentEnd) + this.fitRange(g, from, to);
    }
    return total;
  }

  /** Fits the nodes of one noise group from one place to another; returns their weight, not yet normalised. */
  private fitRange(g: number, from: number, to: number): number {
    const { model, star, distance } = this;
    const { used, mags, nodeMags, nodeRatios, weights, extinctionByNode } = star;
    const group = model.groups[g];
    const firstWeight = g * star.stride;
    const referenceMags = nodeMags[star.referenceSlot];
    const brightness = mags[star.referenceSlot];
    // Room for the part of the offset that the extinction takes.
    const slack = EXTINCTION_SLACK_SIGMA * Math.sqrt(star.priorAVVariance);
    const lowest = distance.lowest[g] - slack;
    const highest = distance.highest[g] + LARGEST_RATIO * (star.priorAV + slack);
    let { priorAV, priorAVVariance } = star;
    let total = 0;
    for (let k = from; k < to; k++) {
      // Far too near or too far, whatever the colours say; an unknown magnitude passes.
      const offset = brightness - referenceMags[k];
      if (offset < lowest || offset > highest) continue;
      if (extinctionByNode) {
        priorAV = model.extinction.atApparentModulus(offset);
        priorAVVariance = model.extinction.variance(priorAV);
      }
      let s0 = 0;
      let s1 = 0;
      let s2 = 0;
      let r0 = 0;
      let r1 = 0;
      let rr = 0;
      let silent = 0;
      let product = star.weightProduct[g];
      for (let slot = 0; slot < used; slot++) {
        const w = weights[firstWeight + slot];
        const a = nodeRatios[slot][k];
        const r = mags[slot] - nodeMags[slot][k] - priorAV * a;
        // NaN: this node is silent in this band.
        if (Number.isNaN(r)) {
          silent++;
          product /= w;
          continue;
        }
        const wa = w * a;
        const wr = w * r;
        s0 += w;
        s1 += wa;
        s2 += wa * a;
        r0 += wr;
        r1 += wr * a;
        rr += wr * r;
      }
      if (silent === used) continue;
      const narrowing = 1 / (1 + priorAVVariance * s2);
      const gain = priorAVVariance * narrowing;
      const t0 = s0 - gain * s1 * s1;
      const variance = 1 / t0;
      const x = (r0 - gain * s1 * r1) * variance;
      const chi2 = rr - gain * r1 * r1 - t0 * x * x;
      if (chi2 > MISFIT_LIMIT_CHI2) continue;
      if (!distance.weigh(group, k, x, variance, chi2, JOINT_LIMIT_CHI2)) continue;
      const norm =
        Math.sqrt(product * variance * narrowing) * COLOUR_NORM[used - silent - 1] * FLAT_NORM[silent];
      const density = norm * distance.density;
      if (density < NEGLIGIBLE * this.largest) continue;
      if (density > this.largest) this.largest = density;
      const extinction = priorAV + gain * (r1 - s1 * x);
      total += this.keep(group, k, x, norm, extinction, gain * (1 + gain * s1 * s1 * variance));
    }
    return total;
  }

  /** Files a node among the survivors; returns its weight, not yet normalised. */
  private keep(
    group: NoiseGroup,
    k: number,
    x: number,
    norm: number,
    extinction: number,
    extinctionVariance: number,
  ): number {
    const { distance } = this;
    // A negative extinction is refused, and the need of one counts against the node.
    const positive = extinctionVariance > 0 ? normalTail(extinction / Math.sqrt(extinctionVariance)) : 1;
    const weight = norm * distance.density * positive;
    if (!(weight > 0)) return 0;
    this.memberOdds += norm * positive * distance.members;
    distance.findModulus(group, x);
    const slot = this.survivors++;
    this.node[slot] = k;
    this.weight[slot] = weight;
    this.offset_mag[slot] = x;
    this.modulus_mag[slot] = distance.modulus_mag;
    this.modulusVariance_mag2[slot] = distance.modulusVariance_mag2;
    this.extinction_AV[slot] = Math.max(0, extinction);
    this.extinctionVariance[slot] = extinctionVariance;
    return weight;
  }

  /** The class that takes any colour; returns its weight, not yet normalised. */
  private fitFlat(): number {
    const { star, distance } = this;
    const { flat, extinction } = this.model;
    const mag = star.mags[star.referenceSlot];
    const likelihood = FLAT_NORM[star.used - 1];
    let total = 0;
    let first = 0;
    let second = 0;
    let dust = 0;
    let dust2 = 0;
    for (let j = 0; j < flat.absMag.length; j++) {
      const offset = mag - flat.absMag[j];
      const av = star.extinctionByNode ? extinction.atApparentModulus(offset) : star.priorAV;
      const density = distance.weighFlat(offset - av, JOINT_LIMIT_CHI2);
      if (density === 0) continue;
      const weight = likelihood * flat.density[j] * density;
      total += weight;
      dust += weight * av;
      dust2 += weight * (av * av + extinction.variance(av));
      first += weight * distance.modulus_mag;
      second += weight * (distance.modulusVariance_mag2 + distance.modulus_mag ** 2);
    }
    this.flatModulus_mag = total > 0 ? first / total : Number.NaN;
    this.flatModulusVariance_mag2 =
      total > 0 ? Math.max(0, second / total - this.flatModulus_mag ** 2) : Number.NaN;
    this.flatExtinction_AV = dust / total;
    this.flatExtinctionVariance = Math.max(0, dust2 / total - this.flatExtinction_AV ** 2);
    this.classOdds[CLASS_INDEX.none] = total;
    return total;
  }

  private normalise(total: number): void {
    if (!(total > 0)) {
      // Further from everything than numbers reach.
      this.survivors = 0;
      this.classOdds.fill(0);
      this.classOdds[CLASS_INDEX.none] = 1;
      return;
    }
    this.classOdds[CLASS_INDEX.none] /= total;
    this.memberOdds /= total;
    for (let slot = 0; slot < this.survivors; slot++) {
      this.weight[slot] /= total;
      this.classOdds[this.model.classIndex[this.node[slot]]] += this.weight[slot];
    }
  }
}

/** First place from `start` on, before `end`, whose value is at least `limit`; the array rises there. */
function firstAtLeast(sorted: Float64Array, limit: number, start: number, end: number): number {
  let low = start;
  let high = end;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (sorted[middle] < limit) low = middle + 1;
    else high = middle;
  }
  return low;
}

/** Share of a normal distribution above -z: logistic approximation, good to 0.01. */
function normalTail(z: number): number {
  const odds = fallingExponential(1.702 * Math.abs(z));
  return (z > 0 ? 1 : odds) / (1 + odds);
}
