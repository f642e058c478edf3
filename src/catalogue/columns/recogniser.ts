import type { InputSettings } from '../input-settings.js';
import type { ColumnHead, ColumnUse } from '../sheet.js';
import { isMeaning, type Meaning } from './meanings.js';
import { NameIndex, type NameReading } from './name-index.js';
import { UCD_MEANINGS } from './names.js';
import { splitNameAndUnit } from './units.js';

export interface ColumnReading extends NameReading {
  /** Named in the profile: no question is left. */
  readonly settled: boolean;
}

const TEXT_MEANINGS: readonly Meaning[] = ['id', 'band'];

/** Tells what columns mean: by the profile, else by content descriptor, else by the usual names. */
export class Recogniser {
  private readonly names = new NameIndex();
  private readonly settled = new Map<string, Meaning[]>();

  constructor(input: InputSettings) {
    for (const [meaning, name] of Object.entries(input.columns)) {
      if (!isMeaning(meaning)) continue;
      const plain = splitNameAndUnit(name.trim()).name;
      this.settled.set(plain, [...(this.settled.get(plain) ?? []), meaning]);
    }
  }

  read(head: ColumnHead): ColumnReading {
    const own = this.settled.get(head.name);
    const named = this.names.read(head.name);
    if (own !== undefined) return { meanings: own, doubtful: false, unit: named.unit, settled: true };
    const ucd = head.ucd.toLowerCase().replace(/\s/g, '');
    const described = Object.hasOwn(UCD_MEANINGS, ucd) ? UCD_MEANINGS[ucd] : undefined;
    if (described === undefined) return { ...named, settled: false };
    return { meanings: [described], doubtful: false, unit: named.unit, settled: false };
  }

  /** What a reader has to keep; nothing of the columns that mean nothing to us. */
  use(head: ColumnHead): ColumnUse {
    const { meanings } = this.read(head);
    if (meanings.length === 0) return 'skip';
    return meanings.some(meaning => TEXT_MEANINGS.includes(meaning)) ? 'text' : 'value';
  }
}
