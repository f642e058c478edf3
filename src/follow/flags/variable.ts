import { combinedChance } from '../../science/statistics.js';
import { hasDrift } from './drift.js';
import type { FlagRule } from './rule.js';
import { oneMinusTrials } from './words.js';

/** Ranges below this are what seeing and colour terms do to constant stars. */
const LEAST_RANGE_MAG = 0.1;

/**
 * Restless, and not already told as a drift. Three tests that do not depend on each other in a constant star are made
 * into one chance (Fisher 1925): scatter about the weighted mean without the worst reading (chi-square), order in time
 * (von Neumann 1941), and both bands together (J of Stetson 1996). Odds: one minus the chance of a false alarm among
 * all stars and bands searched.
 */
export const variable: FlagRule = {
  code: 'variable',
  judge: evidence => {
    const { bands, paired } = evidence.changes;
    const [strongest] = [...bands].sort((a, b) => a.scatterChance - b.scatterChance);
    if (strongest === undefined || hasDrift(evidence) || strongest.range_mag < LEAST_RANGE_MAG)
      return undefined;
    const tests = [strongest.scatterChance, strongest.orderChance];
    if (paired !== undefined) tests.push(paired.chance);
    const chance = combinedChance(tests);
    const together =
      paired === undefined
        ? ''
        : `, ${paired.bands.join(' and ')} together by J ${paired.stetsonJ.toFixed(2)} of ${paired.pairs} pairs`;
    return {
      odds: oneMinusTrials(chance, evidence),
      because: () =>
        `${strongest.band} ranges over ${strongest.range_mag.toFixed(2)} mag in ${strongest.readings} readings (middle half ${strongest.interquartileRange_mag.toFixed(2)}), reduced chi-square ${strongest.reducedChi2.toFixed(1)}${together}; chance of that ${chance < 1e-9 ? 'below 1e-9' : chance.toExponential(0)}`,
    };
  },
};
