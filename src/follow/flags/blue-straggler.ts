import { oddsText } from '../../science/odds/index.js';
import { chanceAbove, type FlagRule } from './rule.js';
import { distanceWords, place, signed } from './words.js';

/**
 * A cluster member on the main sequence above the cluster's own turn-off, where single stars of its age are
 * gone. Source: turn-off from the profile's age (main-sequence-lifetime.ts); margin of 0.75 mag, which
 * an unresolved pair of two turn-off stars reaches.
 */
export const blueStraggler: FlagRule = {
  code: 'blue-straggler',
  judge: evidence => {
    if (Number.isNaN(evidence.turnOffAbsMag)) return undefined;
    const sequence = evidence.odds.V + evidence.odds.IV;
    const brighter = chanceAbove(
      evidence.turnOffAbsMag - evidence.absMag,
      Math.hypot(evidence.absMagSigma, AGE_MARGIN_MAG),
      MARGIN_MAG,
    );
    const odds = evidence.memberOdds * sequence * brighter;
    return {
      odds,
      because: () =>
        `${place(evidence)} is ${(evidence.turnOffAbsMag - evidence.absMag).toFixed(1)} mag above the cluster's turn-off at M_V ${signed(evidence.turnOffAbsMag)}, still on the main sequence; blue straggler odds ${oddsText(odds)}${distanceWords(evidence)}`,
    };
  },
};

const MARGIN_MAG = 0.75;
/** Uncertainty of the turn-off itself. */
const AGE_MARGIN_MAG = 0.2;
