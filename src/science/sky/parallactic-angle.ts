const RADIAN = Math.PI / 180;

/**
 * Position angle of the zenith at a star, from north through east, -180 to 180 degrees: the four parts formula in the
 * triangle of pole, zenith and star, which is tan q = sin H / (tan phi cos dec - sin dec cos H) (Meeus 1998,
 * Astronomical Algorithms, eq. 14.1) in terms of altitude and azimuth (from north through east). Not defined at zenith
 * and pole.
 */
export function parallacticAngle_deg(
  latitude_deg: number,
  altitude_deg: number,
  azimuth_deg: number,
): number {
  const [phi, h, azimuth] = [latitude_deg * RADIAN, altitude_deg * RADIAN, azimuth_deg * RADIAN];
  const across = -Math.sin(azimuth) * Math.cos(phi);
  const along = Math.sin(phi) * Math.cos(h) - Math.cos(phi) * Math.sin(h) * Math.cos(azimuth);
  return Math.atan2(across, along) / RADIAN;
}
