import type { Profile } from '../follow/settings.js';
import type { ClockSetting } from '../night/clock.js';
import type { FromWorker } from '../night/messages.js';
import { WorkerClient } from '../night/worker-client.js';
import type { GlyphName, PaletteName } from '../screens/terminal/look.js';

/** Options of the commands that show a night. */
export interface NightOptions {
  readonly palette?: PaletteName;
  readonly glyphs?: GlyphName;
  readonly plain?: boolean;
}

/** A night to be shown. */
export interface NightSource {
  readonly folder: string;
  readonly profile: Profile;
  readonly poll: boolean;
  readonly clock: ClockSetting;
}

/** Starts the worker of a source. */
export function startWorker(
  source: NightSource,
  onMessage: (message: FromWorker) => void,
  onFailure: (error: unknown) => void,
): WorkerClient {
  const { folder, profile, poll, clock } = source;
  return new WorkerClient({ folder, profile, poll, clock }, onMessage, onFailure);
}
