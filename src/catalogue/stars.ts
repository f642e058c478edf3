import { BANDS, type Band } from '../science/bands.js';
import { Astrometry } from './astrometry.js';
import { BandMeans } from './band-means.js';
import { designation } from './coordinates/designation.js';
import type { FrameReadings } from './frame.js';
import { GrowingColumns } from './growing.js';
import { type KeptFrame, keepFrame, lightCurveOf, type StarLightCurve } from './kept-frame.js';
import { ReadingIndex } from './reading-index.js';
import { NO_STAR, StarFinder } from './star-finder.js';

/**
 * All stars of a run as columns. A star keeps its place for good; frames come, and may be replaced when they
 * are reduced again. Columns that are handed out are copies with one element a star, NaN where not known.
 */
export class StarCatalogue {
  /** The file's identifiers; a designation from the position where there is none. */
  readonly ids: string[] = [];
  private readonly positions = new GrowingColumns(['ra_deg', 'dec_deg'], Number.NaN);
  private readonly astrometry = new Astrometry();
  private readonly tallies = new GrowingColumns(['readings', 'lastFrame'], 0);
  private readonly means = new Map<Band, BandMeans>();
  private readonly frames = new Map<number, KeptFrame>();
  private readonly readingsOf = new Map<Band, ReadingIndex>();
  private readonly finder: StarFinder;
  private readonly nameless = new Set<number>();
  private total = 0;

  constructor(matchRadius_arcsec: number) {
    this.finder = new StarFinder(matchRadius_arcsec);
  }

  get count(): number {
    return this.ids.length;
  }

  /** Number of readings of all stars in all bands. */
  get readingCount(): number {
    return this.total;
  }

  /** Bands with at least one reading, in the order of BANDS. */
  get bands(): Band[] {
    return BANDS.filter(band => this.means.has(band));
  }

  get ra_deg(): Float64Array {
    return this.positions.get('ra_deg').slice(0, this.count);
  }

  get dec_deg(): Float64Array {
    return this.positions.get('dec_deg').slice(0, this.count);
  }

  get parallax_mas(): Float64Array {
    return this.astrometry.get('parallax_mas').slice(0, this.count);
  }

  get parallax_sigma_mas(): Float64Array {
    return this.astrometry.get('parallax_sigma_mas').slice(0, this.count);
  }

  get pmRa_masPerYear(): Float64Array {
    return this.astrometry.get('pmRa_masPerYear').slice(0, this.count);
  }

  get pmDec_masPerYear(): Float64Array {
    return this.astrometry.get('pmDec_masPerYear').slice(0, this.count);
  }

  /** E(B-V) of single stars where a file carries it. */
  get reddening_EBV(): Float64Array {
    return this.astrometry.get('reddening_EBV').slice(0, this.count);
  }

  /** Readings of each star in all bands; 0 for a star whose only frame was replaced. */
  get readings(): Uint32Array {
    return Uint32Array.from(this.tallies.get('readings').subarray(0, this.count));
  }

  /** Index of the newest frame that holds each star. */
  get lastFrame(): Uint32Array {
    return Uint32Array.from(this.tallies.get('lastFrame').subarray(0, this.count));
  }

  /** 1 for stars with a band in which every reading is doubtful. */
  get suspect(): Uint8Array {
    const bands = [...this.means.values()];
    return Uint8Array.from({ length: this.count }, (_, star) =>
      bands.some(band => band.isSuspect(star)) ? 1 : 0,
    );
  }

  /** Weighted mean magnitude of each star. */
  mag(band: Band): Float64Array {
    return this.column(band, (means, star) => means.mag(star));
  }

  /** Error of the mean from the errors of the readings. */
  sigma(band: Band): Float64Array {
    return this.column(band, (means, star) => means.sigma(star));
  }

  /** Number of readings behind the mean. */
  readingsIn(band: Band): Float64Array {
    return this.column(band, (means, star) => means.count(star));
  }

  /** Chi-square of the readings about the mean; readingsIn(band) - 1 degrees of freedom. */
  chi2(band: Band): Float64Array {
    return this.column(band, (means, star) => means.chi2(star));
  }

  /** Standard deviation of the readings; NaN with fewer than two. */
  scatter(band: Band): Float64Array {
    return this.column(band, (means, star) => means.scatter(star));
  }

