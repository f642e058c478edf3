import { expect, it } from 'vitest';
import { parseTable } from '../../src/science/table.js';

/** One row of a check file: a function, its inputs, and a value with a tolerance and a source. */
export interface Check {
  readonly id: string;
  readonly name: string;
  readonly output: string;
  readonly input: (key: string) => number;
  readonly word: (key: string) => string;
  readonly expected: number;
  readonly tolerance: number;
  readonly source: string;
}

export function readChecks(text: string): readonly Check[] {
  return parseTable(text).rows.map(row => {
    const inputs = new Map(
      row
        .text('inputs')
        .split(';')
        .map(pair => pair.split('=') as [string, string]),
    );
    const word = (key: string) => {
      const value = inputs.get(key);
      if (value === undefined) throw new Error(`check ${row.text('id')} has no input ${key}`);
      return value;
    };
    const expected = Number(row.text('expected'));
    const tolerance = row.number('tol') * (row.text('tol_kind') === 'rel' ? Math.abs(expected) : 1);
    return {
      id: row.text('id'),
      name: row.text('function'),
      output: row.text('output'),
      input: key => Number(word(key)),
      word,
      expected,
      tolerance,
      source: row.text('source'),
    };
  });
}

/** What we compute for a row, or the reason (in words) why the program does not compute it. */
export type Calculation = ((check: Check) => number | string) | { readonly notOurs: string };

/** Makes one test a row; a function that is neither computed nor excused fails. */
export function testChecks(text: string, calculations: Readonly<Record<string, Calculation>>): void {
  for (const check of readChecks(text)) {
    const calculation = calculations[check.name];
    if (calculation !== undefined && 'notOurs' in calculation) {
      it.skip(`${check.id} ${check.name}: ${calculation.notOurs}`, () => {});
      continue;
    }
    it(`${check.id} ${check.name} ${check.output} (${check.source})`, ({ skip }) => {
      expect(calculation, `nothing computes ${check.name}`).toBeDefined();
      const value = (calculation as (check: Check) => number | string)(check);
      if (typeof value === 'string') return skip(value);
      expect(Math.abs(value - check.expected), `${value} against ${check.expected}`).toBeLessThanOrEqual(
        check.tolerance * (1 + 1e-9),
      );
    });
  }
}
