import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { z } from 'zod';
import { UsageError } from './exit-codes.js';
import type { CommandIo } from './io.js';
import { profileFor } from './load-profile.js';
import { NightPlayer } from './night-player.js';
import { type NightOptions, runNight } from './run-night.js';

/** A whole night takes about this long unless told otherwise. */
const USUAL_LENGTH_S = 90;

const time = z.iso.datetime({ offset: true }).transform(text => Date.parse(text));

const timetableSchema = z.object({
  profile: z.string(),
  begins: time,
  ends: time,
  files: z.array(
    z.object({
      file: z.string().regex(/^[\w-]+(?:\/[\w.-]+)*$/, 'a path below the folder'),
      arrives: time,
      pieces: z.array(z.object({ bytes: z.int().min(0), arrives: time })).optional(),
    }),
  ),
});

/** When each file of a recorded night arrives. */
export type Timetable = z.output<typeof timetableSchema>;

/** Plays a recorded night at speed into a folder of its own and watches that. */
export async function replayCommand(
  folder: string,
  options: NightOptions & { readonly profile?: string; readonly speed?: number },
  io: CommandIo,
): Promise<number> {
  const timetable = readTimetable(folder);
  const profile = profileFor(options.profile ?? timetable.profile, io);
  const speed = options.speed ?? (timetable.ends - timetable.begins) / 1000 / USUAL_LENGTH_S;
  const target = mkdtempSync(join(tmpdir(), 'nightsieve-replay-'));
  const remove = () => rmSync(target, { recursive: true, force: true });
  process.on('exit', remove);
  const clock = { begins_ms: timetable.begins, ends_ms: timetable.ends, startedAt_ms: Date.now(), speed };
  const player = new NightPlayer(folder, target, timetable, clock);
  try {
    player.start();
    return await runNight({ folder: target, profile, poll: false, clock }, options, io, player);
  } finally {
    player.stop();
    remove();
    process.off('exit', remove);
  }
}

function readTimetable(folder: string): Timetable {
  const path = join(folder, 'timetable.json');
  let text: string;
  try {
    text = readFileSync(path, 'utf8');
  } catch {
    throw new UsageError(`${path}: cannot be read; a recorded night has a timetable.json (see demo-run/)`);
  }
  let raw: unknown;
  try {
    raw = JSON.parse(text);
  } catch (error) {
    throw new UsageError(`${path}: not JSON: ${(error as Error).message}`);
  }
  const result = timetableSchema.safeParse(raw);
  if (result.success) return result.data;
  const [issue] = result.error.issues;
  throw new UsageError(`${path}: ${issue.path.join('.')}: ${issue.message}`);
}
