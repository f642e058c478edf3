/**
 * What parallax and space density say of a star's distance modulus, smoothed by the intrinsic scatter of a
 * track: H(x) = integral of p(mu) N(x; mu, variance) d mu, with its first two moments.
 *
 * p(mu) is the exponentially decreasing space density of Bailer-Jones 2015 (PASP 127, 994),
 * r^2 exp(-r/L) / (2 L^3) dr, turned into d mu, times the parallax likelihood N(w; 1/r, sigma). A good
 * parallax makes it a Gaussian and H a closed form; a weak, negative or missing one is done on a grid.
 */
export class DistanceTerm {
  /** Results of the last `momentsAt`. */
  modulusMean_mag = 0;
  modulusVariance_mag2 = 0;

  private gaussian = false;
  private mean_mag = 0;
  private variance_mag2 = 0;
  private weight = 0;
  private gridStart_mag = 0;
  private gridCount = 0;
  private readonly prior = new Float64Array(GRID_LIMIT);
  private readonly smoothed: SmoothedTable[];

  constructor(
    private readonly lengthScale_pc: number,
    groups: number,
  ) {
    this.smoothed = Array.from({ length: groups }, () => new SmoothedTable());
  }

  /**
   * Takes a star's parallax; NaN for none. `variances` are those of the track groups (scatter plus the
   * photometric error of the common offset), used when a grid is needed.
   */
  prepare(parallax_mas: number, sigma_mas: number, variances: Float64Array): void {
    this.gaussian = parallax_mas > GOOD_PARALLAX * sigma_mas;
    if (this.gaussian) this.prepareGaussian(parallax_mas, sigma_mas);
    else this.prepareGrid(parallax_mas, sigma_mas, variances);
  }

  /** H for a node that wants the offset x; 0 where it is nil, or where the misfit exceeds the limit. */
  densityAt(x_mag: number, variance_mag2: number, group: number, limit_chi2: number): number {
    if (!this.gaussian) return this.smoothed[group].value(x_mag, this.gridStart_mag);
    const total = this.variance_mag2 + variance_mag2;
    const difference = x_mag - this.mean_mag;
    const misfit = (difference * difference) / total;
    if (misfit > limit_chi2) return 0;
    return (this.weight * Math.exp(-0.5 * misfit)) / Math.sqrt(TWO_PI * total);
  }

  /** Mean and variance of the modulus for a node that wants the offset x. */
  momentsAt(x_mag: number, variance_mag2: number, group: number): void {
    if (!this.gaussian) {
      this.smoothed[group].moments(x_mag, this.gridStart_mag, this);
      return;
    }
    const gain = this.variance_mag2 / (this.variance_mag2 + variance_mag2);
    this.modulusMean_mag = this.mean_mag + gain * (x_mag - this.mean_mag);
    this.modulusVariance_mag2 = this.variance_mag2 * (1 - gain);
  }

