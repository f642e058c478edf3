// Runs one TypeScript script of the project: node .config/run.mjs path/to/script.ts [arguments]
import { basename, resolve } from 'node:path';
import { pathToFileURL } from 'node:url';
import { bundle } from './bundle.mjs';

const [script, ...rest] = process.argv.slice(2);
if (!script) {
  console.error('usage: node .config/run.mjs script.ts [arguments]');
  process.exit(2);
}
const out = `dist/scripts/${basename(script, '.ts')}`;
await bundle({ script }, out);
const built = resolve(out, 'script.js');
process.argv = [process.argv[0], built, ...rest];
await import(pathToFileURL(built).href);
