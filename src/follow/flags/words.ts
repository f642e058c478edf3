import { colourName } from '../../science/bands.js';
import { oddsText } from '../../science/odds/index.js';
import type { StarEvidence } from './evidence.js';

/** '+11.3' or '-5.0': absolute magnitudes always carry their sign. */
export function signed(value: number, digits = 1): string {
  const text = Math.abs(value).toFixed(digits);
  return `${value < 0 && Number(text) !== 0 ? '-' : '+'}${text}`;
}

/** 'M_V +11.3 at B-V 0.05' */
export function place(evidence: StarEvidence): string {
  return `M_${evidence.axes.band} ${signed(evidence.absMag)} at ${colourName(evidence.axes.colour)} ${evidence.colour.toFixed(2)}`;
}

/** ' lies 8.9 mag below the dwarfs', or nothing where no dwarf has that colour. */
export function besideDwarfs(evidence: StarEvidence): string {
  const offset = evidence.absMag - evidence.dwarfAbsMag;
  if (Number.isNaN(offset)) return '';
  return ` lies ${Math.abs(offset).toFixed(1)} mag ${offset > 0 ? 'below' : 'above'} the dwarfs`;
}

/** '; parallax 12.1 ± 0.3 mas', '; cluster modulus 9.40, member 0.97', '; no distance'. */
export function distanceWords(evidence: StarEvidence): string {
  switch (evidence.distance) {
    case 'parallax':
      return `; parallax ${evidence.parallax_mas.toFixed(decimals(evidence.parallaxSigma_mas))} ± ${evidence.parallaxSigma_mas.toFixed(decimals(evidence.parallaxSigma_mas))} mas`;
    case 'cluster':
      return `; cluster modulus ${evidence.modulus_mag.toFixed(2)}, member odds ${oddsText(evidence.memberOdds)}`;
    case 'none':
      return '; no distance known';
  }
}

function decimals(sigma: number): number {
  return sigma < 0.095 ? 2 : 1;
}

/** The common form of a class flag's sentence. */
export function classSentence(evidence: StarEvidence, name: string, odds: number): string {
  return `${place(evidence)}${besideDwarfs(evidence)}; ${name} odds ${oddsText(odds)}${distanceWords(evidence)}`;
}

/** '02:41', of the clock in UT. */
export function clockWords(time_ms: number): string {
  return new Date(time_ms).toISOString().slice(11, 16);
}

/** '0.35 ± 0.02', with the decimals the error deserves. */
export function withDecimals(value: number, sigma: number): string {
  const digits = sigma < 0.01 ? 3 : 2;
  return `${value.toFixed(digits)} ± ${sigma.toFixed(digits)}`;
}

/** One minus the chance that any of the stars searched, in any of its bands, would do by accident what one does. */
export function oneMinusTrials(chance: number, evidence: StarEvidence): number {
  const trials = Math.max(1, evidence.starsSearched * Math.max(1, evidence.changes.bands.length));
  return Math.exp(trials * Math.log1p(-Math.min(chance, 1 - 1e-12)));
}
