// Builds dist/: the entry, the workers, and the chunks they share.
import { chmodSync, rmSync } from 'node:fs';
import { bundle } from './bundle.mjs';

rmSync('dist', { recursive: true, force: true });
const entries = {
  main: 'src/main.ts',
  worker: 'src/night/worker.ts',
  'classify-worker': 'src/night/classify-worker.ts',
};
await bundle(entries, 'dist', { minify: true });
chmodSync('dist/main.js', 0o755);
