import type { Meaning } from './meanings.js';

const SDSS_TO_PAN_STARRS: Readonly<Record<string, string>> = { g: 'gP1', r: 'rP1', i: 'iP1', z: 'zP1' };

/**
 * Tables of Pan-STARRS name their bands g r i z y, those of SDSS u g r i z. A y without a u tells the first
 * from the second, and its g r i z then are Pan-STARRS bands too. Changes the map.
 */
export function sortPanStarrs<T>(candidates: Map<Meaning, T[]>): void {
  if (!candidates.has('mag.yP1') || candidates.has('mag.u') || candidates.has('mag.gP1')) return;
  for (const meaning of [...candidates.keys()]) {
    const renamed = meaning.replace(
      /(^[^.]+\.|-)([griz])(?=-|$)/g,
      (_, before: string, band: string) => before + SDSS_TO_PAN_STARRS[band],
    ) as Meaning;
    if (renamed === meaning) continue;
    candidates.set(renamed, [...(candidates.get(renamed) ?? []), ...(candidates.get(meaning) ?? [])]);
    candidates.delete(meaning);
  }
}
