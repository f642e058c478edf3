import type { ScreenEffect, ScreenEvent } from './events.js';
import { reduce } from './reduce.js';
import type { ScreenState } from './screen-state.js';

/**
 * Holds the screens' state outside React, so that two keys that come in one read both see the newest state.
 * Made for useSyncExternalStore.
 */
export class ScreenStore {
  private readonly listeners = new Set<() => void>();

  constructor(
    private state: ScreenState,
    private readonly perform: (effect: ScreenEffect) => void,
  ) {}

  readonly getState = (): ScreenState => this.state;

  readonly subscribe = (listener: () => void): (() => void) => {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  };

  readonly dispatch = (event: ScreenEvent): void => {
    const step = reduce(this.state, event);
    if (step.state !== this.state) {
      this.state = step.state;
      for (const listener of this.listeners) listener();
    }
    for (const effect of step.effects) this.perform(effect);
  };
}
