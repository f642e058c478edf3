import type { ProblemList } from '../problems.js';
import type { SheetColumn } from '../sheet.js';
import type { Meaning, PlainMeaning } from './meanings.js';
import { PLAIN_NAMES } from './names.js';
import { sortPanStarrs } from './pan-starrs.js';
import type { Recogniser } from './recogniser.js';

/** A column with its unit: the file's, else the one its name ends with. */
export interface AssignedColumn {
  readonly column: SheetColumn;
  readonly unit: string;
}

/** The columns by what they hold. */
export class Assignment {
  constructor(
    private readonly columns: ReadonlyMap<Meaning, AssignedColumn>,
    /** Every quality column: each may speak against a row. */
    readonly flags: readonly SheetColumn[],
  ) {}

  get(meaning: Meaning): AssignedColumn | undefined {
    return this.columns.get(meaning);
  }

  has(meaning: Meaning): boolean {
    return this.columns.has(meaning);
  }

  meanings(): Iterable<Meaning> {
    return this.columns.keys();
  }
}

/** Of these a table may carry several that say the same; the first in the order of PLAIN_NAMES is taken. */
const RANKED: readonly PlainMeaning[] = ['id', 'ra', 'dec', 'time'];

interface Candidate extends AssignedColumn {
  readonly settled: boolean;
}

/**
 * Gives each meaning its column. A column that may mean two things, and two columns for one meaning, are a
 * question for the profile and are left out until it is answered.
 */
export function assignColumns(
  columns: readonly SheetColumn[],
  recogniser: Recogniser,
  problems: ProblemList,
): Assignment {
  const candidates = new Map<Meaning, Candidate[]>();
  for (const column of columns) {
    const { meanings, doubtful, unit, settled } = recogniser.read(column);
    if (!settled && (doubtful || meanings.length > 1)) {
      problems.add('ambiguous-column', 0, question(column, meanings, doubtful));
      continue;
    }
    for (const meaning of meanings) {
      const candidate = { column, unit: column.unit || unit, settled };
      candidates.set(meaning, [...(candidates.get(meaning) ?? []), candidate]);
    }
  }
  sortPanStarrs(candidates);

  const flags = (candidates.get('flag') ?? []).map(candidate => candidate.column);
  candidates.delete('flag');
  const assigned = new Map<Meaning, AssignedColumn>();
  for (const [meaning, all] of candidates) {
    const settled = all.filter(candidate => candidate.settled);
    const open = settled.length > 0 ? settled : all;
    if (open.length === 1) assigned.set(meaning, open[0]);
    else if (RANKED.includes(meaning as PlainMeaning)) assigned.set(meaning, first(meaning, open));
    else {
      const names = open.map(candidate => `'${candidate.column.name}'`).join(' and ');
      const answer = `"${meaning}" = "${open[0].column.name}"`;
      problems.add(
        'ambiguous-column',
        0,
        `${names} both look like ${meaning}; write ${answer} under [columns]`,
      );
    }
  }
  pairPosition(candidates, assigned);
  return new Assignment(assigned, flags);
}

function question(column: SheetColumn, meanings: readonly Meaning[], doubtful: boolean): string {
  const answer = `"${meanings[0]}" = "${column.name}"`;
  return doubtful
    ? `'${column.name}' may be Johnson or Cousins; if it is Cousins, write ${answer} under [columns] of the profile`
    : `'${column.name}' may be ${meanings.join(' or ')}; write for example ${answer} under [columns] of the profile`;
}

/** Place of a column's name in the order of preference; last when it came by descriptor only. */
function rank(meaning: Meaning, column: SheetColumn): number {
  const names = PLAIN_NAMES[meaning as PlainMeaning].map(name => fold(name));
  const place = names.indexOf(fold(column.name));
  return place < 0 ? names.length : place;
}

function fold(name: string): string {
  return name.toLowerCase().replace(/[-. ]/g, '_');
}

function first(meaning: Meaning, candidates: readonly Candidate[]): Candidate {
  return candidates.reduce((best, candidate) =>
    rank(meaning, candidate.column) < rank(meaning, best.column) ? candidate : best,
  );
}

/** Right ascension and declination have to come from the same pair of columns. */
function pairPosition(
  candidates: ReadonlyMap<Meaning, readonly Candidate[]>,
  assigned: Map<Meaning, AssignedColumn>,
): void {
  const ra = assigned.get('ra');
  if (ra === undefined) return;
  const place = rank('ra', ra.column);
  const partner = candidates.get('dec')?.find(candidate => rank('dec', candidate.column) === place);
  const isSettled = candidates.get('dec')?.some(candidate => candidate.settled) ?? false;
  if (partner !== undefined && !isSettled) assigned.set('dec', partner);
}
