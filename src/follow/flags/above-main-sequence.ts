import { chanceAbove, type FlagRule } from './rule.js';
import { classSentence } from './words.js';

/**
 * A cool dwarf too bright for its colour: an unresolved pair (an equal one lies 0.753 mag above) or a young
 * star still contracting. Only among dwarfs too faint to have evolved, where age alone does not lift a star off the
 * sequence, and only as class V. Criterion: at least 0.5 mag above (judgement, between the 0.3 mag scatter of
 * the sequence and an equal pair).
 */
export const aboveMainSequence: FlagRule = {
  code: 'above-main-sequence',
  judge: evidence => {
    if (!(evidence.dwarfAbsMag > OLDEST_TURNOFF_ABSMAG)) return undefined;
    const above = evidence.dwarfAbsMag - evidence.absMag;
    const sure = chanceAbove(
      above,
      Math.hypot(evidence.absMagSigma, SLOPE * evidence.colourSigma),
      LIMIT_MAG,
    );
    const odds = sure * evidence.odds.V;
    return { odds, because: () => classSentence(evidence, 'equal binary or young dwarf', odds) };
  },
};

const LIMIT_MAG = 0.5;
/** Dwarfs fainter than this live longer than the Galaxy: none has left the main sequence. */
const OLDEST_TURNOFF_ABSMAG = 5.5;
/** Steepness of the cool main sequence, magnitudes per magnitude of colour (dwarf table, K types: 5 to 6). */
const SLOPE = 5.5;
