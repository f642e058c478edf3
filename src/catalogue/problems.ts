import type { SafeText } from './safe-text.js';

/** A thing wrong with a file, told so that the observer can act on it. */
export interface Problem {
  /** A code of PROBLEM_CODES, such as 'row-width'. */
  readonly code: string;
  readonly file: SafeText;
  /** 1-based; 0 when the problem is the file's as a whole. */
  readonly line: number;
  /** What was seen, what was expected, what to do: one sentence each, already cleaned. */
  readonly text: SafeText;
  /** What it cost: only that row, or the whole file. */
  readonly cost: 'row' | 'file' | 'nothing';
}
