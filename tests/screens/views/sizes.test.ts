import { describe, expect, it } from 'vitest';
import type { NightView } from '../../../src/night/view.js';
import { fieldLayout, GAP, LEAST_COLUMNS, LEAST_ROWS } from '../../../src/screens/views/layout.js';
import { nightView } from '../../support/night-view.js';
import { key, newStore, screenText } from '../../support/render-screen.js';

describe('the layout of the Field screen', () => {
  it('fills every size exactly', () => {
    for (let columns = LEAST_COLUMNS; columns <= 260; columns += 3) {
      for (let rows = LEAST_ROWS; rows <= 90; rows++) {
        const { kind, diagram, shortlist, detail } = fieldLayout(columns, rows);
        const panels = kind === 'wide' ? [diagram, shortlist, detail] : [diagram, shortlist];
        const width = panels.reduce((sum, panel) => sum + panel.width, (panels.length - 1) * GAP);
        expect(width).toBe(columns);
        const below = kind === 'stacked' ? detail.height : 0;
        expect(diagram.height + below + 3).toBe(rows);
        if (kind === 'columns') expect(shortlist.height + detail.height).toBe(diagram.height);
        expect(Math.min(diagram.width, diagram.height, shortlist.height)).toBeGreaterThan(3);
      }
    }
  });
});

describe('every screen at every size', () => {
  const sizes = [
    [60, 16],
    [79, 23],
    [100, 30],
    [132, 43],
    [170, 36],
  ] as const;
  for (const [columns, rows] of sizes) {
    it(`fits ${columns} x ${rows}`, async () => {
      for (const screen of ['', 's', 'f', '?']) {
        const { store } = newStore(columns, rows);
        store.dispatch({ kind: 'view', view: nightView() });
        if (screen !== '') store.dispatch(key(screen));
        const lines = (await screenText(store)).split('\n');
        expect(lines).toHaveLength(rows);
        for (const line of lines) expect(line.length).toBeLessThanOrEqual(columns);
        expect(lines[0]).toContain('02:41 UT');
        expect(lines[rows - 1]).toMatch(/q (quit|back)/);
      }
    });
  }

  it('below the least size says what it needs, and recovers', async () => {
    const { store } = newStore(50, 12);
    store.dispatch({ kind: 'view', view: nightView() });
    expect(await screenText(store)).toBe('needs 60 x 16 cells, has 50 x 12; Ctrl-C quits');
    store.dispatch({ kind: 'resize', columns: 80, rows: 24 });
    expect(await screenText(store)).toContain('Shortlist');
  });
});

describe('before there is anything to show', () => {
  it('says what is waited for', async () => {
    const { store } = newStore();
    const before = await screenText(store);
    expect(before).toContain('waiting for the first file in');
    expect(before).toContain('/data/tonight');
  });

  it('an empty night, and one without flags, draw all screens', async () => {
    const view = nightView();
    const empty: NightView = {
      ...view,
      frames: [],
      shortlist: [],
      problems: [],
      stars: { ...view.stars, count: 0, ids: [] },
    };
    const calm: NightView = { ...view, shortlist: [] };
    for (const night of [empty, calm]) {
      for (const screen of ['0', 's', 'f', '?', 'return']) {
        const { store } = newStore();
        store.dispatch({ kind: 'view', view: night });
        store.dispatch(key(screen));
        expect((await screenText(store)).split('\n')).toHaveLength(24);
      }
    }
    const { store } = newStore();
    store.dispatch({ kind: 'view', view: calm });
    expect(await screenText(store)).toContain('no star is flagged yet');
  });

  it('says when the directory has gone', async () => {
    const { store } = newStore();
    store.dispatch({ kind: 'view', view: nightView() });
    store.dispatch({ kind: 'folder', present: false });
    expect(await screenText(store)).toContain('FOLDER IS GONE');
  });
});

describe('the stars screen', () => {
  it('in ASCII draws its table in ASCII', async () => {
    const { store } = newStore(80, 24, 'ascii');
    store.dispatch({ kind: 'view', view: nightView() });
    store.dispatch(key('s'));
    expect(await screenText(store)).toMatch(/^[\x20-\x7e\n]*$/);
  });

  it('shows the search while it is typed', async () => {
    const { store } = newStore();
    store.dispatch({ kind: 'view', view: nightView() });
    for (const letter of '/supergiant') store.dispatch(key(letter));
    const text = await screenText(store);
    expect(text).toContain('search: supergiant');
    expect(text).toContain('1 of 400 stars with "supergiant"');
    expect(text).toContain('NS-0504');
    expect(text).not.toContain('NS-0501');
  });
});
