import type { Problem } from './problem.js';
import { Route } from './route.js';

/**
 * The jobs of an order once more, now in the sequence of the previous plan with the new ones put in between, if they
 * all fit that way: nothing moves that need not.
 */
export function settledOrder(order: readonly number[], problem: Problem): readonly number[] {
  const chosen = new Set(order);
  const familiar = problem.previous.filter(job => chosen.has(job));
  const route = new Route(problem);
  route.set(familiar);
  if (familiar.length === 0 || route.jobs.length < familiar.length) return order;
  for (const job of order.filter(candidate => !familiar.includes(candidate))) {
    const found = route.bestPlace(job);
    if (found === undefined) return order;
    route.insert(job, found.place);
  }
  return route.jobs;
}
