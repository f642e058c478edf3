import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { z } from 'zod';
import { UsageError } from './exit-codes.js';

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

/** Reads and checks the timetable of a recorded night. */
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
  if (result.success) return result.data;
  const [issue] = result.error.issues;
  throw new UsageError(`${path}: ${issue.path.join('.')}: ${issue.message}`);
}
