import { BAND_COUNT, BAND_INDEX, type Band } from '../bands.js';
import { CLASS_COUNT, CLASS_INDEX } from '../classes.js';
import { DistanceTerm } from './distance-term.js';
import { hasCluster } from './field.js';
import { FLAT_COLOUR_PER_MAG, FLAT_SCATTER_MAG2 } from './flat-class.js';
import type { ClassModel, NoiseGroup } from './model.js';
import type { StarInputs } from './star-inputs.js';

/**
 * Fits one star at a time to every node of a model, in buffers that are used again for the next star.
 *
 * In band b a node predicts m_b = M_b + x + A_V a_b, where x = distance modulus + the star's own offset from
 * its sequence, common to all bands. With independent errors in each band and a Gaussian prior on A_V, the
 * misfit is quadratic in (x, A_V): A_V is integrated out exactly (Sherman-Morrison), x is left as a Gaussian
 * about its best value, and its integral against the distance posterior is DistanceTerm's H.
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
  readonly misfit_chi2: Float64Array;

  /** Odds of the classes; all NaN when the star has no usable magnitude. */
  readonly classOdds = new Float64Array(CLASS_COUNT);
  memberOdds = 0;
  /** Moments of the flat class, weighted by its odds. */
  flatModulus_mag = 0;
  flatModulusVariance_mag2 = 0;

  private readonly field: DistanceTerm;
  private readonly cluster: boolean;
  private readonly bandCount: number;
  private readonly bandIndex: Uint8Array;
  private readonly usedBands: Uint8Array;
  private readonly usedMags: Float64Array;
  private readonly weights: Float64Array;
  private readonly weightProduct: Float64Array;
  private readonly variances: Float64Array;
  private readonly lowest: Float64Array;
  private readonly highest: Float64Array;
  private readonly range = new Float64Array(2);
  private used = 0;
  private referenceSlot = 0;
  private priorAV = 0;
  private priorAVVariance = 0;
  private clusterParallax = 1;
  private fieldScale = 1;
  private clusterScale = 0;
  private largest = 0;
  private foundDensity = 0;
  private foundMembers = 0;
  private foundModulus_mag = 0;
  private foundModulusVariance_mag2 = 0;

  constructor(
    private readonly model: ClassModel,
    private readonly inputs: StarInputs,
  ) {
    const nodes = model.nodes.length;
    this.node = new Uint32Array(nodes);
    this.weight = new Float64Array(nodes);
    this.offset_mag = new Float64Array(nodes);
    this.modulus_mag = new Float64Array(nodes);
    this.modulusVariance_mag2 = new Float64Array(nodes);
    this.extinction_AV = new Float64Array(nodes);
    this.extinctionVariance = new Float64Array(nodes);
    this.misfit_chi2 = new Float64Array(nodes);
    this.bandCount = inputs.bands.length;
    this.bandIndex = Uint8Array.from(inputs.bands, band => BAND_INDEX[band]);
    this.usedBands = new Uint8Array(this.bandCount);
    this.usedMags = new Float64Array(this.bandCount);
    this.weights = new Float64Array(model.groups.length * this.bandCount);
    this.weightProduct = new Float64Array(model.groups.length);
    this.lowest = new Float64Array(model.groups.length);
    this.highest = new Float64Array(model.groups.length);
    this.variances = new Float64Array(model.scatterVariances_mag2.length);
    this.field = new DistanceTerm(model.field.lengthScale_pc, model.scatterVariances_mag2.length);
    this.cluster = hasCluster(model.field);
  }

  /** Fits star i of the inputs. */
  fit(i: number): void {
    this.survivors = 0;
    this.memberOdds = 0;
    this.largest = 0;
    this.classOdds.fill(0);
    this.takeMagnitudes(i);
    if (this.used === 0) {
      this.classOdds.fill(Number.NaN);
      return;
    }
    this.takeExtinction(i);
    this.takeDistance(i);
    let total = this.fitNodes();
    total += this.fitFlat();
    this.normalise(total);
  }

  private takeMagnitudes(i: number): void {
    const { mag, sigma_mag } = this.inputs;
    const { groups, field, axes } = this.model;
    this.used = 0;
    this.referenceSlot = 0;
    this.weightProduct.fill(1);
    const floor2 = field.floor_mag ** 2;
    for (let b = 0; b < this.bandCount; b++) {
      const m = mag[b][i];
      const sigma = sigma_mag[b][i];
      if (!(m > -30 && m < 40) || !(sigma >= 0)) continue;
      const slot = this.used++;
      this.usedBands[slot] = this.bandIndex[b];
      this.usedMags[slot] = m;
      if (this.inputs.bands[b] === axes.band) this.referenceSlot = slot;
      for (let g = 0; g < groups.length; g++) {
        const weight = 1 / (sigma * sigma + floor2 + groups[g].bandVariance_mag2);
        this.weights[g * this.bandCount + slot] = weight;
        this.weightProduct[g] *= weight;
      }
    }
  }

  private takeExtinction(i: number): void {
    const { field } = this.model;
    const reddening = this.inputs.reddening_EBV[i];
    if (Number.isNaN(reddening)) {
      this.priorAV = field.extinction_AV;
      this.priorAVVariance = field.extinctionSigma_AV ** 2;
    } else {
      this.priorAV = R_V * Math.max(0, reddening);
      this.priorAVVariance = Math.max(STAR_AV_FLOOR, STAR_AV_ERROR * this.priorAV) ** 2;
    }
  }

  private takeDistance(i: number): void {
    const { field } = this.model;
    const parallax = this.inputs.parallax_mas[i] - field.parallaxZeroPoint_mas;
    const sigma = this.inputs.parallaxSigma_mas[i];
    // The error of the common offset, from the bands together.
    let weight = 0;
    for (let slot = 0; slot < this.used; slot++) weight += this.weights[slot];
    for (let g = 0; g < this.variances.length; g++) {
      this.variances[g] = this.model.scatterVariances_mag2[g] + 1 / weight;
    }
    this.field.prepare(parallax, sigma, this.variances);
    this.takeOffsetRanges();
    this.fieldScale = 1;
    this.clusterScale = 0;
    if (!this.cluster) return;
    const mag = this.usedMags[this.referenceSlot];
    this.fieldScale = (1 - field.memberShare) / Math.max(MIN_COUNTS, this.model.fieldCounts(mag));
    this.clusterScale = field.memberShare / Math.max(MIN_COUNTS, this.model.clusterCounts(mag));
    this.clusterParallax = 1;
    if (sigma > 0 && !Number.isNaN(parallax)) {
      const expected_mas = 1000 / 10 ** ((field.modulus_mag + 5) / 5);
      const variance = sigma ** 2 + (expected_mas * (Math.LN10 / 5) * field.modulusSigma_mag) ** 2;
      const misfit = parallax - expected_mas;
      this.clusterParallax = Math.exp((-0.5 * misfit * misfit) / variance) / Math.sqrt(TWO_PI * variance);
    }
  }

  /** Which offsets from its sequence each group's nodes may need at all, in field or cluster. */
  private takeOffsetRanges(): void {
    const { groups, field } = this.model;
    // Room for the part of the offset that the extinction takes.
    const slack = EXTINCTION_SLACK_SIGMA * Math.sqrt(this.priorAVVariance);
    for (let g = 0; g < groups.length; g++) {
      const group = groups[g];
      this.field.range(this.variances[group.scatterGroup], JOINT_LIMIT_CHI2, this.range);
      let [low, high] = this.range;
      if (this.cluster) {
        const spread = this.variances[group.scatterGroup] + field.modulusSigma_mag ** 2;
        const reach = Math.sqrt(JOINT_LIMIT_CHI2 * spread);
        low = Math.min(low, field.modulus_mag - reach);
        high = Math.max(high, field.modulus_mag + reach);
      }
      this.lowest[g] = low - group.brightest_mag - slack;
      this.highest[g] = high - group.faintest_mag + slack;
    }
  }

  /** Goes through the nodes near the star's colour, and those whose colour in the axes is not known. */
  private fitNodes(): number {
    const { groups, axes, colours } = this.model;
    const blue = this.slotOf(axes.colour.blue);
    const red = this.slotOf(axes.colour.red);
    let total = 0;
    for (let g = 0; g < groups.length; g++) {
      const group = groups[g];
      if (blue < 0 || red < 0) {
        total += this.fitRange(g, group.first, group.end);
        continue;
      }
      // The misfit limit turned into a range of intrinsic colours.
      const variance =
        1 / this.weights[g * this.bandCount + blue] + 1 / this.weights[g * this.bandCount + red];
      const reach = Math.sqrt(
        MISFIT_LIMIT_CHI2 * (variance + this.priorAVVariance * LARGEST_REDDENING * LARGEST_REDDENING),
      );
      const colour = this.usedMags[blue] - this.usedMags[red];
      const bluest = colour - this.priorAV * LARGEST_REDDENING - reach;
      const from = firstAtLeast(colours, bluest, group.silentEnd, group.end);
      const to = firstAtLeast(colours, colour + reach, from, group.end);
      total += this.fitRange(g, group.first, group.silentEnd) + this.fitRange(g, from, to);
    }
    return total;
  }

  private slotOf(band: Band): number {
    const index = BAND_INDEX[band];
    for (let slot = 0; slot < this.used; slot++) if (this.usedBands[slot] === index) return slot;
    return -1;
  }

  private fitRange(g: number, from: number, to: number): number {
    const { model, used, usedBands, usedMags, weights, priorAV, priorAVVariance } = this;
    const { absMag, extinctionRatio } = model;
    const firstWeight = g * this.bandCount;
    const reference = usedBands[this.referenceSlot];
    const brightness = usedMags[this.referenceSlot] - priorAV;
    const lowest = this.lowest[g];
    const highest = this.highest[g] + priorAV;
    const priorPrecision = priorAVVariance > 0 ? 1 / priorAVVariance : 0;
    let total = 0;
    for (let k = from; k < to; k++) {
      const base = k * BAND_COUNT;
      // Far too near or too far, whatever the colours say; an unknown magnitude passes.
      const offset = brightness - absMag[base + reference];
      if (offset < lowest - priorAV || offset > highest) continue;
      let s0 = 0;
      let s1 = 0;
      let s2 = 0;
      let r0 = 0;
      let r1 = 0;
      let rr = 0;
      let silent = 0;
      let product = this.weightProduct[g];
      for (let slot = 0; slot < used; slot++) {
        const band = base + usedBands[slot];
        const w = weights[firstWeight + slot];
        const predicted = absMag[band];
        if (Number.isNaN(predicted)) {
          silent++;
          product /= w;
          continue;
        }
        const a = extinctionRatio[band];
        const r = usedMags[slot] - predicted - priorAV * a;
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
      if (chi2 > MISFIT_LIMIT_CHI2 || !this.weighDistance(model.groups[g], k, x, 1 / t0, chi2)) continue;
      const likelihood =
        Math.exp(-0.5 * chi2) *
        Math.sqrt(product / (t0 * (1 + priorAVVariance * s2))) *
        COLOUR_NORM[used - silent - 1] *
        FLAT_NORM[silent];
      total += this.keep(k, x, chi2, likelihood, gain * (r1 - s1 * x), gain * (1 + (gain * s1 * s1) / t0));
    }
    return total;
  }

  /**
   * Weighs a node by the distance its offset would need, in field and cluster, over its branches; leaves the
   * sums in the found... fields. False when the distance rules it out.
   */
  private weighDistance(group: NoiseGroup, k: number, x: number, variance: number, chi2: number): boolean {
    const { field, clusterScale } = this;
    const { modulus_mag, modulusSigma_mag } = this.model.field;
    const spread = group.scatterVariance_mag2 + variance;
    const clusterSpread = spread + modulusSigma_mag * modulusSigma_mag;
    const fieldDensity = this.model.fieldDensity[k] * this.fieldScale;
    const clusterDensity = this.model.clusterDensity[k] * clusterScale * this.clusterParallax;
    const limit = JOINT_LIMIT_CHI2 - chi2;
    let total = 0;
    let first = 0;
    let second = 0;
    let members = 0;
    for (const branch of group.branches) {
      const offset = x + branch.brighter_mag;
      if (field.at(offset, spread, group.scatterGroup, limit)) {
        const weight = branch.share * fieldDensity * field.density;
        const mean = field.modulusMean_mag;
        total += weight;
        first += weight * mean;
        second += weight * (field.modulusVariance_mag2 + mean * mean);
      }
      if (clusterDensity <= 0) continue;
      const difference = offset - modulus_mag;
      const misfit = (difference * difference) / clusterSpread;
      if (misfit > limit) continue;
      const weight =
        (branch.share * clusterDensity * Math.exp(-0.5 * misfit)) / Math.sqrt(TWO_PI * clusterSpread);
      total += weight;
      members += weight;
      first += weight * modulus_mag;
      second += weight * (modulusSigma_mag * modulusSigma_mag + modulus_mag * modulus_mag);
    }
    if (!(total > 0)) return false;
    this.foundDensity = total;
    this.foundMembers = members;
    this.foundModulus_mag = first / total;
    this.foundModulusVariance_mag2 = Math.max(
      0,
      second / total - this.foundModulus_mag * this.foundModulus_mag,
    );
    return true;
  }

  /** Files a node among the survivors; returns its weight, not yet normalised. */
  private keep(
    k: number,
    x: number,
    chi2: number,
    likelihood: number,
    deviation_AV: number,
    extinctionVariance: number,
  ): number {
    const density = likelihood * this.foundDensity;
    if (density < NEGLIGIBLE * this.largest) return 0;
    this.largest = Math.max(this.largest, density);
    // A negative extinction is refused, and the need of one counts against the node.
    const extinction = this.priorAV + deviation_AV;
    const positive = extinctionVariance > 0 ? normalTail(extinction / Math.sqrt(extinctionVariance)) : 1;
    const weight = density * positive;
    if (!(weight > 0)) return 0;
    const slot = this.survivors++;
    this.node[slot] = k;
    this.weight[slot] = weight;
    this.offset_mag[slot] = x;
    this.modulus_mag[slot] = this.foundModulus_mag;
    this.modulusVariance_mag2[slot] = this.foundModulusVariance_mag2;
    this.extinction_AV[slot] = Math.max(0, extinction);
    this.extinctionVariance[slot] = extinctionVariance;
    this.misfit_chi2[slot] = chi2;
    this.memberOdds += likelihood * positive * this.foundMembers;
    return weight;
  }

  private fitFlat(): number {
    const { flat, scatterVariances_mag2, field } = this.model;
    const mag = this.usedMags[this.referenceSlot] - field.extinction_AV;
    const likelihood = FLAT_NORM[this.used - 1];
    // Any scatter group's table serves: the density of 'none' is smooth.
    const group = scatterVariances_mag2.length - 1;
    let total = 0;
    let first = 0;
    let second = 0;
    for (let j = 0; j < flat.absMag.length; j++) {
      if (!this.field.at(mag - flat.absMag[j], FLAT_SCATTER_MAG2, group, JOINT_LIMIT_CHI2)) continue;
      const weight = likelihood * flat.density[j] * this.fieldScale * this.field.density;
      if (!(weight > 0)) continue;
      total += weight;
      first += weight * this.field.modulusMean_mag;
      second += weight * (this.field.modulusVariance_mag2 + this.field.modulusMean_mag ** 2);
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

/** Ratio of A_V to true E(B-V) of the mean law (common practice). */
const R_V = 3.1;
/** A star's own E(B-V) is trusted to 10 %, never better than 0.05 mag of A_V. */
const STAR_AV_ERROR = 0.1;
const STAR_AV_FLOOR = 0.05;
/** Nodes further off in colour are not looked at: e^-12 of their density is far below the flat class. */
const MISFIT_LIMIT_CHI2 = 25;
/** Nodes with less of the weight than this, against the best one, are not kept. */
const NEGLIGIBLE = 1e-9;
/** Misfit in colour and distance together beyond which a node is dropped. */
const JOINT_LIMIT_CHI2 = 40;
/** An offset is stretched by less than this many sigma of the extinction prior. */
const EXTINCTION_SLACK_SIGMA = 7;
/** No colour changes by more than this per magnitude of A_V (U-yP1: 1.2; a colour of the axes: far less). */
const LARGEST_REDDENING = 1.2;
const MIN_COUNTS = 1e-30;
const TWO_PI = 2 * Math.PI;
/** (2 pi)^(-n/2) for n colours. */
const COLOUR_NORM = Float64Array.from({ length: BAND_COUNT }, (_, n) => TWO_PI ** (-n / 2));

/** Density of n colours under the flat class. */
const FLAT_NORM = Float64Array.from({ length: BAND_COUNT + 1 }, (_, n) => FLAT_COLOUR_PER_MAG ** n);

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
