import { oddsText } from '../../science/odds/index.js';
import { tangentialVelocity_kmPerS } from '../../science/tangential-velocity.js';
import { chanceAbove, type FlagRule } from './rule.js';
import { distanceWords } from './words.js';

/**
 * Moves across the line of sight faster than stars of the disc do: a visitor from the halo, a runaway, or a wrong
 * distance. Criterion: tangential velocity above 200 km/s, where the halo begins to dominate (Gaia Collaboration,
 * Babusiaux et al. 2018, A&A 616, A10).
 */
export const highVelocity: FlagRule = {
  code: 'high-velocity',
  judge: evidence => {
    if (evidence.distance === 'none') return undefined;
    const { properMotion_masPerYr, fitModulus_mag, fitModulusSigma_mag } = evidence;
    const distance_pc = 10 ** (fitModulus_mag / 5 + 1);
    const velocity = tangentialVelocity_kmPerS(properMotion_masPerYr, distance_pc);
    if (Number.isNaN(velocity)) return undefined;
    // The error of a velocity is that of the distance, which is even in the logarithm.
    const odds = chanceAbove(Math.log10(velocity), fitModulusSigma_mag / 5, Math.log10(HALO_KM_PER_S));
    return {
      odds,
      because: () =>
        `${properMotion_masPerYr.toFixed(0)} mas/yr at ${distance_pc.toFixed(0)} pc are ${velocity.toFixed(0)} km/s across the sky; odds ${oddsText(odds)} of more than ${HALO_KM_PER_S} km/s, too fast for the disc${distanceWords(evidence)}`,
    };
  },
};

const HALO_KM_PER_S = 200;
