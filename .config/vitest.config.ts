import { defineConfig } from 'vitest/config';

/** The same rule as the bundle's: a CSV table is imported as its text. */
const csvAsText = {
  name: 'csv-as-text',
  transform(code: string, id: string) {
    return id.endsWith('.csv') ? `export default ${JSON.stringify(code)};` : undefined;
  },
};

export default defineConfig({
  root: new URL('..', import.meta.url).pathname,
  plugins: [csvAsText],
  test: {
    include: ['tests/**/*.test.{ts,tsx}'],
    env: { FORCE_COLOR: '0', TZ: 'UTC' },
    testTimeout: 20_000,
    pool: 'forks',
  },
});
