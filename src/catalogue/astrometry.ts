import { GrowingColumns } from './growing.js';

export const ASTROMETRY = [
  'parallax_mas',
  'parallax_sigma_mas',
  'pmRa_masPerYear',
  'pmDec_masPerYear',
  'reddening_EBV',
] as const;

export type AstrometryName = (typeof ASTROMETRY)[number];

/** What is known of each star beside its brightness; NaN where not known. */
export class Astrometry {
  private readonly columns = new GrowingColumns(ASTROMETRY, Number.NaN);

  ensure(count: number): void {
    this.columns.ensure(count);
  }

  clear(): void {
    this.columns.clear();
  }

  get(name: AstrometryName): Float64Array {
    return this.columns.get(name);
  }

  /** Of several parallaxes of a star the one with the smallest error counts; of the other values the first. */
  add(stars: Uint32Array, given: ReadonlyMap<AstrometryName, Float64Array>): void {
    this.addParallaxes(stars, given.get('parallax_mas'), given.get('parallax_sigma_mas'));
    for (const [name, values] of given) {
      if (name === 'parallax_mas' || name === 'parallax_sigma_mas') continue;
      const column = this.columns.get(name);
      stars.forEach((star, row) => {
        if (Number.isNaN(column[star])) column[star] = values[row];
      });
    }
  }

  private addParallaxes(
    stars: Uint32Array,
    values: Float64Array | undefined,
    errors: Float64Array | undefined,
  ): void {
    if (values === undefined) return;
    const parallax = this.columns.get('parallax_mas');
    const sigma = this.columns.get('parallax_sigma_mas');
    stars.forEach((star, row) => {
      const error = errors?.[row] ?? Number.NaN;
      const isBetter = Number.isNaN(parallax[star]) || error < sigma[star];
      if (Number.isNaN(values[row]) || !isBetter) return;
      parallax[star] = values[row];
      sigma[star] = error;
    });
  }
}
