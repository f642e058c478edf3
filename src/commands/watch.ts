import { statSync } from 'node:fs';
import { REAL_TIME } from '../night/clock.js';
import { UsageError } from './exit-codes.js';
import type { CommandIo } from './io.js';
import { profileFor } from './load-profile.js';
import type { NightOptions } from './night-source.js';
import { runNight } from './run-night.js';

/** Watches a folder until the observer quits. */
export async function watchCommand(
  folder: string,
  options: NightOptions & { readonly profile?: string; readonly poll?: boolean },
  io: CommandIo,
): Promise<number> {
  const profile = profileFor(options.profile, io);
  if (!isFolder(folder))
    throw new UsageError(`${folder}: no such folder; name the one your pipeline writes to`);
  return await runNight({ folder, profile, poll: options.poll === true, clock: REAL_TIME }, options, io);
}

export function isFolder(path: string): boolean {
  return statSync(path, { throwIfNoEntry: false })?.isDirectory() === true;
}
