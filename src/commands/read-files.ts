import { basename, resolve } from 'node:path';
import { formatProblem, makeProblem, type Problem } from '../catalogue/problems.js';
import { safeText } from '../catalogue/safe-text.js';
import type { NightFile } from '../night/engine.js';
import { isRefusal, readWhole } from '../night/watcher/safe-file.js';
import { UsageError } from './exit-codes.js';
import type { CommandIo } from './io.js';

/**
 * One file after another, so that only one is held at a time. Those that cannot be opened are told on standard error and
 * left out; `refused` counts them.
 */
export async function* readFiles(
  paths: readonly string[],
  io: CommandIo,
  refused: Problem[] = [],
): AsyncGenerator<NightFile> {
  for (const path of paths) {
    const bytes = await readWhole(path);
    if (bytes === undefined) throw new UsageError(`${path}: no such file`);
    const name = basename(path);
    if (isRefusal(bytes)) {
      const problem = makeProblem(bytes.code, safeText(name), 0, bytes.seen);
      refused.push(problem);
      io.err(`${formatProblem(problem)}\n`);
    } else yield { name, bytes, place: resolve(path) };
  }
}
