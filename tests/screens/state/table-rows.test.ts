import { describe, expect, it } from 'vitest';
import { firstVisible, follow } from '../../../src/screens/state/scroll.js';
import { type RowChoice, tableRows } from '../../../src/screens/state/table-rows.js';
import { nightView } from '../../support/night-view.js';

const ALL: RowChoice = { sort: 'mag', descending: false, filter: '', flaggedOnly: false };
const view = nightView();

describe('rows of the star table', () => {
  it('orders by any value, in either direction, every star once', () => {
    for (const sort of ['mag', 'colour', 'absMag', 'odds'] as const) {
      const values = {
        mag: view.stars.mag,
        colour: view.stars.colour,
        absMag: view.stars.absMag,
        odds: view.stars.classOdds,
      }[sort];
      const rising = tableRows(view, { ...ALL, sort });
      expect(new Set(rising).size).toBe(view.stars.count);
      for (let i = 1; i < rising.length; i++)
        expect(values[rising[i - 1]]).toBeLessThanOrEqual(values[rising[i]]);
      const falling = tableRows(view, { ...ALL, sort, descending: true });
      for (let i = 1; i < falling.length; i++)
        expect(values[falling[i - 1]]).toBeGreaterThanOrEqual(values[falling[i]]);
    }
  });

  it('unknown values come last in either direction', () => {
    const mag = view.stars.mag.slice();
    mag[3] = Number.NaN;
    const holed = { ...view, stars: { ...view.stars, mag } };
    expect(tableRows(holed, ALL).at(-1)).toBe(3);
    expect(tableRows(holed, { ...ALL, descending: true }).at(-1)).toBe(3);
  });

  it('names are ordered by their numbers', () => {
    const ids = view.stars.ids.map((_, i) => `S${i}`);
    const rows = tableRows({ ...view, stars: { ...view.stars, ids } }, { ...ALL, sort: 'id' });
    expect([...rows.slice(8, 12)]).toEqual([8, 9, 10, 11]);
  });

  it('finds by name, by type and by flag', () => {
    const found = (filter: string) =>
      [...tableRows(view, { ...ALL, filter })].map(star => view.stars.ids[star]);
    expect(found('ns-0504')).toEqual(['NS-0504']);
    expect(found('sdB')).toEqual(['NS-0502']);
    expect(found('between')).toEqual(['J034512.30+241530.2']);
    expect(found('nothing like it')).toEqual([]);
  });

  it('merit puts the shortlist first, in its order', () => {
    const rows = tableRows(view, { ...ALL, sort: 'merit' });
    expect([...rows.slice(0, 5)]).toEqual(view.shortlist.map(entry => entry.star));
    expect(tableRows(view, { ...ALL, flaggedOnly: true })).toHaveLength(5);
  });
});

describe('scrolling', () => {
  const rows = Uint32Array.from({ length: 50 }, (_, i) => i * 3);

  it('keeps the anchor on its line and never shows less than it could', () => {
    expect(firstVisible(rows, { star: 60, line: 4 }, 10)).toBe(16);
    expect(firstVisible(rows, { star: 60, line: 30 }, 10)).toBe(0);
    expect(firstVisible(rows, { star: 147, line: 0 }, 10)).toBe(40);
    expect(firstVisible(rows, { star: 61, line: 0 }, 10)).toBe(0);
  });

  it('moves only as far as it must', () => {
    const anchor = { star: 60, line: 4 };
    expect(follow(rows, anchor, 10, 21)).toEqual({ star: 63, line: 5 });
    expect(follow(rows, anchor, 10, 40)).toEqual({ star: 120, line: 9 });
    expect(follow(rows, anchor, 10, 2)).toEqual({ star: 6, line: 0 });
  });
});
