/**
 * Cells a code point takes: 0 for combining marks, 2 for wide East Asian characters and pictographs, else 1 (Unicode
 * Standard Annex 11, the wide and fullwidth ranges). Sequences of pictographs are not drawn by this program.
 */
export function charWidth(codePoint: number): 0 | 1 | 2 {
  if (codePoint < 0x300) return 1;
  for (const [first, last] of ZERO) if (codePoint >= first && codePoint <= last) return 0;
  for (const [first, last] of WIDE) if (codePoint >= first && codePoint <= last) return 2;
  return 1;
}

const ZERO: readonly (readonly [number, number])[] = [
  [0x300, 0x36f],
  [0x483, 0x489],
  [0x591, 0x5bd],
  [0x200b, 0x200f],
  [0x20d0, 0x20f0],
  [0xfe00, 0xfe0f],
];

const WIDE: readonly (readonly [number, number])[] = [
  [0x1100, 0x115f],
  [0x2e80, 0xa4cf],
  [0xac00, 0xd7a3],
  [0xf900, 0xfaff],
  [0xfe30, 0xfe6f],
  [0xff00, 0xff60],
  [0xffe0, 0xffe6],
  [0x1f300, 0x1faff],
  [0x20000, 0x3fffd],
];

/** Cells of a text without escape sequences. */
export function textWidth(text: string): number {
  let width = 0;
  for (const character of text) width += charWidth(character.codePointAt(0) as number);
  return width;
}
