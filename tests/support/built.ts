import { execFileSync, spawn } from 'node:child_process';
import { existsSync } from 'node:fs';
import { resolve } from 'node:path';

export const ROOT = resolve(import.meta.dirname, '../..');
export const MAIN = resolve(ROOT, 'dist/main.js');

/** Builds dist/ unless `npm test` has just done so. */
export function ensureBuilt(): void {
  if (!existsSync(MAIN)) execFileSync('node', ['.config/build.mjs'], { cwd: ROOT });
}

export interface Result {
  readonly code: number | null;
  readonly out: string;
  readonly err: string;
}

/** Runs the built program to its end, without a terminal. */
export function run(args: readonly string[], cwd = ROOT): Promise<Result> {
  ensureBuilt();
  return new Promise(resolvePromise => {
    const child = spawn('node', [MAIN, ...args], { cwd, stdio: ['ignore', 'pipe', 'pipe'] });
    let out = '';
    let err = '';
    child.stdout.on('data', chunk => {
      out += chunk;
    });
    child.stderr.on('data', chunk => {
      err += chunk;
    });
    child.on('close', code => resolvePromise({ code, out, err }));
  });
}
