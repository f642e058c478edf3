const RADIAN = Math.PI / 180;

/** A direction as a unit vector in the equator and equinox of J2000. */
export type Direction = readonly [number, number, number];

/** The axes of a site's horizon at one time, in the equator and equinox of J2000. */
export interface HorizonAxes {
  readonly north: Direction;
  readonly west: Direction;
  readonly up: Direction;
}

export function directionOf(ra_deg: number, dec_deg: number): Direction {
  const cosine = Math.cos(dec_deg * RADIAN);
  return [cosine * Math.cos(ra_deg * RADIAN), cosine * Math.sin(ra_deg * RADIAN), Math.sin(dec_deg * RADIAN)];
}

export function dot(a: Direction, b: Direction): number {
  return a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
}

export function separation_deg(a: Direction, b: Direction): number {
  const cross = Math.hypot(a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0]);
  return Math.atan2(cross, dot(a, b)) / RADIAN;
}

/** Altitude over a horizon whose zenith is given. */
export function altitudeIn_deg(up: Direction, direction: Direction): number {
  return Math.asin(Math.max(-1, Math.min(1, dot(up, direction)))) / RADIAN;
}

/** Azimuth from north through east, 0 to 360, of parts towards north and west. */
export function azimuthOf_deg(north: number, west: number): number {
  return (Math.atan2(-west, north) / RADIAN + 360) % 360;
}
