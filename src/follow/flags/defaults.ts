import type { FlagSetting } from '../settings.js';

/**
 * Threshold (odds, or one minus the chance of a false alarm) and weight in the merit of every flag, as they
 * hold unless the profile says otherwise. Judgement: rare and short-lived things weigh most.
 */
export const DEFAULT_FLAGS: Readonly<Record<string, FlagSetting>> = {
  'white-dwarf': { on: true, threshold: 0.7, weight: 10 },
  'hot-subdwarf': { on: true, threshold: 0.6, weight: 9 },
  brightened: { on: true, threshold: 0.999, weight: 8 },
  faded: { on: true, threshold: 0.999, weight: 8 },
  'between-sequences': { on: true, threshold: 0.6, weight: 8 },
  'fits-none': { on: true, threshold: 0.6, weight: 8 },
  supergiant: { on: true, threshold: 0.6, weight: 7 },
  'blue-straggler': { on: true, threshold: 0.6, weight: 6 },
  ultracool: { on: true, threshold: 0.7, weight: 6 },
  subdwarf: { on: true, threshold: 0.6, weight: 5 },
  variable: { on: true, threshold: 0.999, weight: 5 },
  'bright-giant': { on: true, threshold: 0.6, weight: 3 },
  'above-main-sequence': { on: true, threshold: 0.7, weight: 3 },
  'colour-changed': { on: true, threshold: 0.999, weight: 6 },
  'high-velocity': { on: true, threshold: 0.7, weight: 4 },
  'instability-strip': { on: true, threshold: 0.6, weight: 2 },
};
