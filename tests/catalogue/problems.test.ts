import { describe, expect, expectTypeOf, it } from 'vitest';
import { PROBLEM_CODES } from '../../src/catalogue/problem-codes.js';
import { formatProblem, makeProblem, ProblemList } from '../../src/catalogue/problems.js';
import { type SafeText, safeText } from '../../src/catalogue/safe-text.js';

const FILE = safeText('frame_012.csv');

describe('problems', () => {
  it('are written as file:line: code text', () => {
    const problem = makeProblem('row-width', FILE, 17, '7 cells where the header has 12');
    expect(formatProblem(problem)).toBe(
      'frame_012.csv:17: row-width 7 cells where the header has 12. ' +
        'Write the row again; a cell with the separator in it needs quotes.',
    );
    expect(problem.cost).toBe('row');
  });

  it('name the file alone when the whole file is meant', () => {
    expect(formatProblem(makeProblem('no-header', FILE, 0, 'x'))).toMatch(/^frame_012.csv: no-header /);
  });

  it('tell ten of a kind and count the others', () => {
    const list = new ProblemList(FILE);
    for (let line = 1; line <= 25; line++) list.add('bad-number', line, `cell ${line}`);
    list.add('row-width', 99, 'one more');
    const all = list.all();
    expect(all).toHaveLength(12);
    expect(all.filter(problem => problem.code === 'bad-number').map(problem => problem.line)).toEqual([
      1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 0,
    ]);
    expect(all.at(-1)?.text).toMatch(/^15 more of this kind from line 11 on, 25 in all\./);
    expect(all.at(-1)?.cost).toBe('row');
  });

  it('count without a line where the file has none', () => {
    const list = new ProblemList(FILE);
    for (let row = 1; row <= 12; row++) list.add('bad-number', 0, `cell ${row}`);
    expect(list.all().at(-1)?.text).toMatch(/^2 more of this kind, 12 in all\./);
  });

  it('have a cause and a remedy for every code', () => {
    for (const [code, { cause, remedy }] of Object.entries(PROBLEM_CODES)) {
      expect(code).toMatch(/^[a-z-]+$/);
      expect(cause).toMatch(/^[A-Z].*\.$/);
      expect(remedy).toMatch(/^[A-Z].*\.$/);
    }
  });

  it('take cleaned file names only', () => {
    expectTypeOf(makeProblem).parameter(1).toEqualTypeOf<SafeText>();
    expectTypeOf<string>().not.toMatchTypeOf<SafeText>();
  });
});
