/** What a recognised column is converted to. */
export type TargetUnit = 'deg' | 'mas' | 'mas/yr' | 'mag';

/** Spellings of units, by their plain name. Compared in lower case without blanks, '**' and '^'. */
const SPELLINGS: Readonly<Record<string, readonly string[]>> = {
  deg: ['deg', 'degree', 'degrees', '°', 'd.deg'],
  rad: ['rad', 'radian', 'radians'],
  hourangle: ['hourangle', 'hour', 'hours', 'hr', 'h'],
  sexagesimal: ['h:m:s', 'd:m:s', 'hms', 'dms', 'hh:mm:ss', 'dd:mm:ss', 'sexagesimal', '"h:m:s"', '"d:m:s"'],
  arcsec: ['arcsec', 'arcsecond', 'arcseconds', 'asec', '"'],
  mas: ['mas', 'milliarcsec', 'marcsec'],
  'mas/yr': ['mas/yr', 'mas/year', 'mas/a', 'marcsec/yr', 'masyr'],
  'arcsec/yr': ['arcsec/yr', 'arcsec/year', 'arcsec/a', '"/yr', 'asec/yr'],
  mag: ['mag', 'mags', 'vmag', 'abmag', 'mag(ab)', 'mag(vega)'],
  mmag: ['mmag', 'millimag'],
  day: ['d', 'day', 'days', 'jd', 'mjd'],
  second: ['s', 'sec', 'second', 'seconds'],
  other: [
    ...[
      'pix',
      'pixel',
      'px',
      'adu',
      'count',
      'counts',
      'ct',
      'e-',
      'electron',
      'e-/s',
      'electron/s',
      'adu/s',
    ],
    ...[
      'k',
      'km/s',
      'pc',
      'kpc',
      'yr',
      'year',
      'min',
      'jy',
      'mjy',
      'ujy',
      'um',
      'nm',
      '%',
      '-',
      '---',
      'arcmin',
    ],
    ...["'electron'.s-1", '1/mas', 'dex', '[cm/s2]', 'dimensionless', 'none', 'bool', 'str', 'string', 'int'],
  ],
};

const PLAIN_NAME: ReadonlyMap<string, string> = new Map(
  Object.entries(SPELLINGS).flatMap(([plain, spellings]) =>
    spellings.map(spelling => [spelling, plain] as const),
  ),
);

const FACTORS: Readonly<Record<TargetUnit, ReadonlyMap<string, number>>> = {
  deg: new Map([
    ['deg', 1],
    ['hourangle', 15],
    ['rad', 180 / Math.PI],
  ]),
  mas: new Map([
    ['mas', 1],
    ['arcsec', 1000],
  ]),
  'mas/yr': new Map([
    ['mas/yr', 1],
    ['arcsec/yr', 1000],
  ]),
  mag: new Map([
    ['mag', 1],
    ['mmag', 0.001],
  ]),
};

/** Plain name of a unit; undefined when it is none that we know. */
export function plainUnit(raw: string): string | undefined {
  const text = raw
    .trim()
    .toLowerCase()
    .replace(/\s+|\*\*|\^/g, '')
    .replace(/[.*]?(?:yr|year)-1$/, '/yr')
    .replace(/[.*]?s-1$/, '/s');
  return PLAIN_NAME.get(text);
}

/** Factor from a column's unit to the target; no unit means the target itself. Undefined: not convertible. */
export function unitFactor(unit: string, target: TargetUnit): number | undefined {
  if (unit.trim() === '') return 1;
  return FACTORS[target].get(plainUnit(unit) ?? '');
}

/** The units that a target can be read from, for messages. */
export function acceptedUnits(target: TargetUnit): string {
  return [...FACTORS[target].keys()].join(', ');
}

const BRACKETED = /^(.*?)\s*(?:\[([^\]]*)\]|\(([^)]*)\))$/;

/** Splits 'parallax [mas]' and 'RA (deg)' into name and unit; leaves 'E(B-V)' whole. */
export function splitNameAndUnit(text: string): { readonly name: string; readonly unit: string } {
  const match = BRACKETED.exec(text);
  const unit = match?.[2] ?? match?.[3] ?? '';
  if (match === null || match[1] === '' || plainUnit(unit) === undefined) return { name: text, unit: '' };
  return { name: match[1], unit };
}

/** A second header line that holds nothing but units: each cell empty, a known unit, or in brackets. */
export function isUnitsLine(cells: readonly string[]): boolean {
  const filled = cells.filter(cell => cell.trim() !== '');
  return (
    filled.length > 0 &&
    filled.every(cell => plainUnit(cell) !== undefined || /^[[(].*[\])]$/.test(cell.trim()))
  );
}

/** The unit without the brackets it may stand in. */
export function bareUnit(cell: string): string {
  const match = /^(?:\[([^\]]*)\]|\(([^)]*)\))$/.exec(cell.trim());
  return match?.[1] ?? match?.[2] ?? cell.trim();
}
