import { isBetter } from './candidate.js';
import { origin, type Problem, weights } from './problem.js';

/** More jobs than this and the sets of them become too many. */
export const EXACT_UP_TO = 12;

/**
 * Order of the largest merit, by dynamic programming over sets: of all orders of a set with the same last job only the
 * one that finishes first can matter. Of equal merits the set with more of the previous plan, then the earliest finish.
 */
export function exactOrder(problem: Problem): number[] {
  const { jobs, setup_ms, ready_ms, previous } = problem;
  const count = jobs.length;
  const weight = weights(problem);
  const familiar = Array.from(jobs, (_, j) => (previous.includes(j) ? 1 : 0));
  const sets = 1 << count;
  const finish_ms = new Float64Array(sets * count).fill(Number.POSITIVE_INFINITY);
  const before = new Int8Array(sets * count).fill(-1);
  const worth = new Float64Array(sets);
  const known = new Int32Array(sets);
  let best = { worth: 0, known: 0, end_ms: ready_ms, set: 0, last: -1 };
  for (let set = 0; set < sets; set++) {
    const lowest = 31 - Math.clz32(set & -set);
    if (set > 0) {
      worth[set] = worth[set & (set - 1)] + weight[lowest];
      known[set] = known[set & (set - 1)] + familiar[lowest];
    }
    for (let last = set === 0 ? -1 : 0; last < (set === 0 ? 0 : count); last++) {
      const ready = set === 0 ? ready_ms : finish_ms[set * count + last];
      if (ready === Number.POSITIVE_INFINITY) continue;
      const found = { worth: worth[set], known: known[set], end_ms: ready, set, last };
      if (isBetter(found, best)) best = found;
      const row = setup_ms[last < 0 ? origin(problem) : last];
      for (let next = 0; next < count; next++) {
        if ((set >> next) & 1) continue;
        const place = (set | (1 << next)) * count + next;
        const finish = jobs[next].earliestFinish_ms(ready, row[next]);
        if (finish >= finish_ms[place]) continue;
        finish_ms[place] = finish;
        before[place] = last;
      }
    }
  }
  return pathTo(best.set, best.last, before, count);
}

function pathTo(set: number, last: number, before: Int8Array, count: number): number[] {
  const order: number[] = [];
  for (let [rest, job] = [set, last]; job >= 0; ) {
    order.push(job);
    const earlier = before[rest * count + job];
    rest ^= 1 << job;
    job = earlier;
  }
  return order.reverse();
}
