import { clock } from '../../follow/sky/night-of.js';
import type { GlyphName } from '../terminal/look.js';

/** Shown where a value is not known. */
export const UNKNOWN = '-';

/** 'text      ' or 'a long t…': exactly `width` cells; `mark` stands for what was cut off. */
export function toWidth(text: string, width: number, mark = '…'): string {
  if (text.length <= width) return text.padEnd(width);
  return width <= mark.length ? text.slice(0, Math.max(0, width)) : text.slice(0, width - mark.length) + mark;
}

/** The same, pushed to the right. */
export function toWidthRight(text: string, width: number): string {
  return text.length <= width ? text.padStart(width) : toWidth(text, width);
}

/** A fixed-point number, or '-'. */
export function fixed(value: number, decimals: number): string {
  return Number.isNaN(value) ? UNKNOWN : value.toFixed(decimals);
}

/** '+11.3', '-5.0' or '-': absolute magnitudes always carry their sign. */
export function signed(value: number, decimals: number): string {
  if (Number.isNaN(value)) return UNKNOWN;
  const text = value.toFixed(decimals);
  return value < 0 && Number(text) !== 0 ? text : `+${text.replace('-', '')}`;
}

/** Value with its error, both to the error's first figure that matters: '12.14 ± 0.03'. */
export function withSigma(value: number, sigma: number, plusMinus: string): string {
  if (Number.isNaN(value)) return UNKNOWN;
  if (Number.isNaN(sigma) || sigma <= 0) return value.toPrecision(4);
  const decimals = Math.max(0, Math.min(4, Math.ceil(-Math.log10(sigma / 1.95))));
  return `${value.toFixed(decimals)} ${plusMinus} ${sigma.toFixed(decimals)}`;
}

/** '16500 K', to three figures: no photometry tells more. */
export function teffText(teff_K: number): string {
  return Number.isNaN(teff_K) ? 'not known' : `${Number(teff_K.toPrecision(3))} K`;
}

/** Whole numbers in groups of three: '4 120'. */
export function grouped(value: number): string {
  return Math.round(value)
    .toString()
    .replace(/\B(?=(\d{3})+$)/g, ' ');
}

/** '45 s', '12 min', '2 h 05 min'. */
export function durationText(seconds: number): string {
  if (Number.isNaN(seconds)) return UNKNOWN;
  if (seconds < 90) return `${Math.round(seconds)} s`;
  const minutes = Math.round(seconds / 60);
  return minutes < 100 ? `${minutes} min` : `${Math.floor(minutes / 60)} h ${pad2(minutes % 60)} min`;
}

/** Time left until something, short: '61 min', '3h05'; 'now' in the last minute. */
export function leftText(from_ms: number, until_ms: number): string {
  const minutes = Math.floor((until_ms - from_ms) / 60_000);
  if (Number.isNaN(minutes)) return UNKNOWN;
  if (minutes < 1) return 'now';
  return minutes < 100 ? `${minutes} min` : `${Math.floor(minutes / 60)}h${pad2(minutes % 60)}`;
}

/** Length of a single exposure: '240 s', '7.5 s', '0.3 s'. */
export function secondsText(seconds: number): string {
  return `${Number(seconds.toFixed(1))} s`;
}

/** '02:41', the clock's minute that has begun; a clock is never ahead of the time. */
export function clockText(time_ms: number): string {
  return Number.isNaN(time_ms) ? '--:--' : clock(Math.floor(time_ms / 60_000) * 60_000);
}

/** A sentence made elsewhere, in the signs of the glyph set. */
export function sentence(text: string, glyphs: GlyphName): string {
  return glyphs === 'ascii' ? text.replaceAll('±', '+-') : text;
}

/** Lines of at most `width` cells, broken at blanks; a word that is longer than a line is cut. */
export function wrapped(text: string, width: number): readonly string[] {
  const lines: string[] = [];
  let line = '';
  for (const word of text.split(' ')) {
    const longer = line === '' ? word : `${line} ${word}`;
    if (longer.length <= width) {
      line = longer;
      continue;
    }
    if (line !== '') lines.push(line);
    line = toWidth(word, Math.min(word.length, width)).trimEnd();
  }
  if (line !== '') lines.push(line);
  return lines;
}

function pad2(value: number): string {
  return String(value).padStart(2, '0');
}
