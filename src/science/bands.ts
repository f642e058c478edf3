/**
 * The photometric bands the program knows.
 *
 * U B V Rc Ic are Johnson-Cousins, J H Ks 2MASS, G BP RP Gaia (E)DR3: Vega magnitudes.
 * u g r i z are SDSS, gP1 ... yP1 Pan-STARRS1: AB magnitudes. Johnson R and I are other bands and are
 * deliberately absent: a table that carries them must not pass as Cousins.
 */
export const BANDS = [
  'U',
  'B',
  'V',
  'Rc',
  'Ic',
  'J',
  'H',
  'Ks',
  'G',
  'BP',
  'RP',
  'u',
  'g',
  'r',
  'i',
  'z',
  'gP1',
  'rP1',
  'iP1',
  'zP1',
  'yP1',
] as const;

export type Band = (typeof BANDS)[number];

export const BAND_COUNT = BANDS.length;

/** Place of a band in every array that is laid out by band. */
export const BAND_INDEX: Readonly<Record<Band, number>> = Object.fromEntries(
  BANDS.map((band, index) => [band, index]),
) as Record<Band, number>;

export function isBand(name: string): name is Band {
  return Object.hasOwn(BAND_INDEX, name);
}

/** A colour is the magnitude in the bluer band minus that in the redder one. */
export interface Colour {
  readonly blue: Band;
  readonly red: Band;
}

export function colourName(colour: Colour): string {
  return `${colour.blue}-${colour.red}`;
}