  /** Offsets outside into[0] to into[1] are ruled out at this limit, for a track group of this variance. */
  range(variance_mag2: number, limit_chi2: number, into: Float64Array): void {
    if (this.gaussian) {
      const reach = Math.sqrt(limit_chi2 * (this.variance_mag2 + variance_mag2));
      into[0] = this.mean_mag - reach;
      into[1] = this.mean_mag + reach;
    } else {
      const reach = REACH_SIGMA * Math.sqrt(variance_mag2);
      into[0] = this.gridStart_mag - reach;
      into[1] = this.gridStart_mag + this.gridCount * GRID_STEP_MAG + reach;
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

  private prepareGrid(parallax_mas: number, sigma_mas: number, variances: Float64Array): void {
    const hasParallax = sigma_mas > 0 && !Number.isNaN(parallax_mas);
    const reach_mas = PARALLAX_REACH_SIGMA * sigma_mas;
    const nearest_pc = hasParallax && parallax_mas + reach_mas > 0 ? 1000 / (parallax_mas + reach_mas) : 1;
    const limit_pc = FARTHEST_LENGTHS * this.lengthScale_pc;
    const farthest_pc =
      hasParallax && parallax_mas > reach_mas
        ? Math.min(limit_pc, 1000 / (parallax_mas - reach_mas))
        : limit_pc;
    const start = 5 * Math.log10(nearest_pc) - 5;
    const end = Math.max(start + GRID_STEP_MAG, 5 * Math.log10(farthest_pc) - 5);
    this.gridStart_mag = start;
    this.gridCount = Math.min(GRID_LIMIT, Math.ceil((end - start) / GRID_STEP_MAG) + 1);
    const norm = hasParallax ? 1 / (sigma_mas * Math.sqrt(TWO_PI)) : 1;
    let distance_pc = nearest_pc;
    for (let i = 0; i < this.gridCount; i++) {
      const misfit = hasParallax ? (parallax_mas - 1000 / distance_pc) / sigma_mas : 0;
      this.prior[i] =
        volumeDensity(distance_pc, this.lengthScale_pc) * norm * Math.exp(-0.5 * misfit * misfit);
      distance_pc *= GRID_STEP_FACTOR;
    }
    for (let group = 0; group < this.smoothed.length; group++) {
      this.smoothed[group].fill(this.prior, this.gridCount, variances[group]);
    }
  }
}

/** p(mu) of the space density alone, integrating to 1. */
function volumeDensity(distance_pc: number, lengthScale_pc: number): number {
  const ratio = distance_pc / lengthScale_pc;
  return (Math.LN10 / 5) * 0.5 * ratio * ratio * ratio * Math.exp(-ratio);
}

/** Above this parallax S/N the posterior in mu is a Gaussian to within a few per cent. */
const GOOD_PARALLAX = 10;
const GRID_STEP_MAG = 0.2;
const GRID_STEP_FACTOR = 10 ** (GRID_STEP_MAG / 5);
const GRID_LIMIT = 256;
const FARTHEST_LENGTHS = 15;
const PARALLAX_REACH_SIGMA = 6;
const TWO_PI = 2 * Math.PI;
/** The smoothing kernel and the table reach this many sigma. */
const REACH_SIGMA = 4.5;
const KERNEL_LIMIT = 64;

/** The prior convolved with one Gaussian of variance s^2. */
class SmoothedTable {
  private margin = 0;
  private count = 0;
  private variance_mag2 = 0;
  private readonly table = new Float64Array(GRID_LIMIT + 2 * KERNEL_LIMIT + 2);
  private readonly kernel = new Float64Array(KERNEL_LIMIT + 1);

  fill(prior: Float64Array, priorCount: number, variance_mag2: number): void {
    const { kernel, table } = this;
    const sigma = Math.sqrt(variance_mag2);
    const reach = Math.min(KERNEL_LIMIT, Math.ceil((REACH_SIGMA * sigma) / GRID_STEP_MAG));
    for (let k = 0; k <= reach; k++) {
      const z = (k * GRID_STEP_MAG) / sigma;
      kernel[k] = (GRID_STEP_MAG * Math.exp(-0.5 * z * z)) / (sigma * Math.sqrt(TWO_PI));
    }
    this.variance_mag2 = variance_mag2;
    this.margin = reach;
    this.count = priorCount + 2 * reach;
    table.fill(0, 0, this.count);
    for (let j = 0; j < priorCount; j++) {
      const p = prior[j];
      if (p < SMALLEST) continue;
      const centre = j + reach;
      table[centre] += p * kernel[0];
      for (let k = 1; k <= reach; k++) {
        const share = p * kernel[k];
        table[centre - k] += share;
        table[centre + k] += share;
      }
    }
  }

  /** Between two entries on a straight line; 0 outside. */
  value(x_mag: number, start_mag: number): number {
    const position = (x_mag - start_mag) / GRID_STEP_MAG + this.margin;
    const i = Math.floor(position);
    if (!(i >= 0 && i + 1 < this.count)) return 0;
    return this.table[i] + (position - i) * (this.table[i + 1] - this.table[i]);
  }

  /**
   * A convolution with a Gaussian of variance s^2 knows its own posterior moments: mean = x + s^2 H'/H, variance =
   * s^2 + s^4 (H''/H - (H'/H)^2) (Tweedie's formula; Robbins 1956), with H' and H'' from differences.
   */
  moments(x_mag: number, start_mag: number, into: DistanceTerm): void {
    const { table, variance_mag2 } = this;
    const position = (x_mag - start_mag) / GRID_STEP_MAG + this.margin;
    const i = Math.max(1, Math.min(this.count - 3, Math.floor(position)));
    const share = Math.max(0, Math.min(1, position - i));
    const mix = (a: number, b: number) => a + share * (b - a);
    const value = mix(table[i], table[i + 1]);
    const slope = mix(table[i + 1] - table[i - 1], table[i + 2] - table[i]) / (2 * GRID_STEP_MAG);
    const bend =
      mix(table[i + 1] - 2 * table[i] + table[i - 1], table[i + 2] - 2 * table[i + 1] + table[i]) /
      GRID_STEP_MAG ** 2;
    const ratio = slope / value;
    into.modulusMean_mag = x_mag + variance_mag2 * ratio;
    into.modulusVariance_mag2 = Math.max(
      0,
      variance_mag2 + variance_mag2 ** 2 * (bend / value - ratio * ratio),
    );
  }
}

/** Prior densities below this add nothing. */
const SMALLEST = 1e-30;
