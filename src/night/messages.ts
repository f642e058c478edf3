import type { Profile } from '../follow/settings.js';
import type { ClockSetting } from './clock.js';
import type { NightView, StarDetail } from './view.js';

/** What a worker is started with. */
export interface WorkerStart {
  readonly folder: string;
  readonly profile: Profile;
  readonly poll: boolean;
  readonly clock: ClockSetting;
}

/** From the main thread to the worker. */
export type ToWorker =
  | { readonly kind: 'detail'; readonly star: number }
  /** The minute has changed: windows and start-by move. */
  | { readonly kind: 'refresh' }
  /** List the folder now. */
  | { readonly kind: 'look' };

/** From the worker to the main thread. */
export type FromWorker =
  | { readonly kind: 'view'; readonly view: NightView }
  | { readonly kind: 'detail'; readonly detail: StarDetail }
  | { readonly kind: 'folder'; readonly present: boolean }
  /** How many files (by name) have been dealt with so far, and that none waits. */
  | { readonly kind: 'idle'; readonly files: number };
