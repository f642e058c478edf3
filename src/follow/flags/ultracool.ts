import { oddsText } from '../../science/odds/index.js';
import { subtypeText } from '../../science/spectral-subtype.js';
import { chanceAbove, type FlagRule } from './rule.js';
import { distanceWords, place } from './words.js';

/** A dwarf of M7 or later (the usual meaning of ultracool; Kirkpatrick et al. 1997, AJ 113, 1421, from memory). */
export const ultracool: FlagRule = {
  code: 'ultracool',
  judge: evidence => {
    if (Number.isNaN(evidence.subtype)) return undefined;
    const late = chanceAbove(evidence.subtype, Math.max(0.3, evidence.subtypeSigma), FIRST_ULTRACOOL_SUBTYPE);
    const odds = late * evidence.odds.V;
    return {
      odds,
      because: () =>
        `${place(evidence)} makes it about ${subtypeText(evidence.subtype)}; ultracool dwarf odds ${oddsText(odds)}${distanceWords(evidence)}`,
    };
  },
};

/** M7, less half a subtype. */
const FIRST_ULTRACOOL_SUBTYPE = 66.5;
