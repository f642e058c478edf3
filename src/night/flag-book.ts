import {
  FLAG_CODES,
  type RaisedFlag,
  raiseFlags,
  type StarEvidence,
  type Verdict,
} from '../follow/flags/index.js';
import { meritOf } from '../follow/merit.js';
import type { FlagSetting } from '../follow/settings.js';

/** A flagged or doubtful star as the book keeps it. */
export interface Entry extends Verdict {
  readonly merit: number;
  /** Frame that raised the first flag; -1 while there are only cautions. */
  readonly firstFrame: number;
}

/** Which stars are unusual, and since when. */
export class FlagBook {
  private readonly entries = new Map<number, Entry>();

  constructor(private readonly settings: Readonly<Record<string, FlagSetting>>) {}

  /** Judges a star anew. */
  judge(star: number, evidence: StarEvidence, frame: number): void {
    const verdict = raiseFlags(evidence, this.settings);
    const earlier = this.entries.get(star);
    if (verdict.flags.length === 0 && verdict.cautions.length === 0) {
      this.entries.delete(star);
      return;
    }
    const flagged = verdict.flags.length > 0;
    const first = earlier !== undefined && earlier.firstFrame >= 0 ? earlier.firstFrame : frame;
    this.entries.set(star, {
      ...verdict,
      merit: meritOf(verdict.flags, this.settings),
      firstFrame: flagged ? first : -1,
    });
  }

  of(star: number): Entry | undefined {
    return this.entries.get(star);
  }

  /** Flagged stars with their entries, best merit first. */
  flagged(): [number, Entry][] {
    return [...this.entries]
      .filter(([, entry]) => entry.flags.length > 0)
      .sort(([a, first], [b, second]) => second.merit - first.merit || a - b);
  }
}

/** Bit i is set where FLAG_CODES[i] is raised. */
export function flagBits(flags: readonly RaisedFlag[]): number {
  return flags.reduce((bits, flag) => bits | (1 << FLAG_CODES.indexOf(flag.code)), 0);
}
