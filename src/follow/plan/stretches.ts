import type { Span } from '../sky/time-grid.js';

/** What two lists of spans in order of time have in common. */
export function common(a: readonly Span[], b: readonly Span[]): Span[] {
  return a.flatMap(([from, until]) =>
    b
      .map(([otherFrom, otherUntil]): Span => [Math.max(from, otherFrom), Math.min(until, otherUntil)])
      .filter(([start, end]) => start < end),
  );
}

/** What is left of spans outside others; both in order of time. */
export function without(spans: readonly Span[], taken: readonly Span[]): Span[] {
  return taken.reduce<Span[]>(
    (left, [takenFrom, takenUntil]) =>
      left.flatMap(([from, until]) =>
        takenUntil <= from || takenFrom >= until
          ? [[from, until] as const]
          : [[from, takenFrom] as const, [takenUntil, until] as const].filter(([start, end]) => start < end),
      ),
    [...spans],
  );
}
