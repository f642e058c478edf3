import type { NightOptions, NightSource } from './run-night.js';

/** Shows the night on the terminal until the observer quits. */
export async function runScreen(_source: NightSource, _options: NightOptions): Promise<number> {
  throw new Error('not built yet');
}
