import { writeSync } from 'node:fs';

/** Where a command writes, and what time it is: passed in, so that tests need neither terminal nor clock. */
export interface CommandIo {
  readonly out: (text: string) => Promise<void> | void;
  readonly err: (text: string) => void;
  /** Whether someone watches the messages as they come. */
  readonly isErrTerminal: boolean;
  readonly now_ms: () => number;
  /** Folder of the profiles that come with the program. */
  readonly profilesFolder: string;
}

/** Standard output with its pace kept; a reader that has gone away (`| head`) ends the program quietly. */
export function standardIo(profilesFolder: string): CommandIo {
  process.stdout.on('error', (error: NodeJS.ErrnoException) => {
    if (error.code === 'EPIPE') process.exit(0);
  });
  return {
    out: text =>
      new Promise<void>((resolve, reject) => {
        process.stdout.write(text, error => {
          // The closed pipe has its own way out, above.
          if (error && (error as NodeJS.ErrnoException).code !== 'EPIPE') reject(error);
          else resolve();
        });
      }),
    err: writeError,
    isErrTerminal: process.stderr.isTTY === true,
    now_ms: Date.now,
    profilesFolder,
  };
}

/** Waits for a slow reader; with none left the message has no one to go to, and the work goes on. */
function writeError(text: string): void {
  const bytes = Buffer.from(text);
  for (let written = 0; written < bytes.length; ) {
    try {
      written += writeSync(2, bytes, written);
    } catch (error) {
      if ((error as NodeJS.ErrnoException).code !== 'EAGAIN') return;
      Atomics.wait(new Int32Array(new SharedArrayBuffer(4)), 0, 0, 5);
    }
  }
}
