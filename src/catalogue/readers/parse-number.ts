/** Powers of ten that a double holds exactly. */
const POWERS_OF_TEN = Float64Array.from({ length: 23 }, (_, i) => Number(`1e${i}`));

const STRICT_DECIMAL = /^[+-]?(\d+\.?\d*|\.\d+)([eEdD][+-]?\d{1,4})?$/;

const PLUS = 43;
const MINUS = 45;
const POINT = 46;
const ZERO = 48;

/**
 * The decimal number in bytes[start, end), correctly rounded; NaN where the cell is empty or no plain decimal
 * number (hexadecimal, words, overflow).
 *
 * A whole number below 2^53 divided by a power of ten up to 10^22 is one correctly rounded operation (Clinger
 * 1990, PLDI '90, 92), so that short cells need no string; longer ones take the language's own conversion.
 */
export function parseNumber(bytes: Uint8Array, start: number, end: number): number {
  let i = start;
  const negative = i < end && bytes[i] === MINUS;
  if (negative || (i < end && bytes[i] === PLUS)) i++;
  let mantissa = 0;
  let digits = 0;
  let decimals = 0;
  for (; i < end; i++) {
    const digit = bytes[i] - ZERO;
    if (digit < 0 || digit > 9) break;
    mantissa = mantissa * 10 + digit;
    digits++;
  }
  if (i < end && bytes[i] === POINT) {
    const first = ++i;
    for (; i < end; i++) {
      const digit = bytes[i] - ZERO;
      if (digit < 0 || digit > 9) break;
      mantissa = mantissa * 10 + digit;
      digits++;
    }
    decimals = i - first;
  }
  if (digits === 0) return Number.NaN;
  if (i === end && mantissa <= Number.MAX_SAFE_INTEGER && decimals < POWERS_OF_TEN.length) {
    const value = mantissa / POWERS_OF_TEN[decimals];
    return negative ? -value : value;
  }
  return parseDecimal(asciiText(bytes, start, end));
}

/** The same rules for text already decoded: exponents also with a Fortran D. */
export function parseDecimal(text: string): number {
  if (!STRICT_DECIMAL.test(text)) return Number.NaN;
  const value = Number(text.replace(/[dD]/, 'e'));
  return Number.isFinite(value) ? value : Number.NaN;
}

/** Bytes as characters one to one: enough for numbers and for the words that mean "missing". */
export function asciiText(bytes: Uint8Array, start: number, end: number): string {
  let text = '';
  for (let i = start; i < end; i++) text += String.fromCharCode(bytes[i]);
  return text;
}
