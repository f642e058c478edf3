import type { Band } from '../science/bands.js';
import type { DiagramAxes } from '../science/odds/index.js';

/** Colours in order of preference, each with the band of the absolute magnitude. */
const CHOICES: readonly (readonly [Band, Band, Band])[] = [
  ['B', 'V', 'V'],
  ['BP', 'RP', 'G'],
  ['V', 'Ic', 'V'],
  ['g', 'r', 'r'],
  ['gP1', 'rP1', 'rP1'],
  ['g', 'i', 'r'],
  ['V', 'Rc', 'V'],
  ['gP1', 'iP1', 'rP1'],
  ['r', 'i', 'r'],
  ['rP1', 'iP1', 'rP1'],
  ['V', 'Ks', 'V'],
  ['G', 'Ks', 'G'],
  ['J', 'Ks', 'J'],
];

/** The best axes the bands allow; with too few bands, those the profile's bands will allow. */
export function chooseAxes(measured: readonly Band[], expected: readonly Band[]): DiagramAxes {
  const [blue, red, band] = bestOf(measured) ?? bestOf(expected) ?? CHOICES[0];
  return { colour: { blue, red }, band };
}

function bestOf(bands: readonly Band[]): readonly [Band, Band, Band] | undefined {
  return CHOICES.find(([blue, red, band]) => [blue, red, band].every(needed => bands.includes(needed)));
}
