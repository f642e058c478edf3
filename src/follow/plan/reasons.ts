import { clock } from '../sky/night-of.js';
import type { Span } from '../sky/time-grid.js';
import { jobOf, stretchesOf } from './job.js';
import { pinReason } from './pin-reason.js';
import type { PlanNight, PlannedBlock, PlanTarget } from './plan.js';
import { common } from './stretches.js';
import { hours, minutes, overlaps } from './words.js';

/** So many of those that took the time are named. */
const MOST_NAMED = 3;

/** Why a target has no place in a plan, in words with numbers; `merits` of all targets by id. */
export function reasonFor(
  target: PlanTarget,
  night: PlanNight,
  blocks: readonly PlannedBlock[],
  merits: ReadonlyMap<string, number>,
): string {
  const ahead: Span = [night.now_ms, Number.POSITIVE_INFINITY];
  const windows = common(target.windows, [ahead]);
  if (windows.length === 0) return target.whyNever();
  if (typeof target.pin === 'number') return pinReason(target.pin, target, night, blocks);
  const setup_ms = night.setup_ms(undefined, target.id);
  const fits = (given: PlanNight) =>
    Number.isFinite(jobOf(target, given).earliestFinish_ms(night.now_ms, setup_ms));
  const unbroken: PlanNight = { ...night, breaks: [] };
  if (!fits(unbroken)) return tooShort(target, windows, unbroken, setup_ms);
  if (!fits(night)) return broken(target, windows, night);
  return displaced(target, stretchesOf(target.windows, night), blocks, merits);
}

/** 'sets below airmass 2.0 at 02:14 UT, needs 35 min from 01:50', for the longest stretch there is. */
function tooShort(target: PlanTarget, windows: readonly Span[], night: PlanNight, setup_ms: number): string {
  const stretches = stretchesOf(target.windows, night)
    .map(([from, until]): Span => [Math.max(from, night.now_ms + setup_ms), until])
    .sort((a, b) => b[1] - b[0] - (a[1] - a[0]));
  const longest = stretches[0];
  if (longest === undefined) return `it is not dark in its hours ${hours(windows)}`;
  const [from, until] = longest;
  const duration_ms = target.duration_ms(Math.min(from, until));
  if (!(duration_ms > 0)) return `no exposure is known for it at ${clock(from)} UT`;
  const closes = target.windows.some(([, end]) => end === until) ? target.closes(until) : 'the dark ends';
  return `${closes} at ${clock(until)} UT, needs ${minutes(duration_ms)} from ${clock(from)}`;
}

/** 'overlaps the break 01:00-01:30 UT, needs 35 min in 00:40-01:50 UT' */
function broken(target: PlanTarget, windows: readonly Span[], night: PlanNight): string {
  const breaks = night.breaks.filter(span => windows.some(window => overlaps(window, span)));
  const words = breaks.length === 1 ? 'break' : 'breaks';
  const needs = minutes(target.duration_ms(windows[0][0]));
  const listed = breaks.map(span => hours([span])).join(' and ');
  return `overlaps the ${words} ${listed}, needs ${needs} in ${hours(windows)}`;
}

/** 'its hours 01:10-02:40 UT are taken by a and b, worth more together' */
function displaced(
  target: PlanTarget,
  stretches: readonly Span[],
  blocks: readonly PlannedBlock[],
  merits: ReadonlyMap<string, number>,
): string {
  const takers = blocks.filter(block =>
    stretches.some(span => overlaps(span, [block.setup_ms, block.end_ms])),
  );
  const start = `its hours ${hours(stretches)}`;
  if (takers.length === 0) return `${start} leave no room between the slews of the others`;
  const sum = takers.reduce((total, { id }) => total + (merits.get(id) ?? 0), 0);
  const each = takers.every(({ id }) => (merits.get(id) ?? 0) > target.merit);
  const worth = each ? ', worth more' : sum > target.merit ? ', worth more together' : '';
  const named = takers.slice(0, MOST_NAMED).map(({ id }) => id);
  const others = takers.length - named.length;
  const list = [...named, ...(others > 0 ? [`${others} more`] : [])].join(', ');
  return `${start} are taken by ${list}${worth}`;
}
