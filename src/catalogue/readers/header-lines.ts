import { LIMITS } from '../limits.js';
import { type SafeText, safeText } from '../safe-text.js';

const NEWLINE = 10;

/** What stands before the first row that is not a comment. */
export interface HeaderLines {
  /** Keywords in capitals; the first value of a keyword counts. */
  readonly keywords: ReadonlyMap<string, SafeText>;
  /** The last comment line without its '#': it may name the columns. */
  readonly lastComment: string;
  /** Place and line (1-based) of the first row; the length of the bytes when there is none. */
  readonly rowStart: number;
  readonly rowLine: number;
}

/** Reads the '#' comment lines at the top: 'KEY = value / remark', 'KEY: value' or 'KEY value'. */
export function readHeaderLines(bytes: Uint8Array, start: number): HeaderLines {
  const keywords = new Map<string, SafeText>();
  const decoder = new TextDecoder();
  let lastComment = '';
  let position = start;
  let line = 1;
  for (; position < bytes.length && line <= LIMITS.headerLines; line++) {
    const found = bytes.indexOf(NEWLINE, position);
    const end = found < 0 ? bytes.length : found;
    const text = decoder.decode(bytes.subarray(position, Math.min(end, position + LIMITS.cell_bytes))).trim();
    if (text !== '' && !text.startsWith('#')) break;
    if (text !== '') {
      const comment = text.replace(/^#+/, '').trim();
      if (comment !== '') lastComment = comment;
      addKeyword(keywords, comment);
    }
    position = end + 1;
  }
  return { keywords, lastComment, rowStart: Math.min(position, bytes.length), rowLine: line };
}

const ASSIGNED = /^([A-Za-z][\w.-]{0,63})\s*[=:]\s*(\S.*)$/;
const SPACED = /^([A-Za-z][\w.-]{0,63})\s+(\S+)$/;

function addKeyword(keywords: Map<string, SafeText>, comment: string): void {
  const match = ASSIGNED.exec(comment) ?? SPACED.exec(comment);
  if (match === null) return;
  const key = safeText(match[1].toUpperCase());
  if (!keywords.has(key)) keywords.set(key, safeText(bareValue(match[2])));
}

/** A header value without its quotes and without the remark after ' / '. */
function bareValue(text: string): string {
  const quoted = /^(['"])(.*?)\1/.exec(text);
  if (quoted !== null) return quoted[2].trim();
  const remark = text.search(/\s\/\s/);
  return (remark < 0 ? text : text.slice(0, remark)).trim();
}
