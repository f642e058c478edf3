const RAD_PER_DEG = Math.PI / 180;
const RAD_PER_MAS = RAD_PER_DEG / 3_600_000;

/**
 * Position after some years of proper motion, without parallax and radial velocity: a step in the tangent
 * plane, so that it holds at the poles. pmRa includes cos(dec). Good to 0.1 arcsec for 10 arcsec/yr over 30 yr.
 */
export function moved(
  ra_deg: number,
  dec_deg: number,
  pmRa_masPerYear: number,
  pmDec_masPerYear: number,
  years: number,
): { readonly ra_deg: number; readonly dec_deg: number } {
  const [sinRa, cosRa] = [Math.sin(ra_deg * RAD_PER_DEG), Math.cos(ra_deg * RAD_PER_DEG)];
  const [sinDec, cosDec] = [Math.sin(dec_deg * RAD_PER_DEG), Math.cos(dec_deg * RAD_PER_DEG)];
  const east = pmRa_masPerYear * RAD_PER_MAS * years;
  const north = pmDec_masPerYear * RAD_PER_MAS * years;
  const x = cosDec * cosRa - east * sinRa - north * sinDec * cosRa;
  const y = cosDec * sinRa + east * cosRa - north * sinDec * sinRa;
  const z = sinDec + north * cosDec;
  const ra = Math.atan2(y, x) / RAD_PER_DEG;
  return { ra_deg: ra < 0 ? ra + 360 : ra, dec_deg: Math.atan2(z, Math.hypot(x, y)) / RAD_PER_DEG };
}
