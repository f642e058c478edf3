import type { CommandIo } from './io.js';
import type { NightPlayer } from './night-player.js';
import type { NightOptions, NightSource } from './night-source.js';

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
