import transformsText from '../tables/transforms.csv';
import type { Band, Colour } from './bands.js';
import { parseTable } from './table.js';

/**
 * One published relation: colour `target` as a polynomial in colour `of`, with its rms scatter and the range
 * in which its authors fitted it. Sources stand in the table, one a row.
 */
export interface Transform {
  readonly target: Colour;
  readonly of: Colour;
  readonly coefficients: readonly number[];
  readonly sigma_mag: number;
  readonly from: number;
  readonly to: number;
  readonly source: string;
}

export function readTransforms(): readonly Transform[] {
  return parseTable(transformsText).rows.map(row => ({
    target: colourOf(row.text('target')),
    of: colourOf(row.text('x')),
    coefficients: ['c0', 'c1', 'c2', 'c3', 'c4']
      .map(name => row.number(name))
      .map(c => (Number.isNaN(c) ? 0 : c)),
    sigma_mag: row.number('sigma'),
    from: Number.isNaN(row.number('x_min')) ? Number.NEGATIVE_INFINITY : row.number('x_min'),
    to: Number.isNaN(row.number('x_max')) ? Number.POSITIVE_INFINITY : row.number('x_max'),
    source: row.text('source'),
  }));
}

/** The target colour at x; NaN outside the published range. */
export function applyTransform(transform: Transform, x: number): number {
  if (!(x >= transform.from && x <= transform.to)) return Number.NaN;
  return transform.coefficients.reduceRight((sum, coefficient) => sum * x + coefficient, 0);
}

/** The named relation; throws when the table does not carry it (a mistake of ours, not of the data). */
export function findTransform(
  transforms: readonly Transform[],
  target: string,
  of: string,
  author: string,
): Transform {
  const found = transforms.find(
    t => nameOf(t.target) === target && nameOf(t.of) === of && t.source.startsWith(author),
  );
  if (found === undefined) throw new Error(`no transformation of ${of} to ${target} by ${author}`);
  return found;
}

function nameOf(colour: Colour): string {
  return `${colour.blue}-${colour.red}`;
}

function colourOf(name: string): Colour {
  const [blue, red] = name.split('-') as [Band, Band];
  return { blue, red };
}
