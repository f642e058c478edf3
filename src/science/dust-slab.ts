/** A plane-parallel layer of dust that thins out with the height above the Galactic plane. */
export interface DustSlab {
  /** A_V gathered along one kiloparsec in the plane: 0.7-1 near the Sun (common practice). */
  readonly extinction_AVPerKpc: number;
  /** Height over which the dust falls to 1/e: 100-130 pc (common practice). */
  readonly scaleHeight_pc: number;
  /** Galactic latitude of the line of sight. */
  readonly latitude_deg: number;
  /** Clumpiness: standard deviation of A_V as a share of its mean. */
  readonly patchiness: number;
}

/**
 * A_V to a distance: a0 (h / sin|b|) (1 - exp(-d sin|b| / h)), an exponential layer seen at latitude b (Parenago
 * 1940, Astron. Zh. 17, 3; the usual form, from memory). Grows as a0 d near by, and stops growing above the dust.
 */
export function slabExtinction_AV(slab: DustSlab, distance_pc: number): number {
  const perParsec = slab.extinction_AVPerKpc / 1000;
  const climb = Math.sin((Math.abs(slab.latitude_deg) * Math.PI) / 180) / slab.scaleHeight_pc;
  // 1 - exp(-x) loses its digits for small x; in the plane itself the path is the distance.
  return climb * distance_pc < 1e-9
    ? perParsec * distance_pc
    : (perParsec / climb) * -Math.expm1(-climb * distance_pc);
}
