import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { NightView } from '../../../src/night/view.js';
import { KEY_LIST } from '../../../src/screens/keys/key-list.js';
import { visibleRows } from '../../../src/screens/state/navigation.js';
import { reduce } from '../../../src/screens/state/reduce.js';
import { currentStar } from '../../../src/screens/state/selection.js';
import { NOW_MS, nightView, starDetail } from '../../support/night-view.js';
import { key, newStore } from '../../support/render-screen.js';

function storeWith(view: NightView) {
  const made = newStore();
  made.store.dispatch({ kind: 'view', view });
  return made;
}

/** The night before its last two flagged stars came. */
function earlierView(): NightView {
  const view = nightView(6, 22);
  return { ...view, shortlist: view.shortlist.slice(0, 3) };
}

describe('selection', () => {
  it('follows the star to point at next until a star is selected', () => {
    const { store } = storeWith(nightView());
    expect(currentStar(store.getState())).toBe(nightView().shortlist[0].star);
    store.dispatch(key('down'));
    expect(store.getState().selected).toBe(nightView().shortlist[1].star);
    store.dispatch(key('escape'));
    expect(currentStar(store.getState())).toBe(nightView().shortlist[0].star);
  });

  it('stays on its star when the shortlist is ordered anew', () => {
    const view = nightView();
    const { store } = storeWith(view);
    store.dispatch(key('3'));
    store.dispatch({ kind: 'view', view: { ...view, revision: 8, shortlist: view.shortlist.toReversed() } });
    expect(store.getState().selected).toBe(view.shortlist[2].star);
  });

  it('keeps the table where it is when stars are added before the selected one', () => {
    const view = nightView();
    const { store } = storeWith(view);
    for (const name of ['s', 'o', 'down', 'down', 'down']) store.dispatch(key(name));
    const { selected, table } = store.getState();
    expect(table.anchor.star).toBe(selected);
    const ids = [...view.stars.ids];
    ids[399] = 'AA-0000';
    store.dispatch({ kind: 'view', view: { ...view, revision: 8, stars: { ...view.stars, ids } } });
    expect(store.getState().selected).toBe(selected);
    expect(store.getState().table.anchor).toEqual(table.anchor);
    expect(store.getState().table.rows[0]).toBe(399);
  });

  it('opens the table at the star that was selected elsewhere', () => {
    const { store } = storeWith(nightView());
    for (const name of ['tab', 'left', 'left', 's']) store.dispatch(key(name));
    const state = store.getState();
    expect(state.selected).toBeLessThan(395);
    expect([...visibleRows(state)]).toContain(state.selected);
  });

  it('two keys in one read both count', () => {
    const { store } = storeWith(nightView());
    store.dispatch(key('down'));
    store.dispatch(key('down'));
    expect(store.getState().selected).toBe(nightView().shortlist[2].star);
  });
});

describe('news', () => {
  it('counts what was flagged since the start, until it is selected', () => {
    const { store } = storeWith(earlierView());
    expect(store.getState().unseen.size).toBe(0);
    store.dispatch({ kind: 'view', view: nightView() });
    expect([...store.getState().unseen]).toEqual(
      nightView()
        .shortlist.slice(3)
        .map(entry => entry.star),
    );
    expect(store.getState().message).toBe('new: NS-0504, supergiant and 1 more');
    store.dispatch(key('n'));
    expect(store.getState().selected).toBe(nightView().shortlist[3].star);
    expect(store.getState().unseen.size).toBe(1);
    store.dispatch(key('a'));
    expect(store.getState().unseen.size).toBe(0);
    store.dispatch(key('n'));
    expect(store.getState().message).toBe('no new flagged stars');
  });

  it('marks the stars that got their place with the newest frame', () => {
    const view = nightView();
    const colour = view.stars.colour.slice();
    colour[7] = Number.NaN;
    const { store } = storeWith({ ...nightView(6, 23), stars: { ...view.stars, colour } });
    store.dispatch({ kind: 'view', view });
    expect(store.getState().fresh).toEqual([7]);
  });
});

