import { clock } from '../sky/night-of.js';
import type { Span } from '../sky/time-grid.js';

/** '01:10-02:40 UT', '00:20-03:50 UT in 2 stretches' */
export function hours(spans: readonly Span[]): string {
  const whole = `${clock(spans[0][0])}-${clock(spans[spans.length - 1][1])} UT`;
  return spans.length === 1 ? whole : `${whole} in ${spans.length} stretches`;
}

/** A time that is needed, rounded up so that it is enough: '35 min'. */
export function minutes(duration_ms: number): string {
  return `${Math.ceil(duration_ms / 60_000 - 1e-6)} min`;
}

export function overlaps([from, until]: Span, [otherFrom, otherUntil]: Span): boolean {
  return from < otherUntil && otherFrom < until;
}
