import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { makePlan } from '../../../src/follow/plan/make-plan.js';
import type { Plan, PlanNight, PlanTarget } from '../../../src/follow/plan/plan.js';
import { bruteForce, END, type SmallNight, type SmallTarget } from './brute-force.js';

const MINUTE_MS = 60_000;
const toMs = (spans: readonly (readonly [number, number])[]) =>
  spans.map(([from, until]) => [from * MINUTE_MS, until * MINUTE_MS] as const);

function targetOf({ merit, windows, duration, pin }: SmallTarget, i: number): PlanTarget {
  return {
    id: `t${i}`,
    merit,
    windows: toMs(windows),
    duration_ms: start_ms => duration(start_ms / MINUTE_MS) * MINUTE_MS,
    ...(pin === undefined ? {} : { pin: pin === 'first' ? pin : pin * MINUTE_MS }),
    closes: () => 'sets below airmass 2.0',
    whyNever: () => 'below 30 deg since 00:10 UT',
  };
}

function nightOf({ now, dark, breaks, setup }: SmallNight): PlanNight {
  const place = (id: string) => Number(id.slice(1));
  return {
    now_ms: now * MINUTE_MS,
    dark: toMs(dark),
    breaks: toMs(breaks),
    setup_ms: (from, to) => setup(from === undefined ? undefined : place(from), place(to)) * MINUTE_MS,
  };
}

const planOf = (targets: readonly SmallTarget[], night: SmallNight, previous?: Plan) =>
  makePlan(targets.map(targetOf), nightOf(night), previous);

const spans = (most: number) =>
  fc
    .array(fc.tuple(fc.integer({ min: 0, max: END - 20 }), fc.integer({ min: 5, max: 140 })), {
      minLength: 1,
      maxLength: most,
    })
    .map(pairs => {
      const sorted = [...pairs].sort((a, b) => a[0] - b[0]);
      let end = -1;
      return sorted.flatMap(([from, length]): (readonly [number, number])[] => {
        if (from <= end) return [];
        end = Math.min(END, from + length);
        return [[from, end]];
      });
    });

const duration = fc.oneof(
  fc.integer({ min: 1, max: 70 }).map(minutes => () => minutes),
  // A rising or sinking target: the time on it changes by steps over the night.
  fc.tuple(fc.integer({ min: 5, max: 40 }), fc.integer({ min: -12, max: 12 })).map(
    ([minutes, change]) =>
      (start: number) =>
        Math.max(3, minutes + Math.floor((start * change) / 100)),
  ),
);

const target: fc.Arbitrary<SmallTarget> = fc.record({
  merit: fc.integer({ min: 1, max: 12 }),
  windows: spans(3),
  duration,
});

const night: fc.Arbitrary<SmallNight> = fc
  .record({
    now: fc.integer({ min: 0, max: 60 }),
    dark: fc.oneof(fc.constant([[0, END]] as const), spans(2)),
    breaks: fc.oneof(fc.constant([]), spans(2)),
    table: fc.array(fc.integer({ min: 0, max: 12 }), { minLength: 97, maxLength: 97 }),
  })
  .map(({ table, ...rest }) => ({ ...rest, setup: (from, to) => table[((from ?? 60) * 31 + to * 7) % 97] }));

/** What must hold of every plan, checked against the targets themselves. */
function expectSound(plan: Plan, targets: readonly SmallTarget[], given: SmallNight): void {
  let ready = given.now;
  let from: number | undefined;
  for (const block of plan.blocks) {
    const i = Number(block.id.slice(1));
    const [setup, start, end] = [block.setup_ms, block.start_ms, block.end_ms].map(time => time / MINUTE_MS);
    expect(setup).toBeGreaterThanOrEqual(ready);
    expect(start - setup).toBe(given.setup(from, i));
    expect(end - start).toBeGreaterThanOrEqual(targets[i].duration(start));
    expect(targets[i].windows.some(([open, close]) => start >= open && end <= close)).toBe(true);
    expect(given.dark.some(([dusk, dawn]) => start >= dusk && end <= dawn)).toBe(true);
    expect(given.breaks.every(([begin, over]) => setup >= over || end <= begin)).toBe(true);
    [ready, from] = [end, i];
  }
  const ids = [...plan.blocks.map(({ id }) => id), ...plan.unplaced.map(({ id }) => id)];
  expect(ids.sort()).toEqual(targets.map((_, i) => `t${i}`).sort());
  for (const { reason } of plan.unplaced) expect(reason).toMatch(/\d/);
}

