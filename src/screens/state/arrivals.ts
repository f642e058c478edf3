import type { NightView, ShortlistEntry } from '../../night/view.js';
import { flagWords } from '../pictures/star-words.js';
import type { Step } from './events.js';
import { withRows } from './navigation.js';
import type { ScreenState } from './screen-state.js';
import { currentStar } from './selection.js';

/** More new dots than this share of all are no news: the first frames place every star. */
const MOST_FRESH_SHARE = 0.1;

/**
 * A new view of the night. Selection and scroll stay on their stars; what the first view brings is not new.
 */
export function viewArrived(before: ScreenState, view: NightView): Step<ScreenState> {
  const known = before.view;
  const added = known === undefined ? [] : addedEntries(known, view);
  const state = withRows({
    ...before,
    view,
    fresh: known === undefined ? [] : freshStars(before, known, view),
    unseen: unseenAfter(before.unseen, added, view),
    message: added.length === 0 ? before.message : newsOf(added),
    selected: before.selected < view.stars.count ? before.selected : -1,
  });
  const star = currentStar(state);
  if (state.screen !== 'star' || star < 0) return { state, effects: [] };
  return { state: { ...state, pendingDetail: star }, effects: [{ kind: 'ask-detail', star }] };
}

function addedEntries(known: NightView, view: NightView): readonly ShortlistEntry[] {
  const flagged = new Set(known.shortlist.map(entry => entry.star));
  return view.shortlist.filter(entry => !flagged.has(entry.star));
}

function unseenAfter(
  unseen: ReadonlySet<number>,
  added: readonly ShortlistEntry[],
  view: NightView,
): ReadonlySet<number> {
  const listed = new Set(view.shortlist.map(entry => entry.star));
  const kept = [...unseen].filter(star => listed.has(star));
  if (added.length === 0 && kept.length === unseen.size) return unseen;
  return new Set([...kept, ...added.map(entry => entry.star)]);
}

/** Stars with a place on the diagram that they did not have before; kept until the next frame. */
function freshStars(before: ScreenState, known: NightView, view: NightView): readonly number[] {
  if (known.frames.length === view.frames.length) return before.fresh;
  const fresh: number[] = [];
  for (let star = 0; star < view.stars.count; star++) {
    if (!isPlaced(view, star) || (star < known.stars.count && isPlaced(known, star))) continue;
    fresh.push(star);
    if (fresh.length > view.stars.count * MOST_FRESH_SHARE) return [];
  }
  return fresh;
}

function isPlaced({ stars }: NightView, star: number): boolean {
  return !Number.isNaN(stars.colour[star] + stars.absMag[star]);
}

function newsOf(added: readonly ShortlistEntry[]): string {
  const [first] = added;
  const reason = first.flags[0] === undefined ? '' : `, ${flagWords(first.flags[0].code)}`;
  const others = added.length > 1 ? ` and ${added.length - 1} more` : '';
  return `new: ${first.id}${reason}${others}`;
}