describe('the star screen', () => {
  it('asks for the detail once, and drops one that comes too late', () => {
    const view = nightView();
    const { store, effects } = storeWith(view);
    store.dispatch(key('return'));
    expect(effects).toEqual([{ kind: 'ask-detail', star: view.shortlist[0].star }]);
    store.dispatch(key('right'));
    expect(effects.at(-1)).toEqual({ kind: 'ask-detail', star: view.shortlist[1].star });
    store.dispatch({ kind: 'detail', detail: starDetail(view, 0) });
    expect(store.getState().detail).toBeUndefined();
    store.dispatch({ kind: 'detail', detail: starDetail(view, 1) });
    expect(store.getState().detail?.star).toBe(view.shortlist[1].star);
    store.dispatch({ kind: 'view', view: { ...view, revision: 8 } });
    expect(effects).toHaveLength(3);
  });

  it('goes back the way it came', () => {
    const { store } = storeWith(nightView());
    for (const name of ['s', 'return', '?']) store.dispatch(key(name));
    for (const screen of ['star', 'stars', 'field']) {
      store.dispatch(key('q'));
      expect(store.getState().screen).toBe(screen);
    }
  });
});

describe('time, size and the end', () => {
  it('only a new minute is news', () => {
    const { store } = newStore();
    const before = store.getState();
    store.dispatch({ kind: 'tick', now_ms: NOW_MS + 5000 });
    expect(store.getState()).toBe(before);
    store.dispatch({ kind: 'tick', now_ms: NOW_MS + 60_000 });
    expect(store.getState().now_ms).toBe(NOW_MS + 60_000);
  });

  it('a new size draws everything again', () => {
    const { store, effects } = newStore();
    store.dispatch({ kind: 'resize', columns: 100, rows: 40 });
    expect(effects).toEqual([{ kind: 'redraw' }]);
  });

  it('q quits from the first screen only, Ctrl-C from anywhere', () => {
    const { store, effects } = newStore();
    store.dispatch(key('f'));
    store.dispatch(key('q'));
    expect(effects).toEqual([]);
    store.dispatch(key('q'));
    expect(effects).toEqual([{ kind: 'quit' }]);
    store.dispatch(key('/'));
    const ctrlC = { name: 'char', char: 'c', ctrl: true, meta: false, shift: false } as const;
    store.dispatch({ kind: 'key', key: ctrlC });
    expect(effects).toHaveLength(2);
  });
});

describe('search', () => {
  it('narrows the table with every letter; Esc brings all rows back', () => {
    const { store } = storeWith(nightView());
    store.dispatch(key('/'));
    for (const letter of 'dwarf') store.dispatch(key(letter));
    expect(store.getState().table.rows.length).toBe(2);
    store.dispatch(key('backspace'));
    expect(store.getState().table.filter).toBe('dwar');
    store.dispatch({ kind: 'key', key: { name: 'paste', text: '\x1b[31mf\x07' } });
    expect(store.getState().table.filter).toBe('dwarf\ufffd');
    store.dispatch(key('escape'));
    expect(store.getState()).toMatchObject({ typing: false, screen: 'stars' });
    expect(store.getState().table.rows.length).toBe(400);
  });
});

it('no sequence of keys breaks the state, with or without a night', () => {
  const names = [...new Set(KEY_LIST.flatMap(entry => entry.keys))].map(
    name => ({ enter: 'return', 'page-up': 'pageup', 'page-down': 'pagedown' })[name] ?? name,
  );
  const events = fc.array(fc.constantFrom(...names.filter(name => !name.includes('-') || name === '-')), {
    maxLength: 60,
  });
  fc.assert(
    fc.property(events, fc.boolean(), (keys, withNight) => {
      let { state } = { state: newStore().store.getState() };
      const view = nightView();
      if (withNight) ({ state } = reduce(state, { kind: 'view', view }));
      for (const name of keys) ({ state } = reduce(state, key(name)));
      expect(state.selected).toBeLessThan(view.stars.count);
      expect(state.selected).toBeGreaterThanOrEqual(-1);
      if (state.window !== undefined) {
        expect(state.window.colourTo).toBeGreaterThan(state.window.colourFrom);
        expect(state.window.magTo).toBeGreaterThan(state.window.magFrom);
      }
    }),
    { seed: 3, numRuns: 150 },
  );
});