describe('a plan', () => {
  it('never overlaps, never leaves a window or the dark, never touches a break; every target has a place or a reason', () => {
    fc.assert(
      fc.property(fc.array(target, { maxLength: 24 }), night, (targets, given) =>
        expectSound(planOf(targets, given), targets, given),
      ),
      { numRuns: 60, seed: 21 },
    );
  });

  it('is the best of all orders of all subsets, with the earliest end of these', () => {
    fc.assert(
      fc.property(fc.array(target, { minLength: 1, maxLength: 7 }), night, (targets, given) => {
        const plan = planOf(targets, given);
        const best = bruteForce(targets, given);
        expect(plan.merit).toBe(best.merit);
        expect((plan.blocks.at(-1)?.end_ms ?? given.now * MINUTE_MS) / MINUTE_MS).toBe(best.finish);
      }),
      { numRuns: 150, seed: 22 },
    );
  });

  it('keeps a settled start and what is to be first wherever that is possible, and is the best around them', () => {
    fc.assert(
      fc.property(
        fc.array(target, { minLength: 2, maxLength: 5 }),
        night,
        fc.oneof(fc.constant('first' as const), fc.integer({ min: 20, max: 200 })),
        (targets, given, pin) => {
          const pinned = targets.map((entry, i) => (i === 0 ? { ...entry, pin } : entry));
          const plan = planOf(pinned, given);
          const best = bruteForce(pinned, given);
          expectSound(plan, pinned, given);
          const place = plan.blocks.findIndex(({ id }) => id === 't0');
          expect(place >= 0 ? 1 : 0).toBe(best.pins);
          expect(plan.merit).toBe(best.merit);
          if (place >= 0 && pin === 'first') expect(place).toBe(0);
          if (place >= 0 && pin !== 'first') expect(plan.blocks[place].start_ms).toBe(pin * MINUTE_MS);
        },
      ),
      { numRuns: 120, seed: 23 },
    );
  });

  it('of more than twelve targets is the same each time, and hardly worse than the exact one', () => {
    fc.assert(
      fc.property(fc.array(target, { minLength: 12, maxLength: 12 }), night, (targets, given) => {
        const exact = planOf(targets, given);
        // One more that is worth nothing: the search for many has to serve, and can lose next to nothing.
        const more = [...targets, { merit: 0, windows: [[0, END] as const], duration: () => 1 }];
        // The way over it is never a short cut.
        const setup = (from: number | undefined, to: number) =>
          from === 12 || to === 12 ? 12 : given.setup(from, to);
        const plan = planOf(more, { ...given, setup });
        expectSound(plan, more, { ...given, setup });
        expect(plan.merit).toBeLessThanOrEqual(exact.merit);
        expect(plan.merit).toBeGreaterThanOrEqual(0.98 * exact.merit);
        expect(planOf(more, { ...given, setup })).toEqual(plan);
      }),
      { numRuns: 20, seed: 24 },
    );
  });
});

describe('a plan of many', () => {
  it('keeps a settled start and what is to be first wherever they can be kept alone', () => {
    fc.assert(
      fc.property(
        fc.array(target, { minLength: 14, maxLength: 20 }),
        night,
        fc.integer({ min: 100, max: 250 }),
        (targets, given, pin) => {
          for (const settled of ['first', pin] as const) {
            const pinned = targets.map((entry, i) => (i === 3 ? { ...entry, pin: settled } : entry));
            const none = { merit: 0, windows: [], duration: () => 1 };
            const alone = planOf(
              pinned.map((entry, i) => (i === 3 ? entry : none)),
              given,
            );
            const plan = planOf(pinned, given);
            expectSound(plan, pinned, given);
            const found = plan.blocks.filter(({ id }) => id === 't3');
            expect(found.map(({ start_ms }) => start_ms)).toEqual(
              alone.blocks.map(({ start_ms }) => start_ms),
            );
            if (settled === 'first' && found.length > 0) expect(plan.blocks[0]).toEqual(alone.blocks[0]);
          }
        },
      ),
      { numRuns: 25, seed: 25 },
    );
  });
});

const OPEN: SmallNight = { now: 0, dark: [[0, END]], breaks: [], setup: () => 5 };
const steady = (
  merit: number,
  windows: readonly (readonly [number, number])[],
  minutes: number,
): SmallTarget => ({
  merit,
  windows,
  duration: () => minutes,
});
const reasons = (plan: Plan) => Object.fromEntries(plan.unplaced.map(({ id, reason }) => [id, reason]));
const order = (plan: Plan) => plan.blocks.map(({ id }) => id);

