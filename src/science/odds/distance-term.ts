import { fallingExponential } from '../falling-exponential.js';
import { type Kinematics, properMotionDensity } from '../tangential-velocity.js';
import type { DistanceGroup } from './node-groups.js';

/**
 * What parallax and space density say of a star's distance modulus, smoothed by the intrinsic scatter of a
 * track: H(x) = integral of p(mu) N(x; mu, variance) d mu, with its first two moments.
 *
 * p(mu) is the exponentially decreasing space density of Bailer-Jones 2015 (PASP 127, 994),
 * r^2 exp(-r/L) / (2 L^3) dr, turned into d mu, times the parallax likelihood N(w; 1/r, sigma). A good
 * parallax makes it a Gaussian and H a closed form; a weak, negative or missing one is done on a grid. Without any
 * parallax a proper motion stands in: fast stars are probably near.
 */
export class DistanceTerm {
  /** A good parallax: the modulus is Gaussian with this mean and variance, times the weight. */
  isGaussian = false;
  mean_mag = 0;
  variance_mag2 = 0;
  weight = 0;
  /** Results of the last `momentsAt`. */
  modulusMean_mag = 0;
  modulusVariance_mag2 = 0;

  /** The grid: places `start` up to but not including `end` of the lattice of distances. */
  private start = 0;
  private end = 0;
  private readonly latticeDistance_pc: Float64Array;
  private readonly latticeVolume: Float64Array;
  private readonly prior: Float64Array;
  private readonly moving: Float64Array;
  private readonly smoothed: SmoothedTable[];
  /** Which table serves a group: groups of one width share theirs unless their motion sets them apart. */
  private readonly tableOf: Uint8Array;
  private wasPlain = false;

  constructor(
    private readonly lengthScale_pc: number,
    private readonly groups: readonly DistanceGroup[],
  ) {
    const farthest_mag = 5 * Math.log10(FARTHEST_LENGTHS * lengthScale_pc) - 5;
    const count = Math.ceil((farthest_mag - NEAREST_MAG) / GRID_STEP_MAG) + 1;
    this.latticeDistance_pc = Float64Array.from(
      { length: count },
      (_, i) => 10 ** ((NEAREST_MAG + i * GRID_STEP_MAG + 5) / 5),
    );
    this.latticeVolume = this.latticeDistance_pc.map(distance_pc =>
      volumeDensity(distance_pc, lengthScale_pc),
    );
    this.prior = new Float64Array(count);
    this.moving = new Float64Array(count);
    this.smoothed = groups.map(() => new SmoothedTable(count));
    this.tableOf = new Uint8Array(groups.length);
  }

  /**
   * Takes a star's parallax and proper motion; NaN for none. `variances` are those of the groups (scatter plus the
   * photometric error of the common offset), used when a grid is needed.
   */
  prepare(parallax_mas: number, sigma_mas: number, motion_masPerYr: number, variances: Float64Array): void {
    this.isGaussian = isGoodParallax(parallax_mas, sigma_mas);
    if (this.isGaussian) this.prepareGaussian(parallax_mas, sigma_mas);
    else this.prepareGrid(parallax_mas, sigma_mas, motion_masPerYr, variances);
  }

  /** H for a node of a group that wants the offset x, without a good parallax. */
  densityAt(x_mag: number, group: number): number {
    return this.smoothed[this.tableOf[group]].value(x_mag, this.start);
  }

  /** Mean and variance of the modulus for a node of a group that wants the offset x, without a good parallax. */
  momentsAt(x_mag: number, group: number): void {
    this.smoothed[this.tableOf[group]].moments(x_mag, this.start, this);
  }

  /** Offsets outside into[0] to into[1] are ruled out at this limit, for a track group of this variance. */
  range(variance_mag2: number, limit_chi2: number, into: Float64Array): void {
    if (this.isGaussian) {
      const reach = Math.sqrt(limit_chi2 * (this.variance_mag2 + variance_mag2));
      into[0] = this.mean_mag - reach;
      into[1] = this.mean_mag + reach;
    } else {
      const reach = REACH_SIGMA * Math.sqrt(variance_mag2);
      into[0] = NEAREST_MAG + this.start * GRID_STEP_MAG - reach;
      into[1] = NEAREST_MAG + this.end * GRID_STEP_MAG + reach;
    }
  }

