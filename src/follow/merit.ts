import type { RaisedFlag } from './flags/index.js';
import type { FlagSetting } from './settings.js';

/**
 * How much a star deserves the next exposure: the largest of flag weight x odds over its flags. Nothing else
 * goes into it, so that anyone can check the order of the shortlist by hand.
 */
export function meritOf(
  flags: readonly RaisedFlag[],
  settings: Readonly<Record<string, FlagSetting>>,
): number {
  return flags.reduce((best, flag) => Math.max(best, (settings[flag.code]?.weight ?? 0) * flag.odds), 0);
}
