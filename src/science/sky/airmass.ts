/**
 * Airmass from the airless (true) altitude: Young 1994, Appl. Opt. 33, 1108. Within 0.2 % of a ray trace through the
 * standard atmosphere down to 5 degrees. NaN below the horizon.
 */
export function airmass(trueAltitude_deg: number): number {
  if (!(trueAltitude_deg >= 0)) return Number.NaN;
  const c = Math.sin((trueAltitude_deg * Math.PI) / 180);
  return (
    (1.002432 * c * c + 0.148386 * c + 0.0096467) / (c ** 3 + 0.149864 * c * c + 0.0102963 * c + 0.000303978)
  );
}

/**
 * Lowest altitude at which the airmass does not exceed a limit, degrees: `airmass` inverted by bisection to
 * 1e-6 degrees.
 */
export function altitudeOfAirmass_deg(limit: number): number {
  let low = 0;
  let high = 90;
  while (high - low > 1e-6) {
    const middle = (low + high) / 2;
    if (airmass(middle) > limit) low = middle;
    else high = middle;
  }
  return high;
}
