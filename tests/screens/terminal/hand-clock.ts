import type { Timers } from '../../../src/screens/terminal/key-filter.js';

/** A clock that stands still until it is moved, with timers that fire as it passes them. */
export class HandClock {
  private time_ms = 0;
  private readonly waiting = new Map<object, { readonly due_ms: number; readonly fire: () => void }>();

  readonly now_ms = (): number => this.time_ms;

  readonly timers: Timers = {
    set: (callback, delay_ms) => {
      const timer = {};
      this.waiting.set(timer, { due_ms: this.time_ms + delay_ms, fire: callback });
      return timer;
    },
    clear: timer => {
      this.waiting.delete(timer as object);
    },
  };

  /** Moves the clock on; a timer set on the way fires too if it falls due. */
  pass(duration_ms: number): void {
    const end_ms = this.time_ms + duration_ms;
    for (;;) {
      const next = [...this.waiting].sort((a, b) => a[1].due_ms - b[1].due_ms)[0];
      if (next === undefined || next[1].due_ms > end_ms) break;
      const [timer, { due_ms, fire }] = next;
      this.waiting.delete(timer);
      this.time_ms = Math.max(this.time_ms, due_ms);
      fire();
    }
    this.time_ms = end_ms;
  }

  /** Moves the clock without firing anything: work that takes time. */
  work(duration_ms: number): void {
    this.time_ms += duration_ms;
  }
}
