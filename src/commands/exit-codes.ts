/** What the program says to the shell. */
export const EXIT = {
  ok: 0,
  /** Something failed that the arguments are not to blame for. */
  failed: 1,
  /** The command line or the profile is wrong. */
  usage: 2,
  /** Done, but some files could not be read. */
  someUnreadable: 3,
  interrupted: 130,
} as const;

/** An error that is the user's to mend: printed as it is, without a stack. */
export class UsageError extends Error {}
