import type { Problem } from '../catalogue/problems.js';

/** What is wrong with each file as it was last read: a file that is written again takes its old problems away. */
export class ProblemBook {
  private readonly ofFile = new Map<string, readonly Problem[]>();

  /** `place` tells files apart, as in the frame log. */
  set(place: string, problems: readonly Problem[]): void {
    // Taken out first: the newest file's problems stand last.
    this.ofFile.delete(place);
    if (problems.length > 0) this.ofFile.set(place, problems);
  }

  all(): readonly Problem[] {
    return [...this.ofFile.values()].flat();
  }
}
