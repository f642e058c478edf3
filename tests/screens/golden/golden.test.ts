import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import type { ScreenStore } from '../../../src/screens/state/store.js';
import type { GlyphName } from '../../../src/screens/terminal/look.js';
import { nightView, starDetail } from '../../support/night-view.js';
import { key, newStore, screenText } from '../../support/render-screen.js';

/** Keys that lead from the Field screen to each of the others. */
const WAYS: Readonly<Record<string, readonly string[]>> = {
  field: [],
  stars: ['s'],
  star: ['return'],
  files: ['f'],
  help: ['?'],
};

const SIZES: readonly (readonly [number, number])[] = [
  [80, 24],
  [120, 36],
];

async function frameOf(screen: string, columns: number, rows: number, glyphs: GlyphName): Promise<string> {
  const { store } = newStore(columns, rows, glyphs);
  const view = nightView();
  store.dispatch({ kind: 'view', view });
  for (const name of WAYS[screen]) store.dispatch(key(name));
  answerDetail(store);
  return await screenText(store);
}

/** Stands in for the worker. */
function answerDetail(store: ScreenStore): void {
  const { view, pendingDetail } = store.getState();
  if (view === undefined || pendingDetail < 0) return;
  const place = view.shortlist.findIndex(entry => entry.star === pendingDetail);
  store.dispatch({ kind: 'detail', detail: starDetail(view, place) });
}

/** Compares with the file beside this test; UPDATE_GOLDEN=1 writes it anew, to be looked at by a person. */
function expectGolden(name: string, frame: string): void {
  const path = join(import.meta.dirname, `${name}.txt`);
  if (process.env.UPDATE_GOLDEN === '1') writeFileSync(path, `${frame}\n`);
  expect(existsSync(path), `${name}.txt is missing; UPDATE_GOLDEN=1 writes it`).toBe(true);
  expect(`${frame}\n`).toBe(readFileSync(path, 'utf8'));
}

describe('whole screens', () => {
  for (const screen of Object.keys(WAYS)) {
    for (const [columns, rows] of SIZES) {
      it(`${screen} at ${columns} x ${rows}`, async () => {
        const frame = await frameOf(screen, columns, rows, 'braille');
        expectGolden(`${screen}-${columns}x${rows}`, frame);
        expect(frame.split('\n')).toHaveLength(rows);
        for (const line of frame.split('\n')) expect(line.length).toBeLessThanOrEqual(columns);
      });
    }
  }

  it('field in ASCII holds nothing but ASCII', async () => {
    const frame = await frameOf('field', 80, 24, 'ascii');
    expectGolden('field-80x24-ascii', frame);
    expect(frame).toMatch(/^[\x20-\x7e\n]*$/);
  });

  it('field at 200 x 60', async () => {
    expectGolden('field-200x60', await frameOf('field', 200, 60, 'braille'));
  });
});
