import { clock } from '../sky/night-of.js';
import type { Span } from '../sky/time-grid.js';
import type { PlanNight, PlannedBlock, PlanTarget } from './plan.js';
import { hours, minutes, overlaps } from './words.js';

/** Why a target cannot be begun at its settled time. */
export function pinReason(
  pin_ms: number,
  target: PlanTarget,
  night: PlanNight,
  blocks: readonly PlannedBlock[],
): string {
  if (pin_ms < night.now_ms) return `pinned at ${clock(pin_ms)} UT, which is past`;
  const duration_ms = target.duration_ms(pin_ms);
  const start = `pinned at ${clock(pin_ms)} UT for ${minutes(duration_ms)}`;
  if (!(duration_ms > 0)) return `pinned at ${clock(pin_ms)} UT, when no exposure is known for it`;
  const needed: Span = [pin_ms, pin_ms + duration_ms];
  if (!isWithin(needed, target.windows)) return `${start}, outside its hours ${hours(target.windows)}`;
  if (!isWithin(needed, night.dark)) return `${start}, when it is not dark`;
  const setup_ms = night.setup_ms(undefined, target.id);
  const withSlew: Span = [pin_ms - setup_ms, needed[1]];
  const inTheWay = night.breaks.find(span => overlaps(withSlew, span));
  if (inTheWay !== undefined) return `${start}, overlaps the break ${hours([inTheWay])}`;
  if (withSlew[0] < night.now_ms)
    return `${start}, but the slew lasts until ${clock(night.now_ms + setup_ms)}`;
  const taker = blocks.find(block => overlaps(withSlew, [block.setup_ms, block.end_ms]));
  if (taker === undefined) return `${start}, no time for the slews before and after`;
  return `${start}, overlaps ${taker.id} (${hours([[taker.start_ms, taker.end_ms]])})`;
}

function isWithin([from, until]: Span, spans: readonly Span[]): boolean {
  return spans.some(([start, end]) => from >= start && until <= end);
}
