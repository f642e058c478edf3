import { LIMITS } from '../../limits.js';
import { asciiText } from '../parse-number.js';

/** FITS Standard 4.0, 3.1 and 4.1: everything comes in blocks, headers in cards. */
export const BLOCK_BYTES = 2880;
export const CARD_BYTES = 80;

/** Keywords in capitals with their bare values; of a repeated keyword the first counts. */
export class FitsHeader {
  constructor(readonly values: ReadonlyMap<string, string>) {}

  text(key: string): string {
    return this.values.get(key) ?? '';
  }

  /** NaN where the keyword is missing or no number. */
  number(key: string): number {
    const text = this.text(key);
    return text === '' ? Number.NaN : Number(text);
  }

  /** A whole number that can be counted with, `usual` where the keyword is missing; NaN for anything else. */
  count(key: string, usual = Number.NaN): number {
    if (!this.values.has(key)) return usual;
    const value = this.number(key);
    return Number.isSafeInteger(value) && value >= 0 ? value : Number.NaN;
  }
}

/** A header and where it ends, to the full block; or that its END does not come. */
export type HeaderReading =
  | { readonly kind: 'whole'; readonly header: FitsHeader; readonly end: number }
  | { readonly kind: 'cut-short' }
  | { readonly kind: 'endless' };

/** Reads the header that begins at `start` (FITS Standard 4.0, 4). */
export function readHeader(bytes: Uint8Array, start: number): HeaderReading {
  const values = new Map<string, string>();
  /** Keyword whose text goes on in the next card. */
  let open = '';
  for (let card = 0; card < LIMITS.headerLines; card++) {
    const place = start + card * CARD_BYTES;
    if (place + CARD_BYTES > bytes.length) return { kind: 'cut-short' };
    const text = asciiText(bytes, place, place + CARD_BYTES);
    const name = text.slice(0, 8).trimEnd();
    if (name === 'END') {
      const length = Math.ceil(((card + 1) * CARD_BYTES) / BLOCK_BYTES) * BLOCK_BYTES;
      return { kind: 'whole', header: new FitsHeader(values), end: start + length };
    }
    if (name === 'CONTINUE') {
      if (open === '') continue;
      const value = (values.get(open) ?? '').slice(0, -1) + bareValue(text.slice(8));
      values.set(open, value.slice(0, LIMITS.cell_bytes));
      if (!value.endsWith('&')) open = '';
      continue;
    }
    const assigned = keyAndValue(text, name);
    open = '';
    if (assigned === undefined || values.has(assigned.key)) continue;
    values.set(assigned.key, assigned.value);
    if (assigned.value.endsWith('&')) open = assigned.key;
  }
  return { kind: 'endless' };
}

const NO_KEYWORDS: readonly string[] = ['', 'COMMENT', 'HISTORY'];

/** The keyword of a card and its value; undefined for comments. Long keywords follow the word HIERARCH. */
function keyAndValue(card: string, name: string): { key: string; value: string } | undefined {
  if (name === 'HIERARCH') {
    const equals = card.indexOf('=');
    if (equals < 0) return undefined;
    return { key: card.slice(8, equals).trim().toUpperCase(), value: bareValue(card.slice(equals + 1)) };
  }
  if (NO_KEYWORDS.includes(name) || card[8] !== '=') return undefined;
  return { key: name.toUpperCase(), value: bareValue(card.slice(9)) };
}

const FORTRAN_EXPONENT = /^([+-]?[\d.]+)[dD]([+-]?\d+)$/;

/** A value without quotes, trailing blanks and the remark after '/'. */
function bareValue(field: string): string {
  const text = field.trimStart();
  if (text.startsWith("'")) {
    const quoted = /^'((?:[^']|'')*)'?/.exec(text);
    return (quoted?.[1] ?? '').replaceAll("''", "'").trimEnd();
  }
  const remark = text.indexOf('/');
  const bare = (remark < 0 ? text : text.slice(0, remark)).trim();
  return bare.replace(FORTRAN_EXPONENT, '$1E$2');
}
