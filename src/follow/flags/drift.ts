import type { BandChange, StarEvidence } from './evidence.js';
import { chanceAbove, type Judgement } from './rule.js';
import { clockWords, oneMinusTrials, withDecimals } from './words.js';

/** Changes below this are left to the variable flag: seeing and colour terms reach it. */
const LEAST_CHANGE_MAG = 0.1;

/**
 * Last third of a band's readings against its first third, in units of their error, where the star became fainter
 * (sign 1) or brighter (-1). Odds: one minus the chance of a false alarm among all stars and bands looked at.
 */
export function judgeDrift(evidence: StarEvidence, sign: 1 | -1): Judgement | undefined {
  const change = strongestDrift(evidence, sign);
  if (change === undefined) return undefined;
  const significance = Math.abs(change.change_mag) / change.changeSigma_mag;
  const odds = oneMinusTrials(2 * chanceAbove(-significance, 1, 0), evidence);
  const word = sign > 0 ? 'fainter' : 'brighter';
  return {
    odds,
    because: () =>
      `${withDecimals(Math.abs(change.change_mag), change.changeSigma_mag)} mag ${word} in ${change.band} than at ${clockWords(change.from_ms)} UT (${significance.toFixed(0)} sigma, ${change.readings} readings to ${clockWords(change.to_ms)} UT)`,
  };
}

/** Whether a drift in either direction is large enough to be told as such. */
export function hasDrift(evidence: StarEvidence): boolean {
  return strongestDrift(evidence, 1) !== undefined || strongestDrift(evidence, -1) !== undefined;
}

function strongestDrift(evidence: StarEvidence, sign: 1 | -1): BandChange | undefined {
  const drifting = evidence.changes.bands.filter(
    change => change.change_mag * sign > LEAST_CHANGE_MAG && change.changeSigma_mag > 0,
  );
  return drifting.sort(
    (a, b) => Math.abs(b.change_mag) / b.changeSigma_mag - Math.abs(a.change_mag) / a.changeSigma_mag,
  )[0];
}
