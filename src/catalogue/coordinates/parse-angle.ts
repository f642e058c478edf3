/** An angle read from text; or NaN and why it was refused. */
export interface ParsedAngle {
  readonly deg: number;
  /** Empty when the text was understood. */
  readonly refused: string;
  /** Seconds written as 60 were carried into the minutes. */
  readonly carried: boolean;
}

/**
 * Typographic signs and what they stand for. Mapped before any Unicode normalisation, which would split a
 * double prime into two primes.
 */
const SIGNS: readonly (readonly [RegExp, string])[] = [
  [/[\u2212\u2013\u2014\u2010\u2011\uff0d]/g, '-'],
  [/[\u00b0\u00ba]/g, 'd'],
  [/[\u2032\u2019']/g, 'm'],
  [/[\u2033\u201d"]/g, 's'],
  [/\u02b0/g, 'h'],
  [/\u1d50/g, 'm'],
  [/\u02e2/g, 's'],
  [/[\u00a0\u2000-\u200a\u202f]/g, ' '],
];

const NEEDS_MAPPING = /[^\x20-\x7e]|['"]/;

/** The usual form, which long tables hold by the hundred thousand. */
const COLONS = /^(\d{1,3}):(\d{2}):(\d{2}(?:\.\d*)?)$/;

const NUMBER = /^(?:\d+\.?\d*|\.\d+)(?:e[+-]?\d{1,3})?$/;
const FIELD = /^\d+(?:\.\d*)?$|^\.\d+$/;
const UNIT_ORDER = ['hd', 'm', 's'];

/**
 * Right ascension in degrees from '12:34:56.78', '12 34 56.78', '12h34m56.78s', '188.7365833', '12.58h' or
 * '188d44m11.7s'. Two or three fields without a unit are hours, a single number is degrees. Refused: outside
 * 0 <= RA < 360 deg, minutes of 60 and more, decimals before the last field, a comma, a fourth field.
 */
export function parseRa(text: string): ParsedAngle {
  const fields = splitFields(text);
  if (typeof fields === 'string') return refuse(fields);
  if (fields.negative) return refuse('a right ascension is never negative');
  const inHours = fields.unit === 'h' || (fields.unit === '' && fields.values.length > 1);
  const deg = inHours ? fields.sum * 15 : fields.sum;
  if (!(deg < 360)) return refuse(inHours ? 'it is 24 h or more' : 'it is 360 degrees or more');
  return { deg, refused: '', carried: fields.carried };
}

/** Declination in degrees, in the same notations; never in hours. The sign holds for the whole: -00:30 is -0.5. */
export function parseDec(text: string): ParsedAngle {
  const fields = splitFields(text);
  if (typeof fields === 'string') return refuse(fields);
  if (fields.unit === 'h') return refuse('a declination is never in hours');
  if (!(fields.sum <= 90)) return refuse('it is beyond the pole (90 degrees)');
  return { deg: fields.negative ? -fields.sum : fields.sum, refused: '', carried: fields.carried };
}

/** Signs, blanks and unit letters in their plain form. */
export function plainAngleText(text: string): string {
  const plain = NEEDS_MAPPING.test(text)
    ? SIGNS.reduce((mapped, [sign, letter]) => mapped.replace(sign, letter), text)
    : text;
  return plain.trim().toLowerCase();
}

function refuse(refused: string): ParsedAngle {
  return { deg: Number.NaN, refused, carried: false };
}

interface Fields {
  readonly negative: boolean;
  readonly values: readonly number[];
  /** Unit of the first field: 'h', 'd' or '' when none is written. */
  readonly unit: string;
  /** In units of the first field. */
  readonly sum: number;
  readonly carried: boolean;
}

/** The fields of an angle, or why it is none. */
function splitFields(text: string): Fields | string {
  const plain = plainAngleText(text);
  if (plain === '') return 'it is empty';
  const negative = plain.startsWith('-');
  const body = plain.replace(/^[+-]\s*/, '');
  const colons = COLONS.exec(body);
  if (colons !== null) return joined(negative, colons.slice(1), '');
  if (NUMBER.test(body)) return single(negative, Number(body), '');
  if (/^[^a-z]*e?[^a-z]*[hd]$/.test(body) && NUMBER.test(body.slice(0, -1))) {
    return single(negative, Number(body.slice(0, -1)), body.slice(-1));
  }
  const parts = /[hdms]/.test(body) ? unitParts(body) : separatedParts(body);
  if (typeof parts === 'string') return parts;
  if (parts.fields.length > 3) return 'it has more than three fields';
  if (!parts.fields.every(field => FIELD.test(field))) return 'a field is not a plain number';
  if (parts.fields.slice(0, -1).some(field => field.includes('.')))
    return 'decimals stand before the last field';
  return joined(negative, parts.fields, parts.unit);
}

function joined(negative: boolean, fields: readonly string[], unit: string): Fields | string {
  const values = fields.map(Number);
  const [whole, minutes = 0, seconds = 0] = values;
  if (minutes >= 60) return 'the minutes are 60 or more';
  if (seconds > 60) return 'the seconds are more than 60';
  const sum = (whole * 3600 + minutes * 60 + seconds) / 3600;
  return { negative, values, unit, sum, carried: seconds === 60 };
}

function single(negative: boolean, value: number, unit: string): Fields {
  return { negative, values: [value], unit, sum: value, carried: false };
}

interface Parts {
  readonly fields: readonly string[];
  readonly unit: string;
}

function separatedParts(body: string): Parts | string {
  if (body.includes(',')) return 'a comma is no decimal mark here';
  const fields = body.split(body.includes(':') ? /\s*:\s*/ : /\s+/);
  return { fields, unit: '' };
}

/** '12h34m56.78s': each unit in its place; the last may be missing. */
function unitParts(body: string): Parts | string {
  const fields: string[] = [];
  let unit = '';
  const pattern = /\s*([^hdms\s]+)\s*([hdms]?)/y;
  let end = 0;
  for (let match = pattern.exec(body); match !== null; match = pattern.exec(body)) {
    const place = fields.length;
    if (place > 2) return 'it has more than three fields';
    const isLast = pattern.lastIndex >= body.length;
    if (match[2] === '' ? !isLast || place === 0 : !UNIT_ORDER[place].includes(match[2])) {
      return 'a unit is out of place';
    }
    if (place === 0) unit = match[2];
    fields.push(match[1]);
    end = pattern.lastIndex;
  }
  return end < body.length || fields.length === 0 ? 'it is not a number' : { fields, unit };
}
