import { describe, expect, it } from 'vitest';
import { makePlan } from '../../src/follow/plan/make-plan.js';
import type { Plan } from '../../src/follow/plan/plan.js';
import checks from './data/checks_schedule.json';

/**
 * Invented instances with proven optima: complete enumeration, subset dynamic programming and integer programming, done
 * outside this program. The rules stand in the head of the file; its unit is the minute.
 */
const MINUTE_MS = 60_000;

/** Share of the best known merit that a plan of 20 to 60 targets has to reach. */
const LARGE_SHARE = 0.98;

type Instance = (typeof checks.instances)[number];

function planOf(instance: Instance): Plan {
  const place = new Map(instance.jobs.map(({ id }, i) => [id, i]));
  const setup_ms = (from: string | undefined, to: string) => {
    const row = from === undefined ? instance.setup_first : instance.setup[place.get(from)!];
    return row[place.get(to)!] * MINUTE_MS;
  };
  const targets = instance.jobs.map(({ id, value, duration, windows }) => ({
    id,
    merit: value,
    windows: windows.map(([from, until]) => [from * MINUTE_MS, until * MINUTE_MS] as const),
    duration_ms: () => duration * MINUTE_MS,
    closes: () => 'its window ends',
    whyNever: () => 'it has no window',
  }));
  const dark = [[0, instance.horizon * MINUTE_MS] as const];
  return makePlan(targets, { now_ms: 0, dark, breaks: [], setup_ms });
}

/** The rules of the file, written out once more: value and finish of an order, each job begun as early as it can be. */
function followed(instance: Instance, ids: readonly string[]) {
  let finish = 0;
  let value = 0;
  let before = -1;
  for (const id of ids) {
    const j = instance.jobs.findIndex(job => job.id === id);
    const job = instance.jobs[j];
    const ready = finish + (before < 0 ? instance.setup_first[j] : instance.setup[before][j]);
    const starts = job.windows
      .map(([from, until]) => ({ start: Math.max(ready, from), until }))
      .filter(({ start, until }) => start + job.duration <= until);
    expect(starts.length, `${id} fits`).toBeGreaterThan(0);
    finish = Math.min(...starts.map(({ start }) => start)) + job.duration;
    value += job.value;
    before = j;
  }
  expect(finish).toBeLessThanOrEqual(instance.horizon);
  return { value, finish };
}

describe('the plan of a night against proven optima', () => {
  it('covers twenty-two instances', () => expect(checks.instances).toHaveLength(22));

  it.each(checks.instances.map(instance => [`${instance.id} ${instance.note}`, instance] as const))(
    '%s',
    (_, instance) => {
      const plan = planOf(instance);
      const ids = plan.blocks.map(({ id }) => id);
      expect(new Set(ids).size).toBe(ids.length);
      const { value, finish } = followed(instance, ids);
      expect(plan.merit).toBe(value);
      expect((plan.blocks.at(-1)?.end_ms ?? 0) / MINUTE_MS).toBe(finish);
      expect(ids.length + plan.unplaced.length).toBe(instance.n);
      for (const { reason } of plan.unplaced) expect(reason).toMatch(/\d/);
      const { expected } = instance;
      if (expected.optimal_value !== undefined) {
        expect(value).toBe(expected.optimal_value);
        expect(finish).toBe(expected.earliest_finish_at_optimal_value);
        return;
      }
      expect(value).toBeLessThanOrEqual(expected.proven_upper_bound);
      expect(value).toBeGreaterThanOrEqual(LARGE_SHARE * expected.best_known_value);
    },
  );
});
