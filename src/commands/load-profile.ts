import type { Profile } from '../follow/settings.js';
import { loadProfile, ProfileError, readyProfiles } from '../night/profile/load.js';
import { UsageError } from './exit-codes.js';
import type { CommandIo } from './io.js';

/** The profile a command was given; without one, the message that says which are ready. */
export function profileFor(argument: string | undefined, io: CommandIo): Profile {
  if (argument === undefined) {
    const ready = readyProfiles(io.profilesFolder).join(', ');
    throw new UsageError(
      `a profile is needed: --profile NAME with one of ${ready}, or --profile FILE with one of your own (copy ${io.profilesFolder}/template.toml)`,
    );
  }
  try {
    return loadProfile(argument, io.profilesFolder);
  } catch (error) {
    if (error instanceof ProfileError) throw new UsageError(`the profile cannot be used:\n${error.message}`);
    throw error;
  }
}
