import { formatProblem, type Problem } from '../catalogue/problems.js';
import type { NightView } from '../night/view.js';

/**
 * Lines that have been printed stay printed: a view's problems come and go as files are written again, here each is
 * kept once it has been told, so that only new ones are told.
 */
export class ToldProblems {
  private readonly told = new Map<string, Problem>();

  /** The view with every problem so far, each once, in the order in which they came. */
  through(view: NightView): NightView {
    for (const problem of view.problems) {
      const text = formatProblem(problem);
      if (!this.told.has(text)) this.told.set(text, problem);
    }
    return { ...view, problems: [...this.told.values()] };
  }
}
