import { EXACT_UP_TO, exactOrder } from './exact.js';
import { type Job, jobOf } from './job.js';
import { nearExactOrder } from './near-exact.js';
import type { Plan, PlanNight, PlannedBlock, PlanTarget } from './plan.js';
import type { Problem } from './problem.js';
import { reasonFor } from './reasons.js';
import { settledOrder } from './settle.js';

/** What a target without merit still weighs, so that time nobody else needs is given to it. */
const LEAST_MERIT = 1e-3;

/**
 * Lays targets into the rest of a night so that the merit observed to the end is as large as can be: proven so up to
 * twelve that fit at all, close to it above. The same input gives the same plan. Of equal plans the one nearest to
 * `previous`. A target under way is not for this call, which begins (`now_ms`) when that one ends.
 */
export function makePlan(targets: readonly PlanTarget[], night: PlanNight, previous?: Plan): Plan {
  const jobs = targets.map(target => jobOf(target, night));
  const opening: PlannedBlock[] = [];
  targets.forEach(({ pin }, i) => {
    const block = pin === 'first' ? blockAfter(opening.at(-1), jobs[i], night) : undefined;
    if (block !== undefined) opening.push(block);
  });
  const blocks = [...opening];
  const open = targets.flatMap(({ pin }, i) =>
    pin !== 'first' && jobs[i].shortest_ms < Number.POSITIVE_INFINITY ? [i] : [],
  );
  const problem = problemOf(
    open.map(i => targets[i]),
    open.map(i => jobs[i]),
    night,
    opening.at(-1),
    previous,
  );
  const order = problem.jobs.length > EXACT_UP_TO ? nearExactOrder(problem) : exactOrder(problem);
  for (const job of settledOrder(order, problem)) {
    const block = blockAfter(blocks.at(-1), problem.jobs[job], night);
    if (block !== undefined) blocks.push(block);
  }
  const placed = new Set(blocks.map(({ id }) => id));
  const merits = new Map(targets.map(({ id, merit }) => [id, merit]));
  return {
    blocks,
    unplaced: targets
      .filter(({ id }) => !placed.has(id))
      .map(target => ({ id: target.id, reason: reasonFor(target, night, blocks, merits) })),
    merit: blocks.reduce((sum, { id }) => sum + (merits.get(id) ?? 0), 0),
  };
}

/** The rest of the night after a block as a problem of numbers. */
function problemOf(
  targets: readonly PlanTarget[],
  jobs: readonly Job[],
  night: PlanNight,
  last: PlannedBlock | undefined,
  previous: Plan | undefined,
): Problem {
  const row = (from: string | undefined) => Float64Array.from(targets, ({ id }) => night.setup_ms(from, id));
  return {
    jobs,
    merits: targets.map(({ merit }) => Math.max(merit, LEAST_MERIT)),
    kept: targets.map(({ pin }) => pin !== undefined),
    setup_ms: [...targets.map(({ id }) => row(id)), row(last?.id)],
    ready_ms: last?.end_ms ?? night.now_ms,
    previous: (previous?.blocks ?? [])
      .map(({ id }) => targets.findIndex(target => target.id === id))
      .filter(job => job >= 0),
  };
}

function blockAfter(last: PlannedBlock | undefined, job: Job, night: PlanNight): PlannedBlock | undefined {
  const ready_ms = last?.end_ms ?? night.now_ms;
  const setup_ms = night.setup_ms(last?.id, job.id);
  const end_ms = job.earliestFinish_ms(ready_ms, setup_ms);
  if (end_ms === Number.POSITIVE_INFINITY) return undefined;
  const start_ms = job.start_ms(ready_ms, setup_ms);
  return { id: job.id, setup_ms: start_ms - setup_ms, start_ms, end_ms };
}
