/** Types of binary table columns (FITS Standard 4.0, table 18). */
export type BinaryType = 'L' | 'X' | 'B' | 'I' | 'J' | 'K' | 'A' | 'E' | 'D' | 'C' | 'M' | 'P' | 'Q';

export interface BinaryFormat {
  readonly type: BinaryType;
  /** Elements a row; bits for X, characters for A. */
  readonly repeat: number;
  /** Width in a row. */
  readonly bytes: number;
}

const BYTES_OF_ONE: Readonly<Record<Exclude<BinaryType, 'X'>, number>> = {
  ...{ L: 1, B: 1, I: 2, J: 4, K: 8, A: 1 },
  ...{ E: 4, D: 8, C: 8, M: 16, P: 8, Q: 16 },
};

/** Reads TFORMn of a binary table, such as '1E', 'D', '20A', '8A4' or 'PE(120)'; undefined when it is none. */
export function parseBinaryFormat(text: string): BinaryFormat | undefined {
  const match = /^\s*(\d{0,15})([LXBIJKAEDCMPQ])/.exec(text);
  if (match === null) return undefined;
  const type = match[2] as BinaryType;
  const repeat = match[1] === '' ? 1 : Number(match[1]);
  const bytes = type === 'X' ? Math.ceil(repeat / 8) : repeat * BYTES_OF_ONE[type];
  return { type, repeat, bytes };
}

/** Strings, flags and bits are one value however long they are; several numbers, complex ones and lists are not. */
export function hasOneValue({ type, repeat }: BinaryFormat): boolean {
  if (type === 'A' || type === 'L' || type === 'X') return repeat > 0;
  return repeat === 1 && 'BIJKED'.includes(type);
}

export interface AsciiFormat {
  readonly type: 'A' | 'I' | 'F' | 'E' | 'D';
  /** Width in a row. */
  readonly bytes: number;
  /** Digits behind a decimal point that is left out. */
  readonly decimals: number;
}

/** Reads TFORMn of an ASCII table, such as 'A12', 'I6' or 'F8.3' (FITS Standard 4.0, table 15). */
export function parseAsciiFormat(text: string): AsciiFormat | undefined {
  const match = /^\s*([AIFED])(\d{1,6})(?:\.(\d{1,2}))?\s*$/.exec(text);
  if (match === null) return undefined;
  const decimals = Number(match[3] ?? 0);
  return { type: match[1] as AsciiFormat['type'], bytes: Number(match[2]), decimals };
}
