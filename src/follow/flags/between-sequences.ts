import { oddsText } from '../../science/odds/index.js';
import type { StarEvidence } from './evidence.js';
import type { FlagRule } from './rule.js';
import { besideDwarfs, distanceWords, place } from './words.js';

/**
 * Well below the dwarfs and well above the white dwarfs: a white dwarf with a cool companion, or an
 * accreting binary. Criterion: fits no class, at least 2 mag below the one and 1 mag above the other
 * sequence of the same colour (judgement; two blended sequences cannot reach that gap otherwise).
 */
export const betweenSequences: FlagRule = {
  code: 'between-sequences',
  judge: evidence => {
    if (!isBetween(evidence)) return undefined;
    const odds = evidence.odds.none;
    const above = evidence.whiteDwarfAbsMag - evidence.absMag;
    return {
      odds,
      because: () =>
        `${place(evidence)}${besideDwarfs(evidence)} and ${above.toFixed(1)} mag above the white dwarfs; odds ${oddsText(odds)} that it is neither: a white dwarf with a cool companion would lie here${distanceWords(evidence)}`,
    };
  },
};

const BELOW_DWARFS_MAG = 2;
const ABOVE_WHITE_DWARFS_MAG = 1;

export function isBetween(evidence: StarEvidence): boolean {
  return (
    evidence.absMag - evidence.dwarfAbsMag > BELOW_DWARFS_MAG &&
    evidence.whiteDwarfAbsMag - evidence.absMag > ABOVE_WHITE_DWARFS_MAG
  );
}
