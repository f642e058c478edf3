import { LIMITS } from './limits.js';
import { type Cost, PROBLEM_CODES, type ProblemCode } from './problem-codes.js';
import { type SafeText, safeText } from './safe-text.js';

/** A thing wrong with a file, told so that the observer can act on it. */
export interface Problem {
  readonly code: ProblemCode;
  readonly file: SafeText;
  /** 1-based; 0 when the problem is the file's as a whole. */
  readonly line: number;
  /** What was seen, what was expected, what to do: one sentence each, already cleaned. */
  readonly text: SafeText;
  /** What it cost: only that row, the whole file, or nothing. */
  readonly cost: Cost;
}

/**
 * A problem with its advice. `seen` says what was found and what was expected, without a closing full stop;
 * it may hold raw text of the file, which is cleaned here.
 */
export function makeProblem(
  code: ProblemCode,
  file: SafeText,
  line: number,
  seen: string,
  cost: Cost = PROBLEM_CODES[code].cost,
): Problem {
  const text = safeText(`${seen}. ${PROBLEM_CODES[code].remedy}`, LIMITS.problem_characters);
  return { code, file, line, text, cost };
}

/** 'frame_012.csv:17: row-width 7 cells where the header has 12. ...' */
export function formatProblem(problem: Problem): string {
  const place = problem.line > 0 ? `${problem.file}:${problem.line}` : problem.file;
  return `${place}: ${problem.code} ${problem.text}`;
}

interface Kind {
  count: number;
  /** The first that was not told one by one. */
  more: { readonly line: number; readonly cost: Cost } | undefined;
}

/** Collects the problems of one file; of each kind ten are told one by one, the others are counted. */
export class ProblemList {
  private readonly told: Problem[] = [];
  private readonly kinds = new Map<ProblemCode, Kind>();

  constructor(private readonly file: SafeText) {}

  add(code: ProblemCode, line: number, seen: string, cost: Cost = PROBLEM_CODES[code].cost): void {
    const kind = this.kinds.get(code) ?? { count: 0, more: undefined };
    this.kinds.set(code, kind);
    kind.count++;
    if (kind.count <= LIMITS.problemsOfAKind) this.told.push(makeProblem(code, this.file, line, seen, cost));
    else kind.more ??= { line, cost };
  }

  /** All that was told, then one line for each kind that was cut short. */
  all(): readonly Problem[] {
    const counts: Problem[] = [];
    for (const [code, { count, more }] of this.kinds) {
      if (more === undefined) continue;
      const left = count - LIMITS.problemsOfAKind;
      const from = more.line > 0 ? ` from line ${more.line} on` : '';
      const seen = `${left} more of this kind${from}, ${count} in all`;
      counts.push(makeProblem(code, this.file, 0, seen, more.cost));
    }
    return [...this.told, ...counts];
  }
}
