import { GrowingColumns } from './growing.js';

const SUMS = ['count', 'weight', 'first', 'second'] as const;

type Sums = GrowingColumns<(typeof SUMS)[number]>;

/**
 * Running weighted means of all stars in one band. Readings that the file itself doubts are summed apart and
 * count only where a star has no others.
 */
export class BandMeans {
  /** Each star's first magnitude: sums of differences from it stay free of cancellation. */
  private readonly reference = new GrowingColumns(['mag'], Number.NaN);
  private readonly clean: Sums = new GrowingColumns(SUMS, 0);
  private readonly doubtful: Sums = new GrowingColumns(SUMS, 0);

  add(star: number, mag: number, sigma_mag: number, isSuspect: boolean): void {
    this.ensure(star + 1);
    const reference = this.reference.get('mag');
    if (Number.isNaN(reference[star])) reference[star] = mag;
    const sums = isSuspect ? this.doubtful : this.clean;
    const weight = 1 / sigma_mag ** 2;
    const difference = mag - reference[star];
    sums.get('count')[star] += 1;
    sums.get('weight')[star] += weight;
    sums.get('first')[star] += weight * difference;
    sums.get('second')[star] += weight * difference * difference;
  }

  clear(): void {
    this.reference.clear();
    this.clean.clear();
    this.doubtful.clear();
  }

  /** Weighted mean; NaN without a reading. */
  mag(star: number): number {
    const sums = this.sumsOf(star);
    return this.reference.get('mag')[star] + sums.get('first')[star] / sums.get('weight')[star];
  }

  /** Error of the mean from the readings' errors; NaN without a reading. */
  sigma(star: number): number {
    const weight = this.sumsOf(star).get('weight')[star];
    return weight > 0 ? 1 / Math.sqrt(weight) : Number.NaN;
  }

  /** Readings that the mean rests on. */
  count(star: number): number {
    return this.sumsOf(star).get('count')[star];
  }

  /** Chi-square about the mean, count - 1 degrees of freedom. */
  chi2(star: number): number {
    const sums = this.sumsOf(star);
    const weight = sums.get('weight')[star];
    if (!(weight > 0)) return Number.NaN;
    return Math.max(0, sums.get('second')[star] - sums.get('first')[star] ** 2 / weight);
  }

  /** Weighted standard deviation of the readings; NaN with fewer than two. */
  scatter(star: number): number {
    const sums = this.sumsOf(star);
    const count = sums.get('count')[star];
    if (count < 2) return Number.NaN;
    return Math.sqrt(((this.chi2(star) / (count - 1)) * count) / sums.get('weight')[star]);
  }

  /** Does the mean rest on doubtful readings only? */
  isSuspect(star: number): boolean {
    this.ensure(star + 1);
    return this.clean.get('count')[star] === 0 && this.doubtful.get('count')[star] > 0;
  }

  private sumsOf(star: number): Sums {
    return this.isSuspect(star) ? this.doubtful : this.clean;
  }

  private ensure(count: number): void {
    this.reference.ensure(count);
    this.clean.ensure(count);
    this.doubtful.ensure(count);
  }
}
