import { origin, type Problem } from './problem.js';

/** Where a job goes into an order, and by how much what follows is put off. */
export interface Insertion {
  readonly place: number;
  readonly delay_ms: number;
}

/**
 * An order with, for each place, the earliest finish and the latest finish that what follows can bear. With both kept,
 * an insertion is tested in constant time (after the push-forward of Savelsbergh 1992, ORSA J. Computing 4, 146).
 */
export class Route {
  private order: number[] = [];
  private finish_ms: number[] = [];
  private bearable_ms: number[] = [];
  /** Places tested so far: the measure of work. */
  tests = 0;

  constructor(private readonly problem: Problem) {}

  get jobs(): readonly number[] {
    return this.order;
  }

  get end_ms(): number {
    return this.finish_ms.at(-1) ?? this.problem.ready_ms;
  }

  /** Takes the jobs of an order one after the other, without those that do not fit behind the ones before. */
  set(order: readonly number[]): void {
    const { jobs, setup_ms } = this.problem;
    this.order = [];
    this.finish_ms = [];
    for (const job of order) {
      this.tests++;
      const finish = jobs[job].earliestFinish_ms(
        this.end_ms,
        setup_ms[this.jobBefore(this.order.length)][job],
      );
      if (finish === Number.POSITIVE_INFINITY) continue;
      this.order.push(job);
      this.finish_ms.push(finish);
    }
    this.lookBack();
  }

  /** Best place of a job that is not in the order; undefined where there is none. Of equal delays the latest place. */
  bestPlace(job: number): Insertion | undefined {
    const { jobs, ready_ms, setup_ms } = this.problem;
    let best: Insertion | undefined;
    for (let place = 0; place <= this.order.length; place++) {
      const ready = place === 0 ? ready_ms : this.finish_ms[place - 1];
      if (ready > jobs[job].lastStart_ms) break;
      if (this.bearable_ms[place] < jobs[job].firstFinish_ms) continue;
      this.tests++;
      const finish = jobs[job].earliestFinish_ms(ready, setup_ms[this.jobBefore(place)][job]);
      if (finish === Number.POSITIVE_INFINITY) continue;
      const next = this.order[place];
      const after = next === undefined ? finish : jobs[next].earliestFinish_ms(finish, setup_ms[job][next]);
      if (!(after <= (this.bearable_ms[place] ?? Number.MAX_VALUE))) continue;
      const delay_ms = after - (this.finish_ms[place] ?? ready);
      if (best === undefined || delay_ms <= best.delay_ms) best = { place, delay_ms };
    }
    return best;
  }

  /** Puts a job into a place that was tested. */
  insert(job: number, place: number): void {
    this.set([...this.order.slice(0, place), job, ...this.order.slice(place)]);
  }

  private jobBefore(place: number): number {
    return place === 0 ? origin(this.problem) : this.order[place - 1];
  }

  private lookBack(): void {
    const { order } = this;
    const { jobs, setup_ms } = this.problem;
    this.bearable_ms = new Array(order.length).fill(Number.MAX_VALUE);
    for (let place = order.length - 2; place >= 0; place--) {
      const next = order[place + 1];
      this.bearable_ms[place] = jobs[next].latestReady_ms(
        this.bearable_ms[place + 1],
        setup_ms[order[place]][next],
      );
    }
  }
}
