import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';

export interface TemporaryFolder {
  readonly path: string;
  readonly remove: () => void;
}

/**
 * A folder of its own that is gone when the program is, however it ends. A hang-up has to be seen in all its forms: the
 * screen dies of it by the signal, without the event `exit`.
 */
export function makeTemporaryFolder(prefix: string): TemporaryFolder {
  const path = mkdtempSync(join(tmpdir(), prefix));
  const endings: readonly (readonly [NodeJS.EventEmitter, string])[] = [
    [process, 'exit'],
    [process, 'SIGHUP'],
    ...(process.stdin.isTTY === true
      ? ([
          [process.stdin, 'end'],
          [process.stdin, 'error'],
          [process.stdout, 'error'],
        ] as const)
      : []),
  ];
  const remove = () => {
    for (const [emitter, event] of endings) emitter.off(event, remove);
    rmSync(path, { recursive: true, force: true });
  };
  for (const [emitter, event] of endings) emitter.on(event, remove);
  return { path, remove };
}
