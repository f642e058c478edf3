import { LIMITS } from './limits.js';

/** Text from outside that has been cleaned once, at the border. Only `safeText` makes it. */
export type SafeText = string & { readonly __safe: unique symbol };

const PLAIN = /^[\x20-\x7e]*$/;

/** Whole escape sequences, in their ESC and their one-character (C1) forms; unfinished strings end with the text. */
const ESCAPE_SEQUENCES = new RegExp(
  [
    // Operating system, device control and the other string commands, up to BEL or the string terminator.
    '(?:\\x1b[\\]PX^_]|[\\x90\\x98\\x9d\\x9e\\x9f])[^\\x07\\x1b\\x9c]*(?:\\x07|\\x1b\\\\|\\x9c)?',
    // Control sequences: cursor, screen, colour.
    '(?:\\x1b\\[|\\x9b)[\\x30-\\x3f]*[\\x20-\\x2f]*[\\x40-\\x7e]',
    // Two- and three-character escapes: reset, character sets, keypad.
    '\\x1b[\\x20-\\x2f]*[\\x30-\\x7e]',
  ].join('|'),
  'g',
);

/**
 * Controls, format characters (bidi, zero-width, byte order mark, tags), line separators, invisible fillers
 * and halves of surrogate pairs.
 */
const UNSAFE = /[\p{Cc}\p{Cf}\p{Cs}\u2028\u2029\u115f\u1160\u3164]|\u034f/gu;

const CUT_MARK = '…';

/**
 * Text that cannot act on a terminal: escape sequences are taken out whole, what is left of control, bidi and
 * invisible characters becomes U+FFFD, the rest is brought to NFC and cut to `maxLength` UTF-16 units.
 */
export function safeText(raw: string, maxLength: number = LIMITS.text_characters): SafeText {
  const clean = PLAIN.test(raw)
    ? raw
    : raw.replace(ESCAPE_SEQUENCES, '').replace(UNSAFE, '\ufffd').normalize('NFC');
  if (clean.length <= maxLength) return clean as SafeText;
  const cut = clean.slice(0, maxLength - CUT_MARK.length);
  const whole = /[\ud800-\udbff]$/.test(cut) ? cut.slice(0, -1) : cut;
  return (whole + CUT_MARK) as SafeText;
}
