import { readdirSync, readFileSync, statSync } from 'node:fs';
import { basename, join } from 'node:path';
import type { Profile } from '../../follow/settings.js';
import { type ParsedProfile, parseProfile } from './parse.js';

/** No honest profile is larger. */
const LARGEST_BYTES = 256 * 1024;
const BARE_NAME = /^[a-z0-9-]+$/;

/** Thrown for a profile that cannot be used; the message is ready to print. */
export class ProfileError extends Error {}

/** Names of the profiles in a folder, without '.toml', the template left out. */
export function readyProfiles(folder: string): readonly string[] {
  return readdirSync(folder)
    .filter(name => name.endsWith('.toml') && name !== 'template.toml')
    .map(name => name.slice(0, -'.toml'.length))
    .sort();
}

/** Where a profile argument points: a ready profile by its bare name, else a file. */
export function profilePath(argument: string, folder: string): string {
  return BARE_NAME.test(argument) ? join(folder, `${argument}.toml`) : argument;
}

/** Reads and checks a profile file, problems and all. Throws a ProfileError when it cannot be read. */
export function readProfile(path: string): ParsedProfile {
  try {
    const status = statSync(path);
    if (!status.isFile()) throw new ProfileError(`${path}: not an ordinary file; name a profile in TOML`);
    if (status.size > LARGEST_BYTES) {
      throw new ProfileError(
        `${path}: ${status.size} bytes, a profile has at most ${LARGEST_BYTES}; is it the right file?`,
      );
    }
    return parseProfile(readFileSync(path, 'utf8'), basename(path));
  } catch (error) {
    if (error instanceof ProfileError) throw error;
    const code = (error as NodeJS.ErrnoException).code;
    if (code === 'ENOENT') {
      throw new ProfileError(
        `${path}: no such profile; 'nightsieve watch' without one lists those that are ready`,
      );
    }
    if (code === 'EACCES') throw new ProfileError(`${path}: may not be read; check its permissions`);
    throw error;
  }
}

/** The profile, or a ProfileError that tells everything that is wrong with it. */
export function loadProfile(argument: string, folder: string): Profile {
  const { profile, problems } = readProfile(profilePath(argument, folder));
  if (profile === undefined) throw new ProfileError(problems.map(problem => problem.text).join('\n'));
  return profile;
}