  /**
   * Takes a frame in and returns the star of each row. A frame under an index that is already there replaces
   * the earlier one.
   */
  absorb(frame: FrameReadings, frameIndex: number): Uint32Array {
    this.forget(frameIndex);
    const { positions } = this;
    const matched = this.finder.match(frame, positions.get('ra_deg'), positions.get('dec_deg'), this.count);
    const stars = Uint32Array.from(matched, (star, row) =>
      star === NO_STAR ? this.addStar(frame, row) : star,
    );
    stars.forEach((star, row) => {
      this.takeName(frame.ids[row], star);
      this.addPosition(frame, row, star);
    });
    const kept = keepFrame(frame, stars);
    this.frames.set(frameIndex, kept);
    this.addReadings(kept, frameIndex);
    return stars;
  }

  /** Takes a frame out again; its stars keep their places, their means follow. */
  forget(frameIndex: number): void {
    if (!this.frames.delete(frameIndex)) return;
    this.astrometry.clear();
    this.tallies.clear();
    this.means.clear();
    this.readingsOf.clear();
    this.total = 0;
    for (const [index, frame] of this.frames) this.addReadings(frame, index);
  }

  /** Readings of a star on frames with a time, in order of time. */
  lightCurve(star: number, band: Band): StarLightCurve {
    return lightCurveOf(this.frames, this.readingsOf.get(band), star, band);
  }

  private column(band: Band, value: (means: BandMeans, star: number) => number): Float64Array {
    const means = this.means.get(band);
    const out = new Float64Array(this.count).fill(Number.NaN);
    if (means === undefined) return out;
    for (let star = 0; star < out.length; star++) out[star] = value(means, star);
    return out;
  }

  private addStar(frame: FrameReadings, row: number): number {
    const star = this.ids.length;
    const [ra, dec] = [frame.ra_deg[row], frame.dec_deg[row]];
    this.ids.push(this.freeName(frame.ids[row], ra, dec));
    if (frame.ids[row] === '') this.nameless.add(star);
    this.finder.name(this.ids[star], star);
    this.positions.ensure(star + 1);
    this.positions.get('ra_deg')[star] = ra;
    this.positions.get('dec_deg')[star] = dec;
    return star;
  }

  /** The file's identifier if no other star has it, else a designation, else either with a number behind it. */
  private freeName(own: string, ra_deg: number, dec_deg: number): string {
    if (own !== '' && !this.finder.isTaken(own)) return own;
    const base = Number.isNaN(ra_deg + dec_deg) ? own : designation(ra_deg, dec_deg);
    let name = base;
    for (let number = 2; this.finder.isTaken(name); number++) name = `${base} (${number})`;
    return name;
  }

  /** A star that had to be named after its position takes the first identifier a file has for it. */
  private takeName(own: string, star: number): void {
    if (own !== '' && this.nameless.has(star) && !this.finder.isTaken(own)) {
      this.nameless.delete(star);
      this.ids[star] = own;
    }
    this.finder.name(own, star);
  }

  private addReadings(frame: KeptFrame, frameIndex: number): void {
    this.astrometry.ensure(this.count);
    this.tallies.ensure(this.count);
    const readings = this.tallies.get('readings');
    const lastFrame = this.tallies.get('lastFrame');
    const { stars, suspect } = frame;
    for (const star of stars) lastFrame[star] = Math.max(lastFrame[star], frameIndex);
    this.astrometry.add(stars, frame.astrometry);
    for (const { band, mag, sigma_mag } of frame.bands) {
      const means = this.means.get(band) ?? new BandMeans();
      this.means.set(band, means);
      const index = this.readingsOf.get(band) ?? new ReadingIndex();
      this.readingsOf.set(band, index);
      for (let row = 0; row < stars.length; row++) {
        if (Number.isNaN(mag[row])) continue;
        means.add(stars[row], mag[row], sigma_mag[row], suspect[row] === 1);
        index.add(stars[row], frameIndex, row);
        readings[stars[row]]++;
        this.total++;
      }
    }
  }

  /** A star that was known by its identifier only gets its position from the first frame that has one. */
  private addPosition(frame: FrameReadings, row: number, star: number): void {
    const ra = this.positions.get('ra_deg');
    if (!Number.isNaN(ra[star]) || Number.isNaN(frame.ra_deg[row])) return;
    ra[star] = frame.ra_deg[row];
    this.positions.get('dec_deg')[star] = frame.dec_deg[row];
    this.finder.forgetIndex();
  }
}
