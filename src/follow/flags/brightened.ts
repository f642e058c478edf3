import { judgeDrift } from './drift.js';
import type { FlagRule } from './rule.js';

/** The star ended the night brighter than it began it, by at least 0.1 mag (drift.ts). */
export const brightened: FlagRule = { code: 'brightened', judge: evidence => judgeDrift(evidence, -1) };
