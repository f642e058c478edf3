import { LIMITS } from '../limits.js';
import type { ProblemList } from '../problems.js';
import { missingWords } from '../readers/missing-words.js';
import { type SafeText, safeText } from '../safe-text.js';
import type { Sheet, SheetColumn } from '../sheet.js';

export interface Identifiers {
  readonly ids: readonly SafeText[];
  readonly hasIds: boolean;
}

const NONE = safeText('');

/** Identifiers of the rows, cleaned; empty for cells that say "none". */
export function readIdentifiers(
  sheet: Sheet,
  column: SheetColumn | undefined,
  missing: readonly string[],
): Identifiers {
  if (column?.kind !== 'text') return { ids: new Array<SafeText>(sheet.rows).fill(NONE), hasIds: false };
  const words = missingWords(missing);
  const ids = new Array<SafeText>(sheet.rows);
  let hasIds = false;
  for (let row = 0; row < sheet.rows; row++) {
    const id = column.text(row).trim();
    ids[row] = words.has(id.toLowerCase()) ? NONE : safeText(id, LIMITS.identifier_characters);
    if (ids[row] !== '') hasIds = true;
  }
  return { ids, hasIds };
}

/**
 * Checks that identifiers stand for one row each, as they must in a table with a row per star. When most do not
 * (a field's name in each row), they are no identifiers; otherwise the later rows of a star go.
 */
export function withoutRepeats(
  { ids, hasIds }: Identifiers,
  kept: Uint8Array,
  lines: Uint32Array,
  problems: ProblemList,
): Identifiers {
  if (!hasIds) return { ids, hasIds };
  const seen = new Set<SafeText>();
  let filled = 0;
  for (const id of ids) {
    if (id === '') continue;
    filled++;
    seen.add(id);
  }
  if (seen.size * 2 < filled) {
    problems.add('repeated-ids', 0, `${filled} rows share ${seen.size} identifiers`);
    return { ids: new Array<SafeText>(ids.length).fill(NONE), hasIds: false };
  }
  if (seen.size === filled) return { ids, hasIds };
  const before = new Set<SafeText>();
  ids.forEach((id, row) => {
    if (id === '' || kept[row] === 0) return;
    if (before.has(id)) {
      kept[row] = 0;
      problems.add('repeated-star', lines[row], `a second row for '${id}'`);
    }
    before.add(id);
  });
  return { ids, hasIds };
}
