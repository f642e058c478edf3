import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { roundTicks, timeTicks } from '../../../src/screens/pictures/ticks.js';

describe('round ticks', () => {
  it('are what one would choose', () => {
    expect(roundTicks(-7, 16, 6)).toEqual({ values: [-5, 0, 5, 10, 15], decimals: 0 });
    expect(roundTicks(-0.5, 2, 6)).toEqual({ values: [-0.5, 0, 0.5, 1, 1.5, 2], decimals: 1 });
    expect(roundTicks(12.31, 12.48, 4)).toEqual({ values: [12.35, 12.4, 12.45], decimals: 2 });
    expect(roundTicks(16, -7, 6).values).toEqual([-5, 0, 5, 10, 15]);
  });

  it('there are none where there is no range', () => {
    for (const [from, to] of [
      [3, 3],
      [Number.NaN, 4],
      [0, Infinity],
    ])
      expect(roundTicks(from, to, 5).values).toEqual([]);
    expect(roundTicks(0, 1, 0).values).toEqual([]);
  });

  it('lie inside, evenly spaced, at most as many as wanted, at least one', () => {
    fc.assert(
      fc.property(
        fc.double({ min: -1e3, max: 1e3, noNaN: true }),
        fc.double({ min: 1e-3, max: 1e3, noNaN: true }),
        fc.integer({ min: 2, max: 12 }),
        (from, span, most) => {
          const { values } = roundTicks(from, from + span, most);
          expect(values.length).toBeLessThanOrEqual(most);
          expect(values.length).toBeGreaterThan(0);
          for (const value of values) {
            expect(value).toBeGreaterThanOrEqual(from - span * 1e-5);
            expect(value).toBeLessThanOrEqual(from + span * (1 + 1e-5));
          }
          for (let i = 2; i < values.length; i++)
            expect(values[i] - values[i - 1]).toBeCloseTo(values[1] - values[0], 6);
        },
      ),
      { seed: 4, numRuns: 500 },
    );
  });
});

it('ticks of time are whole hours and quarters', () => {
  const at = (hour: number, minute: number) => Date.UTC(2026, 10, 9, hour, minute);
  expect(timeTicks(at(1, 7), at(4, 50), 4)).toEqual([at(2, 0), at(3, 0), at(4, 0)]);
  expect(timeTicks(at(1, 7), at(1, 50), 4)).toEqual([at(1, 15), at(1, 30), at(1, 45)]);
  expect(timeTicks(at(1, 7), at(1, 7), 4)).toEqual([]);
});