  private prepareGaussian(parallax_mas: number, sigma_mas: number): void {
    const distance_pc = 1000 / parallax_mas;
    const sigma_mag = (5 / Math.LN10) * (sigma_mas / parallax_mas);
    this.variance_mag2 = sigma_mag * sigma_mag;
    // The space density tilts the likelihood: r^3 exp(-r/L) rises with the modulus by this slope.
    const slope = (Math.LN10 / 5) * (3 - distance_pc / this.lengthScale_pc);
    // A Gaussian in the parallax is skewed in the modulus: its mean lies 1.5 k sigma^2 beyond (k = ln 10 / 5).
    const skew = 1.5 * (Math.LN10 / 5);
    this.mean_mag = 5 * Math.log10(distance_pc) - 5 + (slope + skew) * this.variance_mag2;
    // N(w; 1/r, sigma) dw = N(mu) d mu: the factor |d w / d mu| keeps it a density in the parallax.
    const jacobian = (Math.LN10 / 5) * parallax_mas;
    this.weight =
      (volumeDensity(distance_pc, this.lengthScale_pc) / jacobian) *
      Math.exp(0.5 * slope * slope * this.variance_mag2);
  }

  private prepareGrid(
    parallax_mas: number,
    sigma_mas: number,
    motion_masPerYr: number,
    variances: Float64Array,
  ): void {
    const hasParallax = sigma_mas > 0 && !Number.isNaN(parallax_mas);
    const { latticeDistance_pc, latticeVolume, prior } = this;
    this.start = 0;
    this.end = prior.length;
    if (!hasParallax) {
      prior.set(latticeVolume);
    } else {
      const reach_mas = PARALLAX_REACH_SIGMA * sigma_mas;
      if (parallax_mas + reach_mas > 0) this.start = this.placeOf(1000 / (parallax_mas + reach_mas));
      if (parallax_mas > reach_mas) this.end = this.placeOf(1000 / (parallax_mas - reach_mas)) + 2;
      this.end = Math.min(this.end, prior.length);
      const norm = 1 / (sigma_mas * Math.sqrt(TWO_PI));
      for (let i = this.start; i < this.end; i++) {
        const misfit = (parallax_mas - 1000 / latticeDistance_pc[i]) / sigma_mas;
        prior[i] = latticeVolume[i] * norm * fallingExponential(0.5 * misfit * misfit);
      }
    }
    const isPlain = !hasParallax && Number.isNaN(motion_masPerYr);
    this.smooth(hasParallax ? Number.NaN : motion_masPerYr, variances, isPlain);
    this.wasPlain = isPlain;
  }

  /** Fills one table for each width, and for each kind of motion where a proper motion is given (not NaN). */
  private smooth(motion_masPerYr: number, variances: Float64Array, isPlain: boolean): void {
    const usesMotion = !Number.isNaN(motion_masPerYr);
    for (let group = 0; group < this.groups.length; group++) {
      const { kinematics } = this.groups[group];
      let table = group;
      for (let earlier = 0; earlier < group && table === group; earlier++) {
        const isAlike = !usesMotion || this.groups[earlier].kinematics === kinematics;
        if (isAlike && variances[earlier] === variances[group]) table = earlier;
      }
      this.tableOf[group] = table;
      if (table < group) continue;
      // Stars of which nothing is known but their brightness have one and the same prior.
      if (isPlain && this.wasPlain && this.smoothed[group].variance_mag2 === variances[group]) continue;
      const prior = usesMotion ? this.withMotion(motion_masPerYr, kinematics) : this.prior;
      this.smoothed[group].fill(prior, this.start, this.end, variances[group]);
    }
  }

  /** The prior over the grid times what a proper motion says; the same array each time. */
  private withMotion(motion_masPerYr: number, kinematics: Kinematics): Float64Array {
    for (let i = this.start; i < this.end; i++) {
      this.moving[i] =
        this.prior[i] * properMotionDensity(motion_masPerYr, this.latticeDistance_pc[i], kinematics);
    }
    return this.moving;
  }

  /** Place of the lattice just before a distance, within the lattice. */
  private placeOf(distance_pc: number): number {
    const place = Math.floor((5 * Math.log10(distance_pc) - 5 - NEAREST_MAG) / GRID_STEP_MAG);
    return Math.max(0, Math.min(this.prior.length - 2, place));
  }
}

