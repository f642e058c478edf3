import relationsText from '../../tables/colour_teff.csv';
import { parseTable } from '../table.js';

/** Coefficients of a row of colour_teff.csv, as published; throws when the table does not carry it (our mistake). */
export function coefficientsOf(id: string): readonly number[] {
  const row = parseTable(relationsText).rows.find(candidate => candidate.text('id') === id);
  if (row === undefined) throw new Error(`no relation ${id}`);
  return row.text('coefficients').split(' ').map(Number);
}

/** c0 + c1 x + c2 x^2 + ... */
export function polynomial(coefficients: readonly number[], x: number): number {
  return coefficients.reduceRight((sum, coefficient) => sum * x + coefficient, 0);
}
