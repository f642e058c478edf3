import { colourName } from '../../science/bands.js';
import { oddsText } from '../../science/odds/index.js';
import { isBetween } from './between-sequences.js';
import type { FlagRule } from './rule.js';
import { besideDwarfs, distanceWords, place } from './words.js';

/** No sequence comes near the star's colours and brightness. Source: the flat class of the track fit. */
export const fitsNone: FlagRule = {
  code: 'fits-none',
  judge: evidence => {
    if (isBetween(evidence)) return undefined;
    const odds = evidence.odds.none;
    return {
      odds,
      because: () =>
        `${place(evidence)}${besideDwarfs(evidence)}; no class fits, odds ${oddsText(odds)}: a second ${colourName(evidence.axes.colour)} would tell an error from a find${distanceWords(evidence)}`,
    };
  },
};
