import { describe, expect, it } from 'vitest';
import { csvCell } from '../../src/commands/output/formats.js';
import { rounded } from '../../src/commands/output/star-record.js';

describe('a CSV cell', () => {
  it.each([
    [null, ''],
    [-1.5, '-1.5'],
    ['plain', 'plain'],
    ['a,b', '"a,b"'],
    ['say "so"', '"say ""so"""'],
    ['two\nlines', '"two\nlines"'],
    ['=1+1', "'=1+1"],
    ['+1', "'+1"],
    ['-1', "'-1"],
    ['@SUM(A1)', "'@SUM(A1)"],
    ['=A1,B1', '"\'=A1,B1"'],
  ])('%j is written %j', (value, written) => {
    expect(csvCell(value)).toBe(written);
  });
});

describe('rounded', () => {
  it('keeps so many decimals, and says null for what is not a number', () => {
    expect([rounded(1.23456, 2), rounded(-0.00004, 4), rounded(123.4, 0)]).toEqual([1.23, -0, 123]);
    for (const value of [Number.NaN, Number.POSITIVE_INFINITY]) expect(rounded(value, 2)).toBeNull();
  });
});
