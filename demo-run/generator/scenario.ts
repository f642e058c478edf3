/** The invented scenario: an open cluster that does not exist, seen from a hill that does not exist. */
export const SCENARIO = {
  seed: 20_261_108,
  field: { ra_deg: 36.1, dec_deg: 33.4, width_deg: 0.5 },
  cluster: {
    modulus_mag: 10.4,
    extinction_AV: 0.25,
    members: 560,
    giants: 7,
    /** Half of the members lie within this radius. */
    halfRadius_deg: 0.08,
    /** Brightest main-sequence member: what is left at 1.2 Gyr. */
    turnOff_absMagV: 1.8,
    faintest_absMagV: 7.9,
    binaryShare: 0.25,
    scatter_mag: 0.05,
  },
  background: {
    stars: 930,
    lengthScale_pc: 1350,
    brightest_V: 10.5,
    faintest_V: 18.3,
    scatter_mag: 0.22,
    colourScatter_mag: 0.015,
  },
  night: {
    firstMid: '2026-11-08T18:40:00Z',
    frames: 36,
    interval_min: 15,
    exposure_s: { B: 40, V: 20 },
    /** From the end of an exposure to its table. */
    reduction_s: 45,
  },
  clouds: { from: '2026-11-09T00:00:00Z', to: '2026-11-09T01:00:00Z', deepest_mag: 0.45 },
} as const;

/** Extinction in B as a multiple of that in V (Schlafly & Finkbeiner 2011). */
export const AB_PER_AV = 1.322;
