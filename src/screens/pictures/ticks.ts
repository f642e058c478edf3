/** Round values inside a range and how many decimals they need. */
export interface Ticks {
  readonly values: readonly number[];
  readonly decimals: number;
}

const ROUND_STEPS = [1, 2, 5];

/**
 * Multiples of 1, 2 or 5 times a power of ten, at most `most` of them. None when the range is empty or not a
 * range; the single value when both ends are the same round value.
 */
export function roundTicks(from: number, to: number, most: number): Ticks {
  const span = Math.abs(to - from);
  if (!(span > 0) || !Number.isFinite(span) || most < 1) return { values: [], decimals: 0 };
  const low = Math.min(from, to);
  const high = Math.max(from, to);
  const power = Math.floor(Math.log10(span / most));
  for (let exponent = power; exponent <= power + 2; exponent++) {
    for (const digit of ROUND_STEPS) {
      const step = digit * 10 ** exponent;
      const slack = step * 1e-6;
      const first = Math.ceil((low - slack) / step);
      const last = Math.floor((high + slack) / step);
      if (last - first + 1 > most) continue;
      const decimals = Math.max(0, -exponent);
      const values = Array.from({ length: Math.max(0, last - first + 1) }, (_, i) =>
        Number(((first + i) * step).toFixed(decimals)),
      );
      return { values, decimals };
    }
  }
  return { values: [], decimals: 0 };
}

const MINUTE_MS = 60_000;
const TIME_STEPS_MIN = [1, 2, 5, 10, 15, 30, 60, 120, 180, 240, 360, 720, 1440];

/** Round times of day (UT) inside a range, at most `most` of them, Unix ms. */
export function timeTicks(from_ms: number, to_ms: number, most: number): readonly number[] {
  if (!(to_ms > from_ms) || most < 1) return [];
  for (const minutes of TIME_STEPS_MIN) {
    const step = minutes * MINUTE_MS;
    const first = Math.ceil(from_ms / step);
    const count = Math.floor(to_ms / step) - first + 1;
    if (count <= most) return Array.from({ length: Math.max(0, count) }, (_, i) => (first + i) * step);
  }
  return [];
}
