/**
 * What parallax and space density say of a star's distance modulus, smoothed by the intrinsic scatter of a
 * track: H(x) = integral of p(mu) N(x; mu, variance) d mu, with its first two moments.
 *
 * p(mu) is the exponentially decreasing space density of Bailer-Jones 2015 (PASP 127, 994),
 * r^2 exp(-r/L) / (2 L^3) dr, turned into d mu, times the parallax likelihood N(w; 1/r, sigma). A good
 * parallax makes it a Gaussian and H a closed form; a weak, negative or missing one is done on a grid.
 */
export class DistanceTerm {
  /** Results of the last `at`. */
  density = 0;
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

  /**
   * Evaluates H and the posterior of the modulus for a track node that wants the offset x. False (and nothing
   * evaluated) when H is nil, or the misfit exceeds the limit.
   */
  at(x_mag: number, variance_mag2: number, group: number, limit_chi2: number): boolean {
    if (!this.gaussian) return this.smoothed[group].lookUp(x_mag, this.gridStart_mag, this);
    const total = this.variance_mag2 + variance_mag2;
    const difference = x_mag - this.mean_mag;
    const misfit = (difference * difference) / total;
    if (misfit > limit_chi2) return false;
    this.density = (this.weight * Math.exp(-0.5 * misfit)) / Math.sqrt(TWO_PI * total);
    const gain = this.variance_mag2 / total;
    this.modulusMean_mag = this.mean_mag + gain * difference;
    this.modulusVariance_mag2 = this.variance_mag2 * (1 - gain);
    return true;
  }

  /** Offsets outside [0] to [1] are ruled out at this limit, for a track group of this variance. */
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
    const nearest_pc =
      hasParallax && parallax_mas + 7 * sigma_mas > 0 ? 1000 / (parallax_mas + 7 * sigma_mas) : 1;
    const limit_pc = FARTHEST_LENGTHS * this.lengthScale_pc;
    const farthest_pc =
      hasParallax && parallax_mas > 7 * sigma_mas
        ? Math.min(limit_pc, 1000 / (parallax_mas - 7 * sigma_mas))
        : limit_pc;
    const start = 5 * Math.log10(nearest_pc) - 5;
    const end = Math.max(start + GRID_STEP_MAG, 5 * Math.log10(farthest_pc) - 5);
    this.gridStart_mag = start;
    this.gridCount = Math.min(GRID_LIMIT, Math.ceil((end - start) / GRID_STEP_MAG) + 1);
    const norm = hasParallax ? 1 / (sigma_mas * Math.sqrt(TWO_PI)) : 1;
    for (let i = 0; i < this.gridCount; i++) {
      const distance_pc = 10 ** ((start + i * GRID_STEP_MAG + 5) / 5);
      const misfit = hasParallax ? (parallax_mas - 1000 / distance_pc) / sigma_mas : 0;
      this.prior[i] =
        volumeDensity(distance_pc, this.lengthScale_pc) * norm * Math.exp(-0.5 * misfit * misfit);
    }
    for (let group = 0; group < this.smoothed.length; group++) {
      this.smoothed[group].fill(this.prior, this.gridCount, start, variances[group]);
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
const GRID_LIMIT = 256;
const FARTHEST_LENGTHS = 15;
const TWO_PI = 2 * Math.PI;
/** The smoothing kernel and the table reach this many sigma. */
const REACH_SIGMA = 4.5;
const KERNEL_LIMIT = 64;

/** The prior convolved with one Gaussian, with first and second moments of the modulus. */
class SmoothedTable {
  private margin = 0;
  private count = 0;
  private readonly zeroth = new Float64Array(GRID_LIMIT + 2 * KERNEL_LIMIT);
  private readonly first = new Float64Array(GRID_LIMIT + 2 * KERNEL_LIMIT);
  private readonly second = new Float64Array(GRID_LIMIT + 2 * KERNEL_LIMIT);
  private readonly kernel = new Float64Array(KERNEL_LIMIT + 1);

  fill(prior: Float64Array, priorCount: number, start_mag: number, variance_mag2: number): void {
    const sigma = Math.sqrt(variance_mag2);
    const reach = Math.min(KERNEL_LIMIT, Math.ceil((REACH_SIGMA * sigma) / GRID_STEP_MAG));
    for (let k = 0; k <= reach; k++) {
      const z = (k * GRID_STEP_MAG) / sigma;
      this.kernel[k] = (GRID_STEP_MAG * Math.exp(-0.5 * z * z)) / (sigma * Math.sqrt(TWO_PI));
    }
    this.margin = reach;
    this.count = priorCount + 2 * reach;
    for (let i = 0; i < this.count; i++) {
      let sum = 0;
      let sumMu = 0;
      let sumMu2 = 0;
      const from = Math.max(0, i - 2 * reach);
      const to = Math.min(priorCount - 1, i);
      for (let j = from; j <= to; j++) {
        const weight = prior[j] * this.kernel[Math.abs(i - reach - j)];
        const mu = start_mag + j * GRID_STEP_MAG;
        sum += weight;
        sumMu += weight * mu;
        sumMu2 += weight * mu * mu;
      }
      this.zeroth[i] = sum;
      this.first[i] = sumMu;
      this.second[i] = sumMu2;
    }
  }

  lookUp(x_mag: number, start_mag: number, into: DistanceTerm): boolean {
    const position = (x_mag - start_mag) / GRID_STEP_MAG + this.margin;
    const i = Math.floor(position);
    if (!(i >= 0 && i + 1 < this.count)) return false;
    const share = position - i;
    const density = mix(this.zeroth, i, share);
    if (!(density > 0)) return false;
    into.density = density;
    into.modulusMean_mag = mix(this.first, i, share) / density;
    into.modulusVariance_mag2 = Math.max(0, mix(this.second, i, share) / density - into.modulusMean_mag ** 2);
    return true;
  }
}

function mix(table: Float64Array, i: number, share: number): number {
  return table[i] + share * (table[i + 1] - table[i]);
}
