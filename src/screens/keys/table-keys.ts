import { chooseRows, goTo } from '../state/navigation.js';
import { SORT_KEYS } from '../state/table-rows.js';
import { done, type KeyEntry } from './key-entry.js';

/** Order, search and choice of rows. */
export const TABLE_KEYS: readonly KeyEntry[] = [
  {
    keys: ['/'],
    shown: '/',
    where: ['stars', 'field', 'help'],
    label: 'find',
    does: 'Searches as you type: identifier, type or flag; on this screen: keys.',
    run: state => done({ ...goTo(state, state.screen === 'help' ? 'help' : 'stars'), typing: true }),
  },
  {
    keys: ['o'],
    shown: 'o',
    where: ['stars'],
    label: 'order by',
    does: 'Orders the table by the next column.',
    run: state => {
      const next = (SORT_KEYS.indexOf(state.table.sort) + 1) % SORT_KEYS.length;
      return done(chooseRows(state, { sort: SORT_KEYS[next], descending: false }));
    },
  },
  {
    keys: ['r'],
    shown: 'r',
    where: ['stars'],
    label: 'reverse',
    does: 'Reverses the order of the table.',
    run: state => done(chooseRows(state, { descending: !state.table.descending })),
  },
  {
    keys: ['u'],
    shown: 'u',
    where: ['stars'],
    label: 'unusual only',
    does: 'Shows the flagged stars only, or all again.',
    run: state => done(chooseRows(state, { flaggedOnly: !state.table.flaggedOnly })),
  },
];
