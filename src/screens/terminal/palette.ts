import type { ColourDepth, Look, PaletteName } from './look.js';

/** What a colour means; the palette says what it looks like. */
export type Token =
  | 'text'
  | 'dim'
  | 'title'
  | 'accent'
  | 'good'
  | 'warning'
  | 'alarm'
  | 'track'
  | 'flagged'
  | 'fresh'
  | 'selected';

/** A star's own colour, told by its temperature. */
export interface StarColour {
  readonly teff_K: number;
}

export interface Style {
  readonly colour?: Token | StarColour;
  readonly bold?: boolean;
  readonly dim?: boolean;
  readonly inverse?: boolean;
  readonly underline?: boolean;
}

type Rgb = readonly [number, number, number];

/** One colour in each depth: SGR code of the 16, index of the 256 (by nearest), and the colour itself. */
interface Ink {
  readonly ansi: number;
  readonly rgb: Rgb;
  readonly bold?: boolean;
  readonly dim?: boolean;
}

const ink = (ansi: number, rgb: Rgb, more: { bold?: boolean; dim?: boolean } = {}): Ink => ({
  ansi,
  rgb,
  ...more,
});

/** null: the terminal's own foreground. The background is never touched. */
const PALETTES: Readonly<Record<Exclude<PaletteName, 'mono'>, Readonly<Record<Token, Ink | null>>>> = {
  dark: {
    text: null,
    dim: ink(90, [128, 128, 136]),
    title: ink(36, [110, 200, 210]),
    accent: ink(96, [120, 210, 225]),
    good: ink(32, [110, 190, 110]),
    warning: ink(33, [225, 180, 80]),
    alarm: ink(91, [240, 110, 100]),
    track: ink(34, [84, 104, 150]),
    flagged: ink(93, [250, 220, 90], { bold: true }),
    fresh: ink(92, [140, 230, 140]),
    selected: ink(97, [255, 255, 255], { bold: true }),
  },
  light: {
    text: null,
    dim: ink(90, [110, 110, 118]),
    title: ink(36, [0, 95, 110]),
    accent: ink(34, [0, 80, 160]),
    good: ink(32, [0, 110, 0]),
    warning: ink(33, [140, 85, 0]),
    alarm: ink(31, [180, 0, 0]),
    track: ink(34, [130, 140, 180]),
    flagged: ink(35, [150, 0, 130], { bold: true }),
    fresh: ink(32, [0, 120, 40]),
    selected: ink(30, [0, 0, 0], { bold: true }),
  },
  // Red light alone, without any green or blue: the rods of a dark-adapted eye hardly see it.
  red: {
    text: ink(31, [215, 0, 0]),
    dim: ink(31, [175, 0, 0], { dim: true }),
    title: ink(31, [215, 0, 0]),
    accent: ink(91, [255, 0, 0]),
    good: ink(31, [215, 0, 0]),
    warning: ink(91, [255, 0, 0]),
    alarm: ink(91, [255, 0, 0], { bold: true }),
    track: ink(31, [135, 0, 0], { dim: true }),
    flagged: ink(91, [255, 0, 0], { bold: true }),
    fresh: ink(91, [255, 0, 0]),
    selected: ink(91, [255, 0, 0], { bold: true }),
  },
};

/**
 * Colours of black bodies on an sRGB screen, softened so that hot and cool stars stay apart on a terminal: judgement
 * after the usual blackbody table (Planck spectrum through the CIE 1931 observer).
 */
const STAR_COLOURS: readonly (readonly [number, number, Rgb])[] = [
  [2600, 31, [255, 130, 60]],
  [3300, 91, [255, 150, 85]],
  [4200, 33, [255, 185, 120]],
  [5200, 93, [255, 220, 165]],
  [6200, 97, [255, 243, 225]],
  [7500, 97, [235, 238, 255]],
  [10_000, 96, [195, 213, 255]],
  [20_000, 94, [165, 190, 255]],
  [40_000, 94, [150, 180, 255]],
];

/** What stands out where there is no colour to say so. */
const BOLD_WITHOUT_COLOUR: readonly unknown[] = ['flagged', 'selected', 'alarm'] satisfies Token[];

/** SGR parameters of a style, without the enclosing escape; empty where text is left as the terminal has it. */
export function sgrOf(style: Style | undefined, { palette, depth }: Look): string {
  const { colour, bold, dim, underline, inverse } = style ?? {};
  const found = palette === 'mono' || depth === 'none' ? null : inkOf(colour, palette);
  const isBold = found === null ? BOLD_WITHOUT_COLOUR.includes(colour) : found.bold;
  const parts: string[] = [];
  if (bold === true || isBold === true) parts.push('1');
  if (dim === true || (found?.dim === true && depth === '16')) parts.push('2');
  if (underline === true) parts.push('4');
  if (inverse === true) parts.push('7');
  if (found !== null && depth !== 'none') parts.push(colourCode(found, depth));
  return parts.join(';');
}

function inkOf(colour: Style['colour'], palette: Exclude<PaletteName, 'mono'>): Ink | null {
  // Also text without a colour of its own: in red it is red.
  if (colour === undefined) return PALETTES[palette].text;
  if (typeof colour === 'string') return PALETTES[palette][colour];
  return starInk(colour.teff_K, palette);
}

function starInk(teff_K: number, palette: Exclude<PaletteName, 'mono'>): Ink | null {
  if (Number.isNaN(teff_K)) return PALETTES[palette].text;
  const entry = STAR_COLOURS.find(([limit]) => teff_K <= limit) ?? STAR_COLOURS[STAR_COLOURS.length - 1];
  const [, ansi, rgb] = entry;
  if (palette === 'red') {
    // Hot stars brighter, cool stars dimmer: one hue for the eye.
    const share = Math.min(1, Math.log(Math.max(teff_K, 2500) / 2500) / Math.log(12));
    return ink(share > 0.4 ? 91 : 31, [Math.round(135 + 120 * share), 0, 0]);
  }
  return palette === 'light' ? ink(darkerAnsi(ansi), darker(rgb)) : ink(ansi, rgb);
}

/** For white paper: the same hue at less than half the light. */
function darker([r, g, b]: Rgb): Rgb {
  const least = Math.min(r, g, b);
  const deepen = (value: number) => Math.max(0, Math.round((value - least * 0.75) * 0.9));
  return [deepen(r), deepen(g), deepen(b)];
}

/** The same of the 16: bright to normal, and white, which paper does not show, to black. */
function darkerAnsi(ansi: number): number {
  if (ansi === 97) return 30;
  return ansi > 89 ? ansi - 60 : ansi;
}

function colourCode({ ansi, rgb }: Ink, depth: Exclude<ColourDepth, 'none'>): string {
  if (depth === '16') return String(ansi);
  if (depth === 'true') return `38;2;${rgb.join(';')}`;
  return `38;5;${nearestOf256(rgb)}`;
}

/** The 6x6x6 cube and the grey ramp of the 256-colour table (xterm). */
function nearestOf256([r, g, b]: Rgb): number {
  const level = (value: number) =>
    value < 48 ? 0 : value < 115 ? 1 : Math.min(5, Math.floor((value - 35) / 40));
  const spread = Math.max(r, g, b) - Math.min(r, g, b);
  if (spread < 12) {
    const grey = Math.round(((r + g + b) / 3 - 8) / 10);
    return grey < 0 ? 16 : grey > 23 ? 231 : 232 + grey;
  }
  return 16 + 36 * level(r) + 6 * level(g) + level(b);
}
