import type { Site } from '../settings.js';

export type HorizonLine = Site['horizon'];

/**
 * Altitude as seen, refraction included, of the line at an azimuth, straight between the corners and round through
 * north; 0 without corners.
 */
export function horizonAltitude_deg(line: HorizonLine, azimuth_deg: number): number {
  if (line.length === 0) return 0;
  const next = Math.max(
    0,
    line.findIndex(([azimuth]) => azimuth > azimuth_deg),
  );
  const [from, altitude] = line.at(next - 1) ?? line[0];
  const [until, altitudeThere] = line[next];
  const turn = (degrees: number) => (degrees < 0 ? degrees + 360 : degrees);
  const width_deg = turn(until - from) || 360;
  return altitude + (turn(azimuth_deg - from) / width_deg) * (altitudeThere - altitude);
}
