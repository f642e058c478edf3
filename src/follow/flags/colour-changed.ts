import { colourName } from '../../science/bands.js';
import { chanceAbove, type FlagRule } from './rule.js';
import { clockWords, oneMinusTrials, withDecimals } from './words.js';

/** Changes below this are within the colour terms of a night. */
const LEAST_CHANGE_MAG = 0.1;

/**
 * The colour of the diagram at the end of the night against that at its beginning (thirds of the readings of each band).
 * A flare or an eclipse of unlike stars changes it, cloud and a change of both bands alike do not. Odds: one minus the
 * chance of a false alarm among all stars searched.
 */
export const colourChanged: FlagRule = {
  code: 'colour-changed',
  judge: evidence => {
    const { blue, red } = evidence.axes.colour;
    const inBlue = evidence.changes.bands.find(change => change.band === blue);
    const inRed = evidence.changes.bands.find(change => change.band === red);
    if (inBlue === undefined || inRed === undefined) return undefined;
    const change_mag = inBlue.change_mag - inRed.change_mag;
    if (Math.abs(change_mag) < LEAST_CHANGE_MAG) return undefined;
    const sigma_mag = Math.hypot(inBlue.changeSigma_mag, inRed.changeSigma_mag);
    const odds = oneMinusTrials(2 * chanceAbove(-Math.abs(change_mag) / sigma_mag, 1, 0), evidence);
    return {
      odds,
      because: () =>
        `${colourName(evidence.axes.colour)} ${withDecimals(Math.abs(change_mag), sigma_mag)} mag ${change_mag > 0 ? 'redder' : 'bluer'} than at ${clockWords(Math.min(inBlue.from_ms, inRed.from_ms))} UT (${(Math.abs(change_mag) / sigma_mag).toFixed(0)} sigma)`,
    };
  },
};
