// One place that says how TypeScript becomes JavaScript: used by the build and by single scripts.
import { build } from 'esbuild';

/** CSV tables are carried inside the bundle as text, so that no path is looked up at run time. */
export function bundle(entryPoints, outdir, more = {}) {
  return build({
    entryPoints,
    outdir,
    bundle: true,
    format: 'esm',
    platform: 'node',
    target: 'node20',
    splitting: true,
    loader: { '.csv': 'text' },
    // React's development build keeps a measurement of every update and so grows all night.
    define: { 'process.env.NODE_ENV': '"production"' },
    alias: { 'react-devtools-core': new URL('./no-devtools.mjs', import.meta.url).pathname },
    banner: {
      js: "import { createRequire as createRequireHere } from 'node:module'; const require = createRequireHere(import.meta.url);",
    },
    logLevel: 'warning',
    ...more,
  });
}
