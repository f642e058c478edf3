import type { FrameReadings } from './frame.js';
import { separation_deg, ZoneIndex } from './match.js';

/** A star under a known identifier may have moved this many match radii (proper motion, other epochs). */
const IDENTIFIER_RADII = 10;

/** Stars added since the last full index before a new one is made, at least and as a share of all. */
const TAIL_STARS = 1000;
const TAIL_SHARE = 0.25;

export const NO_STAR = -1;

/** Finds the stars that the rows of a frame belong to. */
export class StarFinder {
  private readonly byId = new Map<string, number>();
  private readonly radius_deg: number;
  /** Two indexes, so that a few new stars on each frame do not cost a sort of all. */
  private main: ZoneIndex | undefined;
  private mainEnd = 0;
  private tail: ZoneIndex | undefined;
  private tailEnd = 0;

  constructor(matchRadius_arcsec: number) {
    this.radius_deg = matchRadius_arcsec / 3600;
  }

  /** Does an identifier already stand for a star? */
  isTaken(id: string): boolean {
    return this.byId.has(id);
  }

  /** Remembers an identifier; the first star under it keeps it. */
  name(id: string, star: number): void {
    if (id !== '' && !this.byId.has(id)) this.byId.set(id, star);
  }

  /** To be called when a star without a position has got one. */
  forgetIndex(): void {
    this.main = undefined;
    this.tail = undefined;
    this.mainEnd = 0;
    this.tailEnd = 0;
  }

  /**
   * The star of each row, NO_STAR for a new one; no star gets two rows. Known identifiers first, then the
   * nearest within the radius: of all possible pairs the closest come together first.
   */
  match(frame: FrameReadings, ra_deg: Float64Array, dec_deg: Float64Array, stars: number): Int32Array {
    this.refresh(ra_deg, dec_deg, stars);
    const starOfRow = new Int32Array(frame.rows).fill(NO_STAR);
    const rowOfStar = new Int32Array(stars).fill(NO_STAR);
    const separations = new Float64Array(stars).fill(Number.POSITIVE_INFINITY);
    if (frame.hasIds) this.matchByIds(frame, ra_deg, dec_deg, starOfRow, rowOfStar, separations);

    // Each row asks for the nearest star that no closer row holds; a row that is put out asks again.
    for (let first = 0; first < frame.rows; first++) {
      let row = starOfRow[first] === NO_STAR ? first : NO_STAR;
      while (row !== NO_STAR) {
        const [ra, dec] = [frame.ra_deg[row], frame.dec_deg[row]];
        const star = this.nearest(ra, dec, ra_deg, dec_deg, (s, separation) => separation < separations[s]);
        if (star === NO_STAR) break;
        const putOut = rowOfStar[star];
        rowOfStar[star] = row;
        starOfRow[row] = star;
        separations[star] = separation_deg(ra, dec, ra_deg[star], dec_deg[star]);
        if (putOut !== NO_STAR) starOfRow[putOut] = NO_STAR;
        row = putOut;
      }
    }
    return starOfRow;
  }

  /**
   * Pairs rows and stars of the same identifier, unless their positions speak against it. Where most do, the
   * identifiers are running numbers of each file and mean nothing.
   */
  private matchByIds(
    frame: FrameReadings,
    ra_deg: Float64Array,
    dec_deg: Float64Array,
    starOfRow: Int32Array,
    rowOfStar: Int32Array,
    separations: Float64Array,
  ): void {
    const agreeing: number[] = [];
    let known = 0;
    for (let row = 0; row < frame.rows; row++) {
      const star = this.byId.get(frame.ids[row]);
      if (star === undefined) continue;
      known++;
      const separation = separation_deg(frame.ra_deg[row], frame.dec_deg[row], ra_deg[star], dec_deg[star]);
      if (!(separation > IDENTIFIER_RADII * this.radius_deg)) agreeing.push(row);
    }
    if (agreeing.length * 2 <= known) return;
    for (const row of agreeing) {
      const star = this.byId.get(frame.ids[row]) as number;
      if (rowOfStar[star] !== NO_STAR) continue;
      starOfRow[row] = star;
      rowOfStar[star] = row;
      separations[star] = Number.NEGATIVE_INFINITY;
    }
  }

  private nearest(
    ra: number,
    dec: number,
    ra_deg: Float64Array,
    dec_deg: Float64Array,
    accept: (star: number, separation: number) => boolean,
  ): number {
    if (Number.isNaN(ra) || Number.isNaN(dec)) return NO_STAR;
    const a = this.main?.nearest(ra, dec, accept) ?? NO_STAR;
    const b = this.tail?.nearest(ra, dec, accept) ?? NO_STAR;
    if (a === NO_STAR || b === NO_STAR) return a === NO_STAR ? b : a;
    const distance = (star: number) => separation_deg(ra, dec, ra_deg[star], dec_deg[star]);
    return distance(a) <= distance(b) ? a : b;
  }

  private refresh(ra_deg: Float64Array, dec_deg: Float64Array, stars: number): void {
    if (stars === this.tailEnd) return;
    if (stars - this.mainEnd > Math.max(TAIL_STARS, TAIL_SHARE * this.mainEnd)) {
      this.main = new ZoneIndex(ra_deg, dec_deg, 0, stars, this.radius_deg);
      this.mainEnd = stars;
      this.tail = undefined;
    } else this.tail = new ZoneIndex(ra_deg, dec_deg, this.mainEnd, stars, this.radius_deg);
    this.tailEnd = stars;
  }
}
