const RAD_PER_DEG = Math.PI / 180;
const STARS_PER_ZONE = 16;

/** Separation on the sky, degrees (haversine formula: exact at small angles). */
export function separation_deg(ra1_deg: number, dec1_deg: number, ra2_deg: number, dec2_deg: number): number {
  const dDec = Math.sin(((dec2_deg - dec1_deg) * RAD_PER_DEG) / 2);
  const dRa = Math.sin(((ra2_deg - ra1_deg) * RAD_PER_DEG) / 2);
  const h = dDec * dDec + Math.cos(dec1_deg * RAD_PER_DEG) * Math.cos(dec2_deg * RAD_PER_DEG) * dRa * dRa;
  return (2 * Math.asin(Math.min(1, Math.sqrt(h)))) / RAD_PER_DEG;
}

/** Which of the stars a search may return, given its separation. */
export type Accept = (star: number, separation: number) => boolean;

/**
 * Stars in declination zones, sorted by right ascension in each (the zones method of Gray et al. 2006,
 * MSR-TR-2006-52): a search looks at a short stretch of one or two zones. Right across RA 0 and at the poles.
 * Stars without a position are left out.
 */
export class ZoneIndex {
  private readonly zoneHeight_deg: number;
  private readonly lowest_deg: number;
  private readonly zoneStarts: Uint32Array;
  /** Stars by zone, then right ascension, with their right ascensions beside them. */
  private readonly order: Uint32Array;
  private readonly sortedRa: Float64Array;

  /** Indexes the stars [from, to) of the two columns. */
  constructor(
    private readonly ra_deg: Float64Array,
    private readonly dec_deg: Float64Array,
    from: number,
    to: number,
    private readonly radius_deg: number,
  ) {
    let lowest = 90;
    let highest = -90;
    let count = 0;
    for (let star = from; star < to; star++) {
      if (Number.isNaN(ra_deg[star]) || Number.isNaN(dec_deg[star])) continue;
      lowest = Math.min(lowest, dec_deg[star]);
      highest = Math.max(highest, dec_deg[star]);
      count++;
    }
    const span = Math.max(0, highest - lowest);
    const zones = Math.max(1, Math.min(Math.floor(span / radius_deg), Math.ceil(count / STARS_PER_ZONE)));
    this.lowest_deg = lowest;
    this.zoneHeight_deg = span > 0 ? span / zones : 1;
    this.zoneStarts = new Uint32Array(zones + 1);
    this.order = new Uint32Array(count);
    this.sortedRa = new Float64Array(count);
    this.fill(from, to, zones);
  }

  /** The nearest star within the radius that is accepted; -1 when there is none. */
  nearest(ra_deg: number, dec_deg: number, accept: Accept): number {
    const radius = this.radius_deg;
    let best = -1;
    let bestSeparation = Number.POSITIVE_INFINITY;
    const look = (star: number) => {
      const separation = separation_deg(ra_deg, dec_deg, this.ra_deg[star], this.dec_deg[star]);
      if (separation > radius || separation >= bestSeparation || !accept(star, separation)) return;
      best = star;
      bestSeparation = separation;
    };
    const half = halfWidth_deg(dec_deg, radius);
    const last = this.zoneStarts.length - 2;
    const zoneFrom = Math.max(0, this.zoneOf(dec_deg - radius));
    const zoneTo = Math.min(last, this.zoneOf(dec_deg + radius));
    for (let zone = zoneFrom; zone <= zoneTo; zone++) {
      if (half >= 180) this.scan(zone, 0, 360, look);
      else {
        this.scan(zone, ra_deg - half, ra_deg + half, look);
        if (ra_deg < half) this.scan(zone, ra_deg - half + 360, 360, look);
        if (ra_deg + half > 360) this.scan(zone, 0, ra_deg + half - 360, look);
      }
    }
    return best;
  }

  /** Zone of a declination, not yet limited to the zones there are. The last zone includes its upper edge. */
  private zoneOf(dec_deg: number): number {
    return Math.floor((dec_deg - this.lowest_deg) / this.zoneHeight_deg);
  }

  private fill(from: number, to: number, zones: number): void {
    const { ra_deg, dec_deg, zoneStarts, order, sortedRa } = this;
    const zoneOfStar = (star: number) => Math.min(zones - 1, this.zoneOf(dec_deg[star]));
    const isPlaced = (star: number) => !Number.isNaN(ra_deg[star]) && !Number.isNaN(dec_deg[star]);
    for (let star = from; star < to; star++) if (isPlaced(star)) zoneStarts[zoneOfStar(star) + 1]++;
    for (let zone = 0; zone < zones; zone++) zoneStarts[zone + 1] += zoneStarts[zone];
    const next = zoneStarts.slice();
    for (let star = from; star < to; star++) if (isPlaced(star)) order[next[zoneOfStar(star)]++] = star;
    for (let zone = 0; zone < zones; zone++) {
      order.subarray(zoneStarts[zone], zoneStarts[zone + 1]).sort((a, b) => ra_deg[a] - ra_deg[b]);
    }
    for (let i = 0; i < order.length; i++) sortedRa[i] = ra_deg[order[i]];
  }

  private scan(zone: number, low: number, high: number, look: (star: number) => void): void {
    let from = this.zoneStarts[zone];
    let to = this.zoneStarts[zone + 1];
    const end = to;
    while (from < to) {
      const middle = (from + to) >>> 1;
      if (this.sortedRa[middle] < low) from = middle + 1;
      else to = middle;
    }
    for (let i = from; i < end && this.sortedRa[i] <= high; i++) look(this.order[i]);
  }
}

/** Half the stretch of right ascension that a circle covers; 180 when it holds a pole. */
function halfWidth_deg(dec_deg: number, radius_deg: number): number {
  if (Math.abs(dec_deg) + radius_deg >= 90) return 180;
  const sine = Math.sin(radius_deg * RAD_PER_DEG) / Math.cos(dec_deg * RAD_PER_DEG);
  // A hair more, so that rounding never cuts a star at the edge.
  return (Math.asin(Math.min(1, sine)) / RAD_PER_DEG) * (1 + 1e-9) + 1e-12;
}
