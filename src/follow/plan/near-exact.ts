import { Random } from '../../science/random.js';
import { type Candidate, isBetter } from './candidate.js';
import { type Problem, weights } from './problem.js';
import { Route } from './route.js';

/** Places tested in all: the bound of the work, the same on every machine. */
const MOST_TESTS = 200_000;
/** Share of the order that is taken out at most in one round. */
const LARGEST_RUIN = 0.5;
/** Losses accepted at the beginning and at the end, in units of a middling merit. */
const WARM = 0.15;
const COLD = 0.01;

/**
 * Order of a large merit for many jobs: insertion, then rounds of taking some out and putting others in (ruin and
 * recreate, Schrimpf et al. 2000, J. Comput. Phys. 159, 139), in which small losses are accepted ever more rarely.
 */
export function nearExactOrder(problem: Problem): readonly number[] {
  const random = new Random(problem.jobs.length);
  const weight = weights(problem);
  const familiar = new Set(problem.previous);
  const worth = (order: readonly number[]) => order.reduce((sum, job) => sum + weight[job], 0);
  const known = (order: readonly number[]) => order.filter(job => familiar.has(job)).length;
  const middling = problem.merits.reduce((sum, merit) => sum + merit, 0) / problem.jobs.length;

  const route = new Route(problem);
  const filled = (order: readonly number[], noise: () => number): Candidate => {
    route.set(order);
    fill(route, problem, weight, noise);
    return {
      order: [...route.jobs],
      worth: worth(route.jobs),
      known: known(route.jobs),
      end_ms: route.end_ms,
    };
  };
  const fresh = filled([], () => 1);
  const continued = filled(problem.previous, () => 1);
  let best = isBetter(fresh, continued) ? fresh : continued;
  let current = best;
  while (route.tests < MOST_TESTS && current.order.length < problem.jobs.length) {
    const temperature = middling * WARM * (COLD / WARM) ** (route.tests / MOST_TESTS);
    const found = filled(ruined(current.order, problem.kept, random), () => 0.5 + random.uniform());
    const loss = current.worth - found.worth;
    if (loss <= 0 || random.uniform() < Math.exp(-loss / temperature)) current = found;
    if (isBetter(found, best)) best = found;
  }
  return best.order;
}

/** Puts in what fits, kept jobs first, then the best use of its time. */
function fill(route: Route, problem: Problem, weight: Float64Array, noise: () => number): void {
  const inside = new Set(route.jobs);
  const waiting = problem.jobs
    .map((job, j) => ({ j, kept: problem.kept[j] ? 1 : 0, use: (weight[j] * noise()) / job.shortest_ms }))
    .filter(({ j }) => !inside.has(j))
    .sort((a, b) => b.kept - a.kept || b.use - a.use);
  for (const { j } of waiting) {
    const found = route.bestPlace(j);
    if (found !== undefined) route.insert(j, found.place);
  }
}

/** Takes out a run or a scatter of the jobs that need not stay. */
function ruined(order: readonly number[], kept: readonly boolean[], random: Random): number[] {
  const size = 1 + Math.floor(random.uniform() * Math.max(1, Math.floor(order.length * LARGEST_RUIN)));
  if (random.uniform() < 0.5) {
    const from = Math.floor(random.uniform() * order.length);
    return order.filter((job, place) => kept[job] || place < from || place >= from + size);
  }
  return order.filter(job => kept[job] || random.uniform() * order.length >= size);
}
