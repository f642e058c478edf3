import { type ParsedAngle, parseDec, parseRa, plainAngleText } from './parse-angle.js';

const PACKED = /^(\d{2})(\d{2})(\d{2}(?:\.\d+)?)([+-])(\d{2})(\d{2})(\d{2}(?:\.\d+)?)$/;

/**
 * A position from one text: two angles apart by a comma, before the sign of the declination, or half the
 * fields each; or packed as HHMMSS.s+DDMMSS.s.
 */
export function parsePair(text: string): { readonly ra: ParsedAngle; readonly dec: ParsedAngle } {
  const plain = plainAngleText(text);
  const packed = PACKED.exec(plain);
  if (packed !== null) {
    const [, h, m, s, sign, d, minutes, seconds] = packed;
    return { ra: parseRa(`${h}:${m}:${s}`), dec: parseDec(`${sign}${d}:${minutes}:${seconds}`) };
  }
  const [ra, dec] = split(plain);
  return { ra: parseRa(ra), dec: parseDec(dec) };
}

function split(plain: string): readonly [string, string] {
  const comma = plain.split(',');
  if (comma.length === 2) return [comma[0], comma[1]];
  const sign = /\s[+-]/.exec(plain);
  if (sign !== null) return [plain.slice(0, sign.index), plain.slice(sign.index)];
  const fields = plain.split(/\s+/);
  const half = fields.length / 2;
  // An odd count leaves the declination empty, which its parser refuses.
  if (!Number.isInteger(half)) return [plain, ''];
  return [fields.slice(0, half).join(' '), fields.slice(half).join(' ')];
}