/** p(mu) of the space density alone, integrating to 1. */
function volumeDensity(distance_pc: number, lengthScale_pc: number): number {
  const ratio = distance_pc / lengthScale_pc;
  return (Math.LN10 / 5) * 0.5 * ratio * ratio * ratio * Math.exp(-ratio);
}

/** Above this parallax S/N the posterior in mu is a Gaussian to within a few per cent. */
const GOOD_PARALLAX = 10;

/** Whether the distance modulus of so good a parallax may be taken as Gaussian. */
export function isGoodParallax(parallax_mas: number, sigma_mas: number): boolean {
  return parallax_mas > GOOD_PARALLAX * sigma_mas;
}

const GRID_STEP_MAG = 0.2;
/** The lattice of distance moduli begins at one parsec. */
const NEAREST_MAG = -5;
const FARTHEST_LENGTHS = 15;
const PARALLAX_REACH_SIGMA = 6;
const TWO_PI = 2 * Math.PI;
/** The smoothing kernel and the table reach this many sigma. */
const REACH_SIGMA = 4.2;
const KERNEL_LIMIT = 64;

/** The prior convolved with one Gaussian of variance s^2. */
class SmoothedTable {
  private margin = 0;
  private count = 0;
  variance_mag2 = 0;
  private readonly table: Float64Array;
  private readonly kernel = new Float64Array(KERNEL_LIMIT + 1);

  constructor(places: number) {
    this.table = new Float64Array(places + 2 * KERNEL_LIMIT + 2);
  }

  fill(prior: Float64Array, start: number, end: number, variance_mag2: number): void {
    const { kernel, table } = this;
    const sigma = Math.sqrt(variance_mag2);
    const reach = Math.min(KERNEL_LIMIT, Math.ceil((REACH_SIGMA * sigma) / GRID_STEP_MAG));
    for (let k = 0; k <= reach; k++) {
      const z = (k * GRID_STEP_MAG) / sigma;
      kernel[k] = (GRID_STEP_MAG * fallingExponential(0.5 * z * z)) / (sigma * Math.sqrt(TWO_PI));
    }
    this.variance_mag2 = variance_mag2;
    this.margin = reach;
    this.count = end - start + 2 * reach;
    table.fill(0, 0, this.count);
    for (let j = start; j < end; j++) {
      const p = prior[j];
      if (p < SMALLEST) continue;
      const centre = j - start + reach;
      table[centre] += p * kernel[0];
      for (let k = 1; k <= reach; k++) {
        const share = p * kernel[k];
        table[centre - k] += share;
        table[centre + k] += share;
      }
    }
  }

  /** Between two entries on a straight line; 0 outside. */
  value(x_mag: number, start: number): number {
    const position = (x_mag - NEAREST_MAG) / GRID_STEP_MAG - start + this.margin;
    const i = Math.floor(position);
    if (!(i >= 0 && i + 1 < this.count)) return 0;
    return this.table[i] + (position - i) * (this.table[i + 1] - this.table[i]);
  }

  /**
   * A convolution with a Gaussian of variance s^2 knows its own posterior moments: mean = x + s^2 H'/H, variance =
   * s^2 + s^4 (H''/H - (H'/H)^2) (Tweedie's formula; Robbins 1956), with H' and H'' from differences.
   */
  moments(x_mag: number, start: number, into: DistanceTerm): void {
    const { table, variance_mag2 } = this;
    const position = (x_mag - NEAREST_MAG) / GRID_STEP_MAG - start + this.margin;
    const i = Math.max(1, Math.min(this.count - 3, Math.floor(position)));
    const share = Math.max(0, Math.min(1, position - i));
    const before = table[i - 1];
    const here = table[i];
    const next = table[i + 1];
    const value = here + share * (next - here);
    const slopeHere = next - before;
    const bendHere = next - 2 * here + before;
    const beyond = table[i + 2];
    const slope = (slopeHere + share * (beyond - here - slopeHere)) / (2 * GRID_STEP_MAG);
    const bend = (bendHere + share * (beyond - 2 * next + here - bendHere)) / (GRID_STEP_MAG * GRID_STEP_MAG);
    const ratio = slope / value;
    into.modulusMean_mag = x_mag + variance_mag2 * ratio;
    into.modulusVariance_mag2 = Math.max(
      0,
      variance_mag2 + variance_mag2 * variance_mag2 * (bend / value - ratio * ratio),
    );
  }
}

/** Prior densities below this add nothing. */
const SMALLEST = 1e-30;
