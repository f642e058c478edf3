import { readFileSync, statSync } from 'node:fs';
import { basename, join } from 'node:path';
import { z } from 'zod';
import { UsageError } from './exit-codes.js';

const time = z.iso.datetime({ offset: true }).transform(text => Date.parse(text));

const timetableSchema = z
  .object({
    profile: z.string(),
    begins: time,
    ends: time,
    files: z.array(
      z.object({
        // No part begins with a dot: nothing leads out of the folder, and nothing is hidden from the watcher.
        file: z.string().regex(/^\w[\w.-]*(?:\/\w[\w.-]*)*$/, 'expected a path below the folder'),
        arrives: time,
        pieces: z.array(z.object({ bytes: z.int().min(0), arrives: time })).optional(),
      }),
    ),
  })
  .refine(({ begins, ends }) => begins < ends, { path: ['ends'], error: 'expected a time after begins' });

/** When each file of a recorded night arrives. */
export type Timetable = z.output<typeof timetableSchema>;

/** Names under which the files of a night arrive; a re-reduction comes under the name of its earlier version. */
export function namesIn(timetable: Timetable): ReadonlySet<string> {
  return new Set(timetable.files.map(({ file }) => basename(file)));
}

/** Reads and checks the timetable of a recorded night. Throws UsageError, also when a file is not there. */
export function readTimetable(folder: string): Timetable {
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
  if (!result.success) {
    const [issue] = result.error.issues;
    throw new UsageError(`${path}: ${issue.path.join('.')}: ${issue.message}`);
  }
  for (const { file } of result.data.files) {
    if (statSync(join(folder, file), { throwIfNoEntry: false })?.isFile() !== true)
      throw new UsageError(`${path}: names ${file}, which is not in ${folder}`);
  }
  return result.data;
}
