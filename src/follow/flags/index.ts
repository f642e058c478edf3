import { oddsText } from '../../science/odds/index.js';
import type { FlagSetting } from '../settings.js';
import { aboveMainSequence } from './above-main-sequence.js';
import { betweenSequences } from './between-sequences.js';
import { blueStraggler } from './blue-straggler.js';
import { brightGiant } from './bright-giant.js';
import { brightened } from './brightened.js';
import { standingCautions } from './cautions.js';
import { colourChanged } from './colour-changed.js';
import type { RaisedFlag, StarEvidence } from './evidence.js';
import { faded } from './faded.js';
import { fitsNone } from './fits-none.js';
import { highVelocity } from './high-velocity.js';
import { hotSubdwarf } from './hot-subdwarf.js';
import { instabilityStrip } from './instability-strip.js';
import type { FlagRule } from './rule.js';
import { subdwarf } from './subdwarf.js';
import { supergiant } from './supergiant.js';
import { ultracool } from './ultracool.js';
import { variable } from './variable.js';
import { whiteDwarf } from './white-dwarf.js';

export { DEFAULT_FLAGS } from './defaults.js';
export type {
  BandChange,
  DistanceSource,
  PairedChange,
  RaisedFlag,
  StarChanges,
  StarEvidence,
} from './evidence.js';

/** Every flag there is. Order: as they are listed to people. */
const RULES: readonly FlagRule[] = [
  whiteDwarf,
  hotSubdwarf,
  supergiant,
  brightGiant,
  subdwarf,
  ultracool,
  blueStraggler,
  betweenSequences,
  aboveMainSequence,
  fitsNone,
  variable,
  brightened,
  faded,
  colourChanged,
  highVelocity,
  instabilityStrip,
];

/** Codes in fixed order: bit i of a star's flag bits belongs to FLAG_CODES[i]. */
export const FLAG_CODES: readonly string[] = RULES.map(rule => rule.code);

export interface Verdict {
  readonly flags: readonly RaisedFlag[];
  /** What speaks against trusting the star's numbers, and flags that were held back for it. */
  readonly cautions: readonly string[];
}

/** Judges one star. A flag needs clean data: otherwise it becomes a caution that says what would settle it. */
export function raiseFlags(evidence: StarEvidence, settings: Readonly<Record<string, FlagSetting>>): Verdict {
  const standing = standingCautions(evidence);
  const flags: RaisedFlag[] = [];
  const cautions: string[] = standing.map(caution => caution.text);
  for (const rule of RULES) {
    const setting = settings[rule.code];
    if (setting === undefined || !setting.on) continue;
    const judgement = rule.judge(evidence);
    if (judgement === undefined || !(judgement.odds >= setting.threshold)) continue;
    const blocking = standing.find(caution => caution.blocks(rule.code));
    if (blocking === undefined)
      flags.push({ code: rule.code, odds: judgement.odds, because: judgement.because() });
    else
      cautions.push(
        `perhaps ${rule.code.replaceAll('-', ' ')} (odds ${oddsText(judgement.odds)}), but ${blocking.text}`,
      );
  }
  return { flags, cautions };
}
