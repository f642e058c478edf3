import { mkdirSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { makeDemo } from './make.js';

/** Writes the invented night into demo-run/: npm run demo:make. */
const folder = 'demo-run';
rmSync(join(folder, 'night'), { recursive: true, force: true });
mkdirSync(join(folder, 'night'), { recursive: true });
for (const [name, content] of makeDemo()) writeFileSync(join(folder, name), content);
