import { oddsText } from '../../science/odds/index.js';
import { combinedChance } from '../../science/statistics.js';
import type { StarEvidence } from './evidence.js';
import { chanceAbove, type FlagRule } from './rule.js';
import { distanceWords } from './words.js';

/**
 * A soft hint, not a verdict: at most 70 % of the stars inside the strip pulsate (Murphy et al. 2019, MNRAS 485, 2380).
 * Luminous stars: between straight edges in log T and log L for classical Cepheids (loci.csv). Fainter ones: 6500-8600 K
 * at log L 0.6-2.0, delta Scuti and RR Lyrae stars (textbook range, from memory), and those only when tonight's
 * readings are restless already, since ordinary A and F dwarfs fill that place.
 */
export const instabilityStrip: FlagRule = {
  code: 'instability-strip',
  judge: evidence => {
    const { logLuminosity, teff_K } = evidence;
    if (Number.isNaN(logLuminosity + teff_K)) return undefined;
    const isLuminous = logLuminosity >= CEPHEID_LOG_L.from && logLuminosity <= CEPHEID_LOG_L.to;
    const isFaint = logLuminosity >= FAINT_LOG_L.from && logLuminosity <= FAINT_LOG_L.to;
    if (!isLuminous && !(isFaint && isRestless(evidence))) return undefined;
    const [red, blue] = isLuminous ? cepheidEdges_logT(logLuminosity) : FAINT_LOG_T;
    const odds = chanceBetween(evidence, red, blue);
    const kind = isLuminous ? 'Cepheid' : 'delta Scuti and RR Lyrae';
    return {
      odds,
      because: () =>
        `${teff_K.toFixed(0)} K at log L ${logLuminosity.toFixed(1)} lies in the ${kind} strip (${(10 ** red).toFixed(0)}-${(10 ** blue).toFixed(0)} K), odds ${oddsText(odds)}: a time series would tell${distanceWords(evidence)}`,
    };
  },
};

const CEPHEID_LOG_L = { from: 2.4, to: 4.5 };
const FAINT_LOG_L = { from: 0.6, to: 2.0 };
const FAINT_LOG_T = [Math.log10(6500), Math.log10(8600)] as const;

/** Chance of a constant star's readings below which a faint star is called restless. */
const RESTLESS_CHANCE = 1e-3;

function isRestless({ changes }: StarEvidence): boolean {
  return changes.bands.some(
    ({ scatterChance, orderChance }) => combinedChance([scatterChance, orderChance]) < RESTLESS_CHANCE,
  );
}

/** Red and blue edge, straight between their ends (loci.csv, Cepheid). */
function cepheidEdges_logT(logLuminosity: number): readonly [number, number] {
  const share = (logLuminosity - CEPHEID_LOG_L.from) / (CEPHEID_LOG_L.to - CEPHEID_LOG_L.from);
  return [3.77 + share * (3.65 - 3.77), 3.83 + share * (3.76 - 3.83)];
}

function chanceBetween({ teff_K, teffSigma_K }: StarEvidence, red: number, blue: number): number {
  const sigma = Math.max(0.005, teffSigma_K / teff_K / Math.LN10);
  const logT = Math.log10(teff_K);
  return chanceAbove(logT, sigma, red) - chanceAbove(logT, sigma, blue);
}
