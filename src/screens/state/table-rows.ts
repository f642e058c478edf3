import { FLAG_CODES } from '../../follow/flags/index.js';
import type { NightView, StarColumns } from '../../night/view.js';
import { typeText } from '../pictures/star-words.js';

/** What the star table can be ordered by, in the order of its columns. */
export const SORT_KEYS = ['merit', 'id', 'type', 'mag', 'colour', 'absMag', 'odds', 'readings'] as const;

export type SortKey = (typeof SORT_KEYS)[number];

export interface RowChoice {
  readonly sort: SortKey;
  readonly descending: boolean;
  /** Part of an identifier, type or flag; small letters. */
  readonly filter: string;
  readonly flaggedOnly: boolean;
}

/** Stars of the table in its order. Unknown values come last in either direction. */
export function tableRows(view: Pick<NightView, 'stars' | 'shortlist'>, choice: RowChoice): Uint32Array {
  const { stars } = view;
  const wanted = choice.filter.toLowerCase().trim();
  const rows = new Uint32Array(stars.count);
  let count = 0;
  for (let star = 0; star < stars.count; star++) {
    if (choice.flaggedOnly && stars.flagBits[star] === 0) continue;
    if (wanted !== '' && !holds(stars, star, wanted)) continue;
    rows[count++] = star;
  }
  return sortRows(rows.slice(0, count), view, choice);
}

/** Names of a star's flags, as they are listed to people. */
export function flagCodesOf(stars: StarColumns, star: number): readonly string[] {
  return FLAG_CODES.filter((_, bit) => (stars.flagBits[star] & (1 << bit)) !== 0);
}

function holds(stars: StarColumns, star: number, wanted: string): boolean {
  return (
    stars.ids[star].toLowerCase().includes(wanted) ||
    typeText(stars, star).toLowerCase().includes(wanted) ||
    (stars.flagBits[star] !== 0 &&
      flagCodesOf(stars, star).some(
        code => code.includes(wanted) || code.replaceAll('-', ' ').includes(wanted),
      ))
  );
}

function sortRows(
  rows: Uint32Array,
  view: Pick<NightView, 'stars' | 'shortlist'>,
  choice: RowChoice,
): Uint32Array {
  const sign = choice.descending ? -1 : 1;
  if (choice.sort === 'id') {
    const keys = view.stars.ids.map(naturalKey);
    return rows.sort((a, b) => (keys[a] === keys[b] ? a - b : keys[a] < keys[b] ? -sign : sign));
  }
  const values = sortValues(view, choice.sort);
  return rows.sort((a, b) => {
    const [x, y] = [values[a], values[b]];
    if (x === y || (Number.isNaN(x) && Number.isNaN(y))) return a - b;
    if (Number.isNaN(x) || Number.isNaN(y)) return Number.isNaN(x) ? 1 : -1;
    return x < y ? -sign : sign;
  });
}

/** Puts 'S9' before 'S10': numbers are padded to one length. A sort by such keys is far quicker than a collator. */
function naturalKey(id: string): string {
  return id.toLowerCase().replace(/\d+/g, digits => digits.padStart(12, '0'));
}

function sortValues(
  { stars, shortlist }: Pick<NightView, 'stars' | 'shortlist'>,
  sort: Exclude<SortKey, 'id'>,
): ArrayLike<number> {
  switch (sort) {
    case 'merit': {
      const places = new Float64Array(stars.count).fill(Number.NaN);
      shortlist.forEach((entry, place) => {
        places[entry.star] = place;
      });
      return places;
    }
    case 'type':
      // Hot to cool within a class, classes in the order of CLASSES.
      return Float64Array.from(
        { length: stars.count },
        (_, star) => stars.classIndex[star] * 100 + stars.subtype[star],
      );
    case 'mag':
      return stars.mag;
    case 'colour':
      return stars.colour;
    case 'absMag':
      return stars.absMag;
    case 'odds':
      return stars.classOdds;
    case 'readings':
      return stars.readings;
  }
}
