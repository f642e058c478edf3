import type { StarEvidence } from './evidence.js';

/** What a rule found: how sure it is, and the sentence, made only when the flag is raised. */
export interface Judgement {
  readonly odds: number;
  readonly because: () => string;
}

/** One reason to call a star unusual: pure, one published or stated criterion. */
export interface FlagRule {
  readonly code: string;
  /** Undefined where the rule does not apply to this star at all. */
  readonly judge: (evidence: StarEvidence) => Judgement | undefined;
}

/** Probability that a Gaussian quantity exceeds a limit. */
export function chanceAbove(value: number, sigma: number, limit: number): number {
  const z = (value - limit) / Math.max(sigma, 1e-6);
  // Abramowitz & Stegun 1964, 26.2.17, error below 1e-7.
  const t = 1 / (1 + 0.2316419 * Math.abs(z));
  const tail =
    (Math.exp(-0.5 * z * z) / Math.sqrt(2 * Math.PI)) *
    t *
    (0.31938153 + t * (-0.356563782 + t * (1.781477937 + t * (-1.821255978 + t * 1.330274429))));
  return z > 0 ? 1 - tail : tail;
}
