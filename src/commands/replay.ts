import type { CommandIo } from './io.js';
import { profileFor } from './load-profile.js';
import { NightPlayer } from './night-player.js';
import type { NightOptions } from './night-source.js';
import { runNight } from './run-night.js';
import { makeTemporaryFolder } from './temporary-folder.js';
import { readTimetable } from './timetable.js';

/** A whole night takes about this long unless told otherwise. */
const USUAL_LENGTH_S = 90;

/** Plays a recorded night at speed into a folder of its own and watches that. */
export async function replayCommand(
  folder: string,
  options: NightOptions & { readonly profile?: string; readonly speed?: number },
  io: CommandIo,
): Promise<number> {
  const timetable = readTimetable(folder);
  const profile = profileFor(options.profile ?? timetable.profile, io);
  const speed = options.speed ?? (timetable.ends - timetable.begins) / 1000 / USUAL_LENGTH_S;
  const target = makeTemporaryFolder('nightsieve-replay-');
  const clock = { begins_ms: timetable.begins, ends_ms: timetable.ends, startedAt_ms: Date.now(), speed };
  const player = new NightPlayer(folder, target.path, timetable, clock);
  try {
    player.start();
    return await runNight({ folder: target.path, profile, poll: false, clock }, options, io, player);
  } finally {
    player.stop();
    target.remove();
  }
}
