import { writeSync } from 'node:fs';

/** Where a command writes, and what time it is: passed in, so that tests need neither terminal nor clock. */
export interface CommandIo {
  readonly out: (text: string) => Promise<void> | void;
  readonly err: (text: string) => void;
  readonly now_ms: () => number;
  /** Folder of the profiles that come with the program. */
  readonly profilesFolder: string;
}

/** Standard output with its pace kept; a reader that has gone away (`| head`) ends the program quietly. */
export function standardIo(profilesFolder: string): CommandIo {
  process.stdout.on('error', (error: NodeJS.ErrnoException) => {
    if (error.code === 'EPIPE') process.exit(0);
    throw error;
  });
  return {
    out: text =>
      new Promise<void>(resolve => {
        process.stdout.write(text, () => resolve());
      }),
    err: text => {
      writeSync(2, text);
    },
    now_ms: Date.now,
    profilesFolder,
  };
}
