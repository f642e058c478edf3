import type { BandChange, StarEvidence } from './evidence.js';
import { chanceAbove, type FlagRule } from './rule.js';

/** Changes below this are left to the variable flag: seeing and colour terms reach it. */
const LEAST_CHANGE_MAG = 0.1;

/** The star ended the night fainter than it began it. */
export const faded: FlagRule = { code: 'faded', judge: evidence => drift(evidence, 1) };

/** The star ended the night brighter than it began it. */
export const brightened: FlagRule = { code: 'brightened', judge: evidence => drift(evidence, -1) };

function drift(evidence: StarEvidence, sign: 1 | -1) {
  const change = strongestDrift(evidence, sign);
  if (change === undefined) return undefined;
  const significance = Math.abs(change.change_mag) / change.changeSigma_mag;
  // One minus the chance of a false alarm among all stars and bands looked at.
  const odds = oneMinusTrials(2 * chanceAbove(-significance, 1, 0), evidence);
  const digits = change.changeSigma_mag < 0.01 ? 3 : 2;
  const word = sign > 0 ? 'fainter' : 'brighter';
  return {
    odds,
    because: () =>
      `${Math.abs(change.change_mag).toFixed(digits)} ± ${change.changeSigma_mag.toFixed(digits)} mag ${word} in ${change.band} than at ${clock(change.from_ms)} UT (${significance.toFixed(0)} sigma, ${change.readings} readings to ${clock(change.to_ms)} UT)`,
  };
}

function strongestDrift(evidence: StarEvidence, sign: 1 | -1): BandChange | undefined {
  const drifting = evidence.changes.filter(
    change => change.change_mag * sign > LEAST_CHANGE_MAG && change.changeSigma_mag > 0,
  );
  return drifting.sort(
    (a, b) => Math.abs(b.change_mag) / b.changeSigma_mag - Math.abs(a.change_mag) / a.changeSigma_mag,
  )[0];
}

/**
 * Scatter beyond the errors in one band (chi-square about the weighted mean), not already told as a drift.
 * Threshold: one minus the chance that any of the stars searched would do so by accident.
 */
export const variable: FlagRule = {
  code: 'variable',
  judge: evidence => {
    if (strongestDrift(evidence, 1) !== undefined || strongestDrift(evidence, -1) !== undefined)
      return undefined;
    const strongest = [...evidence.changes].sort((a, b) => a.scatterChance - b.scatterChance)[0];
    if (strongest === undefined || strongest.range_mag < LEAST_CHANGE_MAG) return undefined;
    return {
      odds: oneMinusTrials(strongest.scatterChance, evidence),
      because: () =>
        `${strongest.band} ranges over ${strongest.range_mag.toFixed(2)} mag in ${strongest.readings} readings, reduced chi-square ${strongest.reducedChi2.toFixed(1)}; chance of that ${strongest.scatterChance < 1e-9 ? 'below 1e-9' : strongest.scatterChance.toExponential(0)}`,
    };
  },
};

function oneMinusTrials(chance: number, evidence: StarEvidence): number {
  const trials = Math.max(1, evidence.starsSearched * Math.max(1, evidence.changes.length));
  return Math.exp(trials * Math.log1p(-Math.min(chance, 1 - 1e-12)));
}

function clock(time_ms: number): string {
  return new Date(time_ms).toISOString().slice(11, 16);
}
