import type { ColourDepth, GlyphName, Look, PaletteName } from './look.js';

type Environment = Readonly<Record<string, string | undefined>>;

/** What the observer asked for on the command line. */
export interface LookWishes {
  readonly palette?: PaletteName;
  readonly glyphs?: GlyphName;
}

/** Terminals that show no colour, and those that show no character beyond their own set. */
const DUMB = /^(dumb|unknown)$/;
const MONOCHROME = /^vt\d/;
const OLD = /^(linux|vt\d+.*|ansi|cons.*)$/;

/** How to draw on this terminal, from its environment and the observer's wishes. */
export function chooseLook(environment: Environment, wishes: LookWishes): Look {
  const depth = colourDepth(environment);
  return {
    palette: wishes.palette ?? (depth === 'none' ? 'mono' : 'dark'),
    glyphs: wishes.glyphs ?? (speaksUnicode(environment) ? 'braille' : 'ascii'),
    depth,
  };
}

/** NO_COLOR wins, then FORCE_COLOR (0-3), then what TERM and COLORTERM promise. */
export function colourDepth(environment: Environment): ColourDepth {
  const { NO_COLOR, FORCE_COLOR, TERM = '', COLORTERM = '' } = environment;
  if (NO_COLOR !== undefined && NO_COLOR !== '') return 'none';
  if (FORCE_COLOR !== undefined) {
    const forced: Readonly<Record<string, ColourDepth>> = {
      '0': 'none',
      false: 'none',
      '2': '256',
      '3': 'true',
    };
    return forced[FORCE_COLOR] ?? '16';
  }
  if (TERM === '' || DUMB.test(TERM) || MONOCHROME.test(TERM)) return 'none';
  if (/^(truecolor|24bit)$/.test(COLORTERM) || TERM.endsWith('-direct')) return 'true';
  return TERM.includes('256') ? '256' : '16';
}

/** The locale says UTF-8, and the terminal is not one of those whose font has letters only. */
export function speaksUnicode(environment: Environment): boolean {
  const { LC_ALL, LC_CTYPE, LANG, TERM = '' } = environment;
  const locale = [LC_ALL, LC_CTYPE, LANG].find(value => value !== undefined && value !== '') ?? '';
  return /utf-?8/i.test(locale) && !OLD.test(TERM) && !DUMB.test(TERM);
}

/** Over a remote link replies come late and bytes are dear. */
export function isRemote(environment: Environment): boolean {
  return (environment.SSH_CONNECTION ?? '') !== '';
}
