import type { StarClass } from '../../science/classes.js';
import type { FlagRule } from './rule.js';
import { classSentence } from './words.js';

/** A flag that is nothing but the odds of some classes together, with the common sentence. */
export function classFlag(code: string, name: string, classes: readonly StarClass[]): FlagRule {
  return {
    code,
    judge: evidence => {
      const odds = classes.reduce((sum, starClass) => sum + evidence.odds[starClass], 0);
      return { odds, because: () => classSentence(evidence, name, odds) };
    },
  };
}