describe('why a target has no place', () => {
  it('it sets too soon, the dark ends, it is never up', () => {
    const targets = [
      steady(3, [[0, 134]], 35),
      steady(3, [[100, 400]], 80),
      steady(3, [[0, 50]], 10),
      steady(1, [], 5),
    ];
    const plan = planOf(targets, { ...OPEN, now: 105, dark: [[0, 170]] });
    expect(reasons(plan)).toEqual({
      t0: 'sets below airmass 2.0 at 02:14 UT, needs 35 min from 01:50',
      t1: 'the dark ends at 02:50 UT, needs 80 min from 01:50',
      t2: 'below 30 deg since 00:10 UT',
      t3: 'below 30 deg since 00:10 UT',
    });
  });

  it('a break lies in its hours', () => {
    const plan = planOf([steady(3, [[40, 110]], 35)], { ...OPEN, breaks: [[60, 90]] });
    expect(reasons(plan).t0).toBe('overlaps the break 01:00-01:30 UT, needs 35 min in 00:40-01:50 UT');
  });

  it('others are worth more, one by one or together', () => {
    const one = planOf([steady(9, [[0, 60]], 50), steady(2, [[0, 60]], 50)], OPEN);
    expect(reasons(one).t1).toBe('its hours 00:00-01:00 UT are taken by t0, worth more');
    const two = planOf([steady(4, [[0, 60]], 20), steady(4, [[0, 60]], 20), steady(6, [[0, 60]], 50)], OPEN);
    expect(reasons(two).t2).toBe('its hours 00:00-01:00 UT are taken by t1, t0, worth more together');
  });

  it('its settled start is past, outside its hours, in a break, or another has it; the rest is planned all the same', () => {
    const other = steady(1, [[0, 400]], 30);
    const pinned = (pin: number, given = OPEN) =>
      planOf([{ ...steady(5, [[60, 200]], 30), pin }, other], given);
    expect(reasons(pinned(90, { ...OPEN, now: 100 })).t0).toBe('pinned at 01:30 UT, which is past');
    expect(reasons(pinned(180)).t0).toBe('pinned at 03:00 UT for 30 min, outside its hours 01:00-03:20 UT');
    expect(reasons(pinned(90, { ...OPEN, breaks: [[100, 110]] })).t0).toBe(
      'pinned at 01:30 UT for 30 min, overlaps the break 01:40-01:50 UT',
    );
    expect(reasons(pinned(90, { ...OPEN, dark: [[0, 100]] })).t0).toBe(
      'pinned at 01:30 UT for 30 min, when it is not dark',
    );
    for (const plan of [pinned(90, { ...OPEN, now: 100 }), pinned(180)]) expect(order(plan)).toEqual(['t1']);
    const both = planOf(
      [
        { ...steady(5, [[0, 200]], 30), pin: 90 },
        { ...steady(8, [[0, 200]], 30), pin: 100 },
      ],
      OPEN,
    );
    expect(reasons(both)).toEqual({ t0: 'pinned at 01:30 UT for 30 min, overlaps t1 (01:40-02:10 UT)' });
  });
});

describe('a plan made again', () => {
  const evening = Array.from({ length: 8 }, (_, i) => steady(3 + (i % 2), [[0, 390 - i]], 30));

  it('keeps its order when only the time has moved on', () => {
    // Another order than the search itself would choose, and as good.
    const before = planOf(evening, OPEN);
    const turned: Plan = { ...before, blocks: [...before.blocks].reverse() };
    expect(order(planOf(evening, { ...OPEN, now: 10 }, turned))).toEqual(order(turned));
    expect(order(turned)).not.toEqual(order(before));
  });

  it('after a missed start drops the least it can, and leaves the rest in order', () => {
    const before = planOf(evening, OPEN);
    const late = planOf(evening, { ...OPEN, now: 150 }, before);
    expect(late.blocks.length).toBe(6);
    const kept = order(before).filter(id => order(late).includes(id));
    expect(order(late)).toEqual(kept);
    expect(late.merit).toBe(4 + 4 + 4 + 4 + 3 + 3);
  });

  it('puts a new target between the others without moving them', () => {
    const before = planOf(evening.slice(0, 5), OPEN);
    const turned: Plan = { ...before, blocks: [...before.blocks].reverse() };
    const after = planOf([...evening.slice(0, 5), steady(9, [[100, 160]], 20)], OPEN, turned);
    expect(order(after).filter(id => id !== 't5')).toEqual(order(turned));
    expect(order(after)).toContain('t5');
  });

  it('gives time nobody needs to what is worth nothing', () => {
    expect(order(planOf([steady(0, [[0, 400]], 30), steady(5, [[0, 400]], 30)], OPEN)).sort()).toEqual([
      't0',
      't1',
    ]);
  });
});
