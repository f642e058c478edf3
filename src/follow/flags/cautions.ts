import type { StarEvidence } from './evidence.js';

/** Something wrong with a star's data, and which flags it holds back. */
export interface Caution {
  readonly text: string;
  readonly blocks: (code: string) => boolean;
}

const CHANGE_CODES = new Set(['variable', 'brightened', 'faded', 'colour-changed']);
const everyFlag = () => true;
const classFlags = (code: string) => !CHANGE_CODES.has(code);
/** How fast a star moves does not hang on its colour. */
const colourFlags = (code: string) => classFlags(code) && code !== 'high-velocity';

/** Colours less certain than this do not carry a class. */
const WEAK_COLOUR_MAG = 0.15;
/** A parallax needs this S/N before it alone makes a star unusual. */
const WEAK_PARALLAX_SNR = 3;
/** Luminous stars are far away: a small parallax is part of the evidence, not a weakness of it. */
const FAR_CODES = new Set(['supergiant', 'bright-giant']);

/** What is wrong with the data of a star; empty for a clean one. */
export function standingCautions(evidence: StarEvidence): readonly Caution[] {
  const cautions: Caution[] = [];
  if (evidence.readings > 0 && evidence.suspectReadings === evidence.readings) {
    cautions.push({
      text: 'every reading is marked by the pipeline (saturated, blended or at the edge): a clean frame would settle it',
      blocks: everyFlag,
    });
  }
  if (Number.isNaN(evidence.colour)) {
    cautions.push({
      text: `no ${evidence.axes.colour.blue}-${evidence.axes.colour.red} yet: a frame in the missing band would settle it`,
      blocks: colourFlags,
    });
  } else if (evidence.colourSigma > WEAK_COLOUR_MAG) {
    cautions.push({
      text: `its colour is uncertain by ${evidence.colourSigma.toFixed(2)} mag: more or deeper frames would settle it`,
      blocks: colourFlags,
    });
  }
  if (evidence.distance === 'none') {
    cautions.push({
      text: 'no parallax and no cluster: its brightness rests on the odds alone, a parallax would settle it',
      blocks: classFlags,
    });
  } else if (evidence.distance === 'parallax') {
    const snr = evidence.parallax_mas / evidence.parallaxSigma_mas;
    if (snr < WEAK_PARALLAX_SNR) {
      cautions.push({
        text: `its parallax is only ${snr.toFixed(1)} sigma: a better one would settle it`,
        blocks: code => classFlags(code) && !FAR_CODES.has(code),
      });
    }
  }
  return cautions;
}
