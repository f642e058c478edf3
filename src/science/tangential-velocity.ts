import type { Random } from './random.js';

/** Kilometres per second of one milliarcsecond per year at one kiloparsec. */
const KM_S_PER_MAS_YR_KPC = 4.740_47;

/** Two families of motion: the disc with its few fast stars, and the metal-poor stars of thick disc and halo. */
export type Kinematics = 'disc' | 'metal-poor';

interface Component {
  readonly share: number;
  /** Standard deviation of each tangential component, relative to the Sun. */
  readonly sigma_kmPerS: number;
}

/**
 * Thin disc, thick disc and halo: velocity ellipsoids (35, 20, 16), (67, 38, 35), (160, 90, 90) km/s lagging by 15,
 * 46, 220 km/s (Bensby, Feltzing & Lundstrom 2003, A&A 410, 527, Table 1, from memory), averaged over directions
 * together with the Sun's own motion (11, 12, 7) km/s (Schoenrich, Binney & Dehnen 2010, MNRAS 403, 1829): 30, 60 and
 * 180 km/s. Local shares 0.94, 0.059, 0.0015 (same table); among the metal-poor, judgement.
 */
const COMPONENTS: Readonly<Record<Kinematics, readonly Component[]>> = {
  disc: [
    { share: 0.9395, sigma_kmPerS: 30 },
    { share: 0.059, sigma_kmPerS: 60 },
    { share: 0.0015, sigma_kmPerS: 180 },
  ],
  'metal-poor': [
    { share: 0.3, sigma_kmPerS: 60 },
    { share: 0.7, sigma_kmPerS: 180 },
  ],
};

/** Velocity across the line of sight. */
export function tangentialVelocity_kmPerS(motion_masPerYr: number, distance_pc: number): number {
  return (KM_S_PER_MAS_YR_KPC * motion_masPerYr * distance_pc) / 1000;
}

/** Tables rarely carry errors of proper motions; this much is allowed for. */
const MOTION_ERROR_MAS_PER_YR = 1;

/**
 * Probability density of a proper motion (per (mas/yr)^2, of its two components) for a star at a distance: round
 * Gaussians in tangential velocity. It turns a proper motion into a distance in the statistical sense, as the reduced
 * proper motion H = m + 5 log mu + 5 does.
 */
export function properMotionDensity(
  motion_masPerYr: number,
  distance_pc: number,
  kinematics: Kinematics,
): number {
  const kmPerS_perMasPerYr = tangentialVelocity_kmPerS(1, distance_pc);
  let density = 0;
  for (const { share, sigma_kmPerS } of COMPONENTS[kinematics]) {
    const variance = (sigma_kmPerS / kmPerS_perMasPerYr) ** 2 + MOTION_ERROR_MAS_PER_YR ** 2;
    density += (share * Math.exp((-0.5 * motion_masPerYr ** 2) / variance)) / (2 * Math.PI * variance);
  }
  return density;
}

/** Both components of a proper motion, drawn for a star at a distance. */
export function drawProperMotion_masPerYr(
  random: Random,
  distance_pc: number,
  kinematics: Kinematics,
): readonly [number, number] {
  const components = COMPONENTS[kinematics];
  let sum = 0;
  const sums = components.map(({ share }) => {
    sum += share;
    return sum;
  });
  const { sigma_kmPerS } = components[random.weighted(sums)];
  const sigma = sigma_kmPerS / tangentialVelocity_kmPerS(1, distance_pc);
  return [random.normal(0, sigma), random.normal(0, sigma)];
}
