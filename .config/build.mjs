// Builds dist/: the entry, the worker, and the chunks they share.
import { chmodSync, rmSync } from 'node:fs';
import { bundle } from './bundle.mjs';

rmSync('dist', { recursive: true, force: true });
await bundle({ main: 'src/main.ts', worker: 'src/night/worker.ts' }, 'dist', { minify: true });
chmodSync('dist/main.js', 0o755);
