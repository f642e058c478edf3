import type { StarClass } from '../../science/classes.js';
import type { FlagRule } from './rule.js';
import { classSentence } from './words.js';

/** A flag that is nothing but the odds of some classes together. Source: the track fit itself. */
function classFlag(code: string, name: string, classes: readonly StarClass[]): FlagRule {
  return {
    code,
    judge: evidence => {
      const odds = classes.reduce((sum, starClass) => sum + evidence.odds[starClass], 0);
      return { odds, because: () => classSentence(evidence, name, odds) };
    },
  };
}

export const whiteDwarf = classFlag('white-dwarf', 'white dwarf', ['WD']);
export const hotSubdwarf = classFlag('hot-subdwarf', 'hot subdwarf', ['sdOB']);
export const supergiant = classFlag('supergiant', 'supergiant', ['Ib', 'Iab', 'Ia']);
export const brightGiant = classFlag('bright-giant', 'bright giant', ['II']);
export const subdwarf = classFlag('subdwarf', 'metal-poor subdwarf', ['sd']);
