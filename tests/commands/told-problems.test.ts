import { expect, it } from 'vitest';
import { makeProblem } from '../../src/catalogue/problems.js';
import { safeText } from '../../src/catalogue/safe-text.js';
import { ToldProblems } from '../../src/commands/told-problems.js';
import { PlainNight } from '../../src/screens/plain/plain-night.js';
import { nightView } from '../support/night-view.js';

it('a problem that takes the place of another is told, one that comes back is not told again', () => {
  const half = makeProblem('row-width', safeText('v.csv'), 9, '2 cells where the header has 4');
  const empty = makeProblem('empty-file', safeText('w.csv'), 0, 'no rows');
  const night = new PlainNight();
  const told = new ToldProblems();
  const lines = (...problems: (typeof half)[]) =>
    night
      .next(told.through({ ...nightView(), problems }))
      .filter(line => line.includes('problem'))
      .map(line => line.replace(/^.*problem {2}(\S+) (\S+) .*$/, '$1 $2'));
  expect(lines(half)).toEqual(['v.csv:9: row-width']);
  expect(lines(empty)).toEqual(['w.csv: empty-file']);
  expect(lines(empty, half)).toEqual([]);
});
