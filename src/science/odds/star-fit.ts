import { BAND_COUNT } from '../bands.js';
import { CLASS_COUNT, CLASS_INDEX } from '../classes.js';
import { FLAT_COLOUR_PER_MAG } from './flat-class.js';
import { JointDistance } from './joint-distance.js';
import type { ClassModel, NoiseGroup } from './model.js';
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
/** No colour changes by more than this per magnitude of A_V (U-yP1: 1.2; a colour of the axes: far less). */
const LARGEST_REDDENING = 1.2;
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
    const { groups, colours } = this.model;
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
        MISFIT_LIMIT_CHI2 * (variance + star.priorAVVariance * LARGEST_REDDENING * LARGEST_REDDENING),
      );
      const colour = star.mags[blueSlot] - star.mags[redSlot];
      const bluest = colour - star.priorAV * LARGEST_REDDENING - reach;
      const from = firstAtLeast(colours, bluest, group.silentEnd, group.end);
      const to = firstAtLeast(colours, colour + reach, from, group.end);
      total += this.fitRange(g, group.first, group.silentEnd) + this.fitRange(g, from, to);
    }
    return total;
  }

  /** Fits the nodes of one noise group from one place to another; returns their weight, not yet normalised. */
  private fitRange(g: number, from: number, to: number): number {
    const { model, star, distance } = this;
    const { used, bands, mags, weights, priorAV, priorAVVariance } = star;
    const { absMag, extinctionRatio } = model;
    const group = model.groups[g];
    const firstWeight = g * star.stride;
    const referenceMags = absMag[bands[star.referenceSlot]];
    const brightness = mags[star.referenceSlot] - priorAV;
    // Room for the part of the offset that the extinction takes.
    const slack = priorAV + EXTINCTION_SLACK_SIGMA * Math.sqrt(priorAVVariance);
    const lowest = distance.lowest[g] - slack;
    const highest = distance.highest[g] + slack;
    const priorPrecision = priorAVVariance > 0 ? 1 / priorAVVariance : 0;
    let total = 0;
    for (let k = from; k < to; k++) {
      // Far too near or too far, whatever the colours say; an unknown magnitude passes.
      const offset = brightness - referenceMags[k];
      if (offset < lowest || offset > highest) continue;
      let s0 = 0;
      let s1 = 0;
      let s2 = 0;
      let r0 = 0;
      let r1 = 0;
      let rr = 0;
      let silent = 0;
      let product = star.weightProduct[g];
      for (let slot = 0; slot < used; slot++) {
        const band = bands[slot];
        const w = weights[firstWeight + slot];
        const predicted = absMag[band][k];
        if (Number.isNaN(predicted)) {
          silent++;
          product /= w;
          continue;
        }
        const a = extinctionRatio[band][k];
        const r = mags[slot] - predicted - priorAV * a;
        const wa = w * a;
        s0 += w;
        s1 += wa;
        s2 += wa * a;
        r0 += w * r;
        r1 += wa * r;
        rr += w * r * r;
      }
      if (silent === used) continue;
      const gain = priorAVVariance > 0 ? 1 / (priorPrecision + s2) : 0;
      const t0 = s0 - gain * s1 * s1;
      const t1 = r0 - gain * s1 * r1;
      const x = t1 / t0;
      const chi2 = rr - gain * r1 * r1 - t1 * x;
      if (chi2 > MISFIT_LIMIT_CHI2 || !distance.weigh(group, k, x, 1 / t0, JOINT_LIMIT_CHI2 - chi2)) continue;
      const norm =
        Math.sqrt(product / (t0 * (1 + priorAVVariance * s2))) *
        COLOUR_NORM[used - silent - 1] *
        FLAT_NORM[silent];
      const least = NEGLIGIBLE * this.largest;
      if (norm * distance.density < least) continue;
      const likelihood = norm * Math.exp(-0.5 * chi2);
      const density = likelihood * distance.density;
      if (density < least) continue;
      this.largest = Math.max(this.largest, density);
      total += this.keep(
        group,
        k,
        x,
        1 / t0,
        chi2,
        likelihood,
        gain * (r1 - s1 * x),
        gain * (1 + (gain * s1 * s1) / t0),
      );
    }
    return total;
  }

  /** Files a node among the survivors; returns its weight, not yet normalised. */
  private keep(
    group: NoiseGroup,
    k: number,
    x: number,
    variance: number,
    chi2: number,
    likelihood: number,
    deviation_AV: number,
    extinctionVariance: number,
  ): number {
    const { distance } = this;
    // A negative extinction is refused, and the need of one counts against the node.
    const extinction = this.star.priorAV + deviation_AV;
    const positive = extinctionVariance > 0 ? normalTail(extinction / Math.sqrt(extinctionVariance)) : 1;
    const weight = likelihood * distance.density * positive;
    if (!(weight > 0)) return 0;
    this.memberOdds += likelihood * positive * distance.members;
    distance.findModulus(group, k, x, variance, JOINT_LIMIT_CHI2 - chi2);
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
    const { flat, field } = this.model;
    const mag = star.mags[star.referenceSlot] - field.extinction_AV;
    const likelihood = FLAT_NORM[star.used - 1];
    let total = 0;
    let first = 0;
    let second = 0;
    for (let j = 0; j < flat.absMag.length; j++) {
      const density = distance.weighFlat(mag - flat.absMag[j], JOINT_LIMIT_CHI2);
      if (density === 0) continue;
      const weight = likelihood * flat.density[j] * density;
      total += weight;
      first += weight * distance.modulus_mag;
      second += weight * (distance.modulusVariance_mag2 + distance.modulus_mag ** 2);
    }
    this.flatModulus_mag = total > 0 ? first / total : Number.NaN;
    this.flatModulusVariance_mag2 =
      total > 0 ? Math.max(0, second / total - this.flatModulus_mag ** 2) : Number.NaN;
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
  return z > 5 ? 1 : 1 / (1 + Math.exp(-1.702 * z));
}
