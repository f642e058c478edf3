import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { parseNumber } from '../../src/catalogue/readers/parse-number.js';
import { bytesOf } from './input.js';

function parse(text: string): number {
  const bytes = bytesOf(`<${text}>`);
  return parseNumber(bytes, 1, bytes.length - 1);
}

const SETTINGS = { seed: 20261108, numRuns: 5000 };

describe('numbers in bytes', () => {
  it('are bit for bit what the language reads', () => {
    fc.assert(
      fc.property(fc.double({ noNaN: true, noDefaultInfinity: true }), value => {
        expect(Object.is(parse(String(value)), Number(String(value)))).toBe(true);
      }),
      SETTINGS,
    );
  });

  it('are so for any count of digits', () => {
    const digits = fc.stringMatching(/^[0-9]{1,25}$/);
    fc.assert(
      fc.property(fc.constantFrom('', '-', '+'), digits, digits, (sign, whole, decimals) => {
        const text = `${sign}${whole}.${decimals}`;
        expect(Object.is(parse(text), Number(text))).toBe(true);
      }),
      SETTINGS,
    );
  });

  it.each([
    ['12', 12],
    ['12.', 12],
    ['.5', 0.5],
    ['-0', -0],
    ['+3.25', 3.25],
    ['1.5D+2', 150],
    ['1e-3', 0.001],
    ['9007199254740993', 9007199254740992],
    ['188.73658330000001', 188.73658330000001],
  ])('%s', (text, value) => expect(Object.is(parse(text), value)).toBe(true));

  it.each([
    '',
    '-',
    '+',
    '.',
    'e5',
    '0x10',
    '1e999',
    'NaN',
    'Infinity',
    '1_000',
    '12,5',
    '1 2',
    '12abc',
    '--1',
    '1.2.3',
  ])("'%s' is none", text => expect(parse(text)).toBeNaN());
});
