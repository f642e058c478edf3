import { fallingExponential } from '../falling-exponential.js';
import { DistanceTerm } from './distance-term.js';
import { hasCluster } from './field.js';
import { FLAT_SCATTER_MAG2 } from './flat-class.js';
import type { ClassModel } from './model.js';
import type { NoiseGroup } from './node-groups.js';
import type { StarData } from './star-data.js';

const MIN_COUNTS = 1e-30;
/** No field star is too fast: high-velocity stars have a floor under their Gaussian. */
const LEAST_MOTION = 1e-6;
const TWO_PI = 2 * Math.PI;
const MOST_BRANCHES = 8;

/** Variances that differ by less than two per cent share a table. */
function inSteps(variance_mag2: number): number {
  return Math.exp(Math.round(Math.log(variance_mag2) * 50) / 50);
}

/**
 * Weighs nodes by the distance they need: in the field by parallax and space density, in the cluster (where there is
 * one) by its modulus, over the branches of a sequence. Results stay in the public fields until the next call.
 */
export class JointDistance {
  /** Density of the node at this distance, field and cluster together, and the cluster's part. */
  density = 0;
  members = 0;
  modulus_mag = 0;
  modulusVariance_mag2 = 0;

  private readonly term: DistanceTerm;
  private readonly isCluster: boolean;
  private readonly variances: Float64Array;
  private readonly range = new Float64Array(2);
  /** What `weigh` found for the field in each branch. */
  private readonly fieldParts = new Float64Array(MOST_BRANCHES);
  private fieldScaleOfParts = 0;
  /** Variance about a node's sequence: intrinsic and photometric. */
  private spread = 0;
  /** Any group of ordinary motion serves the flat class: its density is smooth. */
  private readonly flatGroup: number;
  private fieldScale = 1;
  private clusterScale = 0;
  /** Offsets a node of each group may need at all. */
  readonly lowest: Float64Array;
  readonly highest: Float64Array;

  constructor(private readonly model: ClassModel) {
    this.isCluster = hasCluster(model.field);
    this.variances = new Float64Array(model.distanceGroups.length);
    this.term = new DistanceTerm(model.field.lengthScale_pc, model.distanceGroups);
    this.flatGroup = model.distanceGroups.findIndex(group => group.kinematics === 'disc');
    this.lowest = new Float64Array(model.groups.length);
    this.highest = new Float64Array(model.groups.length);
  }

  /** Takes a star; offsets whose misfit exceeds the limit are out of range. */
  prepare(star: StarData, limit_chi2: number): void {
    const photometric = star.offsetVariance_mag2();
    for (let g = 0; g < this.variances.length; g++) {
      this.variances[g] = inSteps(this.model.distanceGroups[g].scatterVariance_mag2 + photometric);
    }
    // In a cluster field the motion has another use: it tells members.
    const motion = this.isCluster ? Number.NaN : Math.hypot(star.pmRa_masPerYear, star.pmDec_masPerYear);
    this.term.prepare(star.parallax_mas, star.parallaxSigma_mas, motion, this.variances);
    this.prepareScales(star);
    this.prepareRanges(limit_chi2);
  }

  /**
   * Finds `density` and `members` for a node that needs the offset x with a misfit chi2 in its colours, the misfit
   * included; false when colours and distance together rule it out.
   */
  weigh(
    group: NoiseGroup,
    k: number,
    x: number,
    variance: number,
    chi2: number,
    limit_chi2: number,
  ): boolean {
    const inField = this.model.fieldDensity[k] * this.fieldScale;
    const inCluster = this.model.clusterDensity[k] * this.clusterScale;
    this.spread = this.model.distanceGroups[group.distanceGroup].scatterVariance_mag2 + variance;
    const field = this.term.isGaussian
      ? inField * this.weighGaussian(group, x, chi2, limit_chi2)
      : inField * this.weighGrid(group, x, chi2);
    this.fieldScaleOfParts = inField;
    this.members = inCluster > 0 ? inCluster * this.weighCluster(group, x, chi2, limit_chi2) : 0;
    this.density = field + this.members;
    return this.density > 0;
  }

  /** Finds the modulus of the node that `weigh` has just let through. */
  findModulus(group: NoiseGroup, x: number): void {
    const { term, fieldParts, fieldScaleOfParts, members } = this;
    const { branches, distanceGroup } = group;
    let total = members;
    let first = 0;
    let second = 0;
    if (members > 0) {
      const { modulus_mag, modulusSigma_mag } = this.model.field;
      first = members * modulus_mag;
      second = members * (modulusSigma_mag * modulusSigma_mag + modulus_mag * modulus_mag);
    }
    const gain = term.isGaussian ? term.variance_mag2 / (term.variance_mag2 + this.spread) : 0;
    for (let b = 0; b < branches.length; b++) {
      const weight = fieldScaleOfParts * fieldParts[b];
      if (!(weight > 0)) continue;
      const offset = x + branches[b].brighter_mag;
      let mean = term.mean_mag + gain * (offset - term.mean_mag);
      let variance = term.variance_mag2 * (1 - gain);
      if (!term.isGaussian) {
        term.momentsAt(offset, distanceGroup);
        mean = term.modulusMean_mag;
        variance = term.modulusVariance_mag2;
      }
      total += weight;
      first += weight * mean;
      second += weight * (variance + mean * mean);
    }
    this.modulus_mag = first / total;
    this.modulusVariance_mag2 = Math.max(0, second / total - this.modulus_mag ** 2);
  }

