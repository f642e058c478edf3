import { type Band, isBand } from '../../science/bands.js';

/** Meanings that do not belong to a band. */
export const PLAIN_MEANINGS = [
  'id',
  'ra',
  'dec',
  'parallax',
  'parallax_error',
  'pmra',
  'pmdec',
  'ebv',
  'time',
  'mag',
  'mag_error',
  'band',
  'flag',
] as const;

export type PlainMeaning = (typeof PLAIN_MEANINGS)[number];

/** What a column can hold. A colour is named by its two bands: 'colour.B-V'. */
export type Meaning =
  | PlainMeaning
  | `mag.${Band}`
  | `mag_error.${Band}`
  | `flux_over_error.${Band}`
  | `colour.${Band}-${Band}`
  | `colour_error.${Band}-${Band}`;

/** Colours that tables carry, bluer band first. */
export const COLOURS: readonly (readonly [blue: Band, red: Band])[] = [
  ['U', 'B'],
  ['B', 'V'],
  ['V', 'Rc'],
  ['V', 'Ic'],
  ['Rc', 'Ic'],
  ['V', 'Ks'],
  ['J', 'H'],
  ['J', 'Ks'],
  ['H', 'Ks'],
  ['BP', 'RP'],
  ['BP', 'G'],
  ['G', 'RP'],
  ['u', 'g'],
  ['g', 'r'],
  ['g', 'i'],
  ['r', 'i'],
  ['i', 'z'],
  ['gP1', 'rP1'],
  ['rP1', 'iP1'],
  ['iP1', 'zP1'],
  ['zP1', 'yP1'],
];

/** Is this a meaning that a profile may give to a column, such as 'parallax' or 'mag.V'? */
export function isMeaning(text: string): text is Meaning {
  if ((PLAIN_MEANINGS as readonly string[]).includes(text)) return true;
  const match = /^(mag|mag_error|flux_over_error|colour|colour_error)\.(.+)$/.exec(text);
  if (match === null) return false;
  if (!match[1].startsWith('colour')) return isBand(match[2]);
  return COLOURS.some(([blue, red]) => match[2] === `${blue}-${red}`);
}
