import type { ScreenName, ScreenState } from '../state/screen-state.js';
import { isOffered, type KeyEntry } from './key-entry.js';
import { KEY_LIST } from './key-list.js';

export interface KeyHint {
  readonly key: string;
  readonly label: string;
}

const TYPING: readonly KeyHint[] = [
  { key: 'Enter', label: 'keep the search' },
  { key: 'Esc', label: 'clear it' },
];

/** What the line of keys offers: what can be done on this screen now. */
export function keyHints(state: ScreenState): readonly KeyHint[] {
  if (state.typing) return TYPING;
  return KEY_LIST.filter(
    entry =>
      entry.label !== undefined && isOffered(entry, state.screen) && (entry.whyNot?.(state) ?? '') === '',
  ).map(entry => ({ key: entry.footerKey ?? entry.shown, label: entry.label ?? '' }));
}

/** A line of the list of keys, on the screen and in the README. */
export interface KeyLine {
  readonly keys: string;
  readonly where: string;
  readonly does: string;
}

const WHERE: Readonly<Record<ScreenName, string>> = {
  field: 'Field',
  stars: 'Stars',
  star: 'Star',
  files: 'Files',
  help: 'Keys',
};

/** All keys, or those whose line holds the text. */
export function keyLines(search = ''): readonly KeyLine[] {
  const wanted = search.trim().toLowerCase();
  return KEY_LIST.map(lineOf).filter(line =>
    `${line.keys} ${line.where} ${line.does}`.toLowerCase().includes(wanted),
  );
}

function lineOf(entry: KeyEntry): KeyLine {
  const where = entry.where === 'everywhere' ? 'everywhere' : entry.where.map(name => WHERE[name]).join(', ');
  return { keys: entry.shown, where, does: entry.does };
}
