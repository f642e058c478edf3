import { DistanceTerm } from './distance-term.js';
import { hasCluster } from './field.js';
import { FLAT_SCATTER_MAG2 } from './flat-class.js';
import type { ClassModel, NoiseGroup } from './model.js';
import type { StarData } from './star-data.js';

const MIN_COUNTS = 1e-30;
/** No field star is too fast: high-velocity stars have a floor under their Gaussian. */
const LEAST_MOTION = 1e-6;
const TWO_PI = 2 * Math.PI;

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
  private fieldScale = 1;
  private clusterScale = 0;
  /** Offsets a node of each group may need at all. */
  readonly lowest: Float64Array;
  readonly highest: Float64Array;

  constructor(private readonly model: ClassModel) {
    this.isCluster = hasCluster(model.field);
    this.variances = new Float64Array(model.scatterVariances_mag2.length);
    this.term = new DistanceTerm(model.field.lengthScale_pc, this.variances.length);
    this.lowest = new Float64Array(model.groups.length);
    this.highest = new Float64Array(model.groups.length);
  }

  /** Takes a star; offsets whose misfit exceeds the limit are out of range. */
  prepare(star: StarData, limit_chi2: number): void {
    const photometric = star.offsetVariance_mag2();
    for (let g = 0; g < this.variances.length; g++) {
      this.variances[g] = this.model.scatterVariances_mag2[g] + photometric;
    }
    this.term.prepare(star.parallax_mas, star.parallaxSigma_mas, this.variances);
    this.prepareScales(star);
    this.prepareRanges(limit_chi2);
  }

  /** Finds `density` and `members` for a node; false when the distance rules it out. */
  weigh(group: NoiseGroup, k: number, x: number, variance: number, limit_chi2: number): boolean {
    const spread = group.scatterVariance_mag2 + variance;
    const inField = this.model.fieldDensity[k] * this.fieldScale;
    const inCluster = this.model.clusterDensity[k] * this.clusterScale;
    let density = 0;
    let members = 0;
    for (const { share, brighter_mag } of group.branches) {
      const offset = x + brighter_mag;
      density += share * inField * this.term.densityAt(offset, spread, group.scatterGroup, limit_chi2);
      if (inCluster > 0) members += share * inCluster * this.clusterDensityAt(offset, spread, limit_chi2);
    }
    this.density = density + members;
    this.members = members;
    return this.density > 0;
  }

  /** Finds the modulus of a node that `weigh` has let through. */
  findModulus(group: NoiseGroup, k: number, x: number, variance: number, limit_chi2: number): void {
    const { modulus_mag, modulusSigma_mag } = this.model.field;
    const spread = group.scatterVariance_mag2 + variance;
    const inField = this.model.fieldDensity[k] * this.fieldScale;
    const inCluster = this.model.clusterDensity[k] * this.clusterScale;
    let total = 0;
    let first = 0;
    let second = 0;
    for (const { share, brighter_mag } of group.branches) {
      const offset = x + brighter_mag;
      const weight = share * inField * this.term.densityAt(offset, spread, group.scatterGroup, limit_chi2);
      if (weight > 0) {
        this.term.momentsAt(offset, spread, group.scatterGroup);
        const mean = this.term.modulusMean_mag;
        total += weight;
        first += weight * mean;
        second += weight * (this.term.modulusVariance_mag2 + mean * mean);
      }
      if (inCluster === 0) continue;
      const member = share * inCluster * this.clusterDensityAt(offset, spread, limit_chi2);
      total += member;
      first += member * modulus_mag;
      second += member * (modulusSigma_mag * modulusSigma_mag + modulus_mag * modulus_mag);
    }
    this.modulus_mag = first / total;
    this.modulusVariance_mag2 = Math.max(0, second / total - this.modulus_mag ** 2);
  }

  /** Density of the field alone at an offset of the flat class; leaves the modulus in the public fields. */
  weighFlat(x: number, limit_chi2: number): number {
    // Any scatter group's table serves: the density of 'none' is smooth.
    const group = this.variances.length - 1;
    const density = this.fieldScale * this.term.densityAt(x, FLAT_SCATTER_MAG2, group, limit_chi2);
    if (density <= 0) return 0;
    this.term.momentsAt(x, FLAT_SCATTER_MAG2, group);
    this.modulus_mag = this.term.modulusMean_mag;
    this.modulusVariance_mag2 = this.term.modulusVariance_mag2;
    return density;
  }

  private clusterDensityAt(offset: number, spread: number, limit_chi2: number): number {
    const { modulus_mag, modulusSigma_mag } = this.model.field;
    const total = spread + modulusSigma_mag * modulusSigma_mag;
    const difference = offset - modulus_mag;
    const misfit = (difference * difference) / total;
    return misfit > limit_chi2 ? 0 : Math.exp(-0.5 * misfit) / Math.sqrt(TWO_PI * total);
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
      const variance = this.variances[group.scatterGroup];
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
