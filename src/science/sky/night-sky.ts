/**
 * Path through the glowing layer, for sky brightness only: Krisciunas & Schaefer 1991, PASP 103, 1033, eq. 3.
 * Not for the extinction of stars.
 */
export function skyPath(zenithDistance_deg: number): number {
  return (1 - 0.96 * Math.sin((zenithDistance_deg * Math.PI) / 180) ** 2) ** -0.5;
}

/**
 * Dark-sky brightness away from the zenith, mag/arcsec^2: brighter by the longer glowing path, dimmer by its
 * extinction (Krisciunas & Schaefer 1991, eq. 2, in magnitudes).
 */
export function darkSky_magPerArcsec2(
  zenith_magPerArcsec2: number,
  extinction_magPerAirmass: number,
  zenithDistance_deg: number,
): number {
  const path = skyPath(zenithDistance_deg);
  return zenith_magPerArcsec2 - 2.5 * Math.log10(path) + extinction_magPerAirmass * (path - 1);
}