  /** Density of the field alone at an offset of the flat class; leaves the modulus in the public fields. */
  weighFlat(x: number, limit_chi2: number): number {
    const { term, flatGroup } = this;
    if (!term.isGaussian) {
      const density = this.fieldScale * term.densityAt(x, flatGroup);
      if (density <= 0) return 0;
      term.momentsAt(x, flatGroup);
      this.modulus_mag = term.modulusMean_mag;
      this.modulusVariance_mag2 = term.modulusVariance_mag2;
      return density;
    }
    const total = term.variance_mag2 + FLAT_SCATTER_MAG2;
    const difference = x - term.mean_mag;
    const misfit = (difference * difference) / total;
    if (misfit > limit_chi2) return 0;
    const gain = term.variance_mag2 / total;
    this.modulus_mag = term.mean_mag + gain * difference;
    this.modulusVariance_mag2 = term.variance_mag2 * (1 - gain);
    return (this.fieldScale * term.weight * fallingExponential(0.5 * misfit)) / Math.sqrt(TWO_PI * total);
  }

  /** Sum over the branches against a Gaussian modulus. */
  private weighGaussian(group: NoiseGroup, x: number, chi2: number, limit_chi2: number): number {
    const { term, fieldParts } = this;
    const { branches } = group;
    const precision = 1 / (term.variance_mag2 + this.spread);
    const scale = term.weight * Math.sqrt(precision / TWO_PI);
    const difference = x - term.mean_mag;
    let sum = 0;
    for (let b = 0; b < branches.length; b++) {
      const { share, brighter_mag } = branches[b];
      const misfit = chi2 + (difference + brighter_mag) ** 2 * precision;
      const part = misfit > limit_chi2 ? 0 : share * scale * fallingExponential(0.5 * misfit);
      fieldParts[b] = part;
      sum += part;
    }
    return sum;
  }

  /** Sum over the branches against the tabulated modulus. */
  private weighGrid(group: NoiseGroup, x: number, chi2: number): number {
    const { term, fieldParts } = this;
    const { branches, distanceGroup } = group;
    const likelihood = fallingExponential(0.5 * chi2);
    let sum = 0;
    for (let b = 0; b < branches.length; b++) {
      const { share, brighter_mag } = branches[b];
      const part = share * likelihood * term.densityAt(x + brighter_mag, distanceGroup);
      fieldParts[b] = part;
      sum += part;
    }
    return sum;
  }

  /** Sum over the branches against the modulus of the cluster. */
  private weighCluster(group: NoiseGroup, x: number, chi2: number, limit_chi2: number): number {
    const { modulus_mag, modulusSigma_mag } = this.model.field;
    const precision = 1 / (this.spread + modulusSigma_mag * modulusSigma_mag);
    let sum = 0;
    for (const { share, brighter_mag } of group.branches) {
      const misfit = chi2 + (x + brighter_mag - modulus_mag) ** 2 * precision;
      if (misfit <= limit_chi2) sum += share * fallingExponential(0.5 * misfit);
    }
    return sum * Math.sqrt(precision / TWO_PI);
  }

  /** Both populations in units of their numbers at the star's magnitude, the cluster with its parallax. */
  private prepareScales(star: StarData): void {
    this.fieldScale = 1;
    this.clusterScale = 0;
    if (!this.isCluster) return;
    const { field } = this.model;
    const mag = star.mags[star.referenceSlot];
    this.fieldScale = (1 - field.memberShare) / Math.max(MIN_COUNTS, this.model.fieldCounts(mag));
    this.clusterScale = field.memberShare / Math.max(MIN_COUNTS, this.model.clusterCounts(mag));
    this.weighMotion(star);
    if (!star.hasParallax) return;
    const expected_mas = 1000 / 10 ** ((field.modulus_mag + 5) / 5);
    const variance =
      star.parallaxSigma_mas ** 2 + (expected_mas * (Math.LN10 / 5) * field.modulusSigma_mag) ** 2;
    const misfit = star.parallax_mas - expected_mas;
    this.clusterScale *= Math.exp((-0.5 * misfit * misfit) / variance) / Math.sqrt(TWO_PI * variance);
  }

  /** A star that moves with the cluster is likelier a member, one that does not, hardly: two round Gaussians. */
  private weighMotion(star: StarData): void {
    const { field } = this.model;
    const inCluster = field.pmSigma_masPerYear ** 2;
    const inField = field.fieldPmSigma_masPerYear ** 2;
    const { pmRa_masPerYear, pmDec_masPerYear } = star;
    const fromCluster =
      (pmRa_masPerYear - field.pmRa_masPerYear) ** 2 + (pmDec_masPerYear - field.pmDec_masPerYear) ** 2;
    if (Number.isNaN(fromCluster + inCluster)) return;
    const fromRest = pmRa_masPerYear ** 2 + pmDec_masPerYear ** 2;
    this.clusterScale *= Math.exp((-0.5 * fromCluster) / inCluster) / inCluster;
    this.fieldScale *= Math.max(LEAST_MOTION, Math.exp((-0.5 * fromRest) / inField)) / inField;
  }

  private prepareRanges(limit_chi2: number): void {
    const { groups, field } = this.model;
    for (let g = 0; g < groups.length; g++) {
      const group = groups[g];
      const variance = this.variances[group.distanceGroup];
      this.term.range(variance, limit_chi2, this.range);
      let low = this.range[0];
      let high = this.range[1];
      if (this.isCluster) {
        const reach = Math.sqrt(limit_chi2 * (variance + field.modulusSigma_mag ** 2));
        low = Math.min(low, field.modulus_mag - reach);
        high = Math.max(high, field.modulus_mag + reach);
      }
      this.lowest[g] = low - group.brightest_mag;
      this.highest[g] = high - group.faintest_mag;
    }
  }
}
