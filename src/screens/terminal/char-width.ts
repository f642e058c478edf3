/**
 * Cells a code point takes on the terminal (Unicode Standard Annex 11): 0 for controls, combining marks and format
 * characters, 2 for wide East Asian characters and pictographs, else 1. Sequences of pictographs are not drawn by
 * this program.
 */
export function charWidth(codePoint: number): 0 | 1 | 2 {
  if (codePoint < 0x300) return isControl(codePoint) ? 0 : 1;
  if (isDrawing(codePoint)) return 1;
  const character = String.fromCodePoint(codePoint);
  if (INVISIBLE.test(character)) return 0;
  return isWideEastAsian(codePoint) || PICTOGRAPH.test(character) ? 2 : 1;
}

/** Cells of a text without escape sequences. */
export function textWidth(text: string): number {
  let width = 0;
  for (const character of text) width += charWidth(character.codePointAt(0) as number);
  return width;
}

function isControl(codePoint: number): boolean {
  return codePoint < 0x20 || (codePoint >= 0x7f && codePoint < 0xa0);
}

/** Lines, blocks and braille: most of what is drawn, so asked for first. */
function isDrawing(codePoint: number): boolean {
  return (codePoint >= 0x2500 && codePoint <= 0x259f) || (codePoint >= 0x2800 && codePoint <= 0x28ff);
}

function isWideEastAsian(codePoint: number): boolean {
  return WIDE.some(([first, last]) => codePoint >= first && codePoint <= last);
}

/** Marks and format characters; vowels and final consonants that join a Hangul syllable. */
const INVISIBLE = /[\p{Mn}\p{Me}\p{Cf}\u1160-\u11ff]/u;
/** Shown as a picture by default; flags are pairs of regional indicators, which are narrow. */
const PICTOGRAPH = /(?![\u{1f1e6}-\u{1f1ff}])\p{Emoji_Presentation}/u;

/** The blocks that are wide or fullwidth as a whole. */
const WIDE: readonly (readonly [number, number])[] = [
  [0x1100, 0x115f],
  [0x2329, 0x232a],
  [0x2e80, 0x303e],
  [0x3041, 0x3247],
  [0x3250, 0x4dbf],
  [0x4e00, 0xa4cf],
  [0xa960, 0xa97c],
  [0xac00, 0xd7a3],
  [0xf900, 0xfaff],
  [0xfe10, 0xfe19],
  [0xfe30, 0xfe6f],
  [0xff01, 0xff60],
  [0xffe0, 0xffe6],
  [0x16fe0, 0x18dff],
  [0x1aff0, 0x1b2ff],
  [0x1f200, 0x1f265],
  [0x20000, 0x3fffd],
];
