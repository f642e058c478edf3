import type { Profile } from '../follow/settings.js';
import { type ClockSetting, makeClock } from '../night/clock.js';
import { WorkerClient } from '../night/worker-client.js';
import type { GlyphName, PaletteName } from '../screens/terminal/look.js';
import type { CommandIo } from './io.js';
import type { NightPlayer } from './night-player.js';

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

/**
 * Shows a night: on the screen where there is a terminal, as plain lines elsewhere. A played night ends by itself in
 * plain lines, and waits for q on the screen.
 */
export async function runNight(
  source: NightSource,
  options: NightOptions,
  io: CommandIo,
  player?: NightPlayer,
): Promise<number> {
  const onScreen = process.stdin.isTTY === true && process.stdout.isTTY === true && options.plain !== true;
  if (!onScreen) {
    const { runPlain } = await import('./run-plain.js');
    return await runPlain(source, io, player);
  }
  const { runScreen } = await import('./run-screen.js');
  return await runScreen(source, options);
}

/** Starts the worker of a source. */
export function startWorker(
  source: NightSource,
  onMessage: ConstructorParameters<typeof WorkerClient>[1],
  onFailure: (error: unknown) => void,
): WorkerClient {
  const { folder, profile, poll, clock } = source;
  return new WorkerClient({ folder, profile, poll, clock }, onMessage, onFailure);
}

export function clockOf(source: NightSource) {
  return makeClock(source.clock);
}
