import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import type { FrameReadings } from '../../src/catalogue/frame.js';
import { readFrame } from '../../src/catalogue/read-frame.js';
import { codes, INPUT } from './input.js';

/** Every table in tests/samples has its expected readings beside it: adding a pair adds a test; scripts write some. */
const FOLDER = new URL('../samples/', import.meta.url);
const TABLES = readdirSync(FOLDER).filter(name => !/\.(json|py)$/.test(name));

type Numbers = readonly (number | null)[];

interface Expected {
  readonly mid?: string;
  readonly facts?: Readonly<Record<string, number | string>>;
  readonly ids: readonly string[];
  readonly columns: Readonly<Partial<Record<keyof FrameReadings, Numbers>>>;
  readonly bands: Readonly<Record<string, { readonly mag: Numbers; readonly sigma_mag: Numbers }>>;
  readonly problems: readonly string[];
}

/** Values to 1e-8 of a unit; what is null is not known. An error without its magnitude does not count. */
function expectNumbers(actual: ArrayLike<number>, expected: Numbers): void {
  expect(actual.length).toBe(expected.length);
  expected.forEach((value, i) => {
    if (value === null) expect(actual[i]).toBeNaN();
    else expect(actual[i]).toBeCloseTo(value, 8);
  });
}

describe.each(TABLES)('%s', async table => {
  const expected = JSON.parse(
    readFileSync(new URL(table.replace(/(\.\w+)+$/, '.json'), FOLDER), 'utf8'),
  ) as Expected;
  const result = await readFrame(table, readFileSync(new URL(table, FOLDER)), INPUT);
  const frame = result.frame as FrameReadings;

  it('gives the expected rows', () => {
    expect(codes(result)).toEqual(expected.problems);
    expect(frame.ids).toEqual(expected.ids);
    expect(frame.hasIds).toBe(expected.ids.some(id => id !== ''));
    for (const [name, values] of Object.entries(expected.columns)) {
      expectNumbers(frame[name as 'ra_deg'], values);
    }
  });

  it('gives the expected magnitudes', () => {
    expect(frame.bands.map(({ band }) => band).sort()).toEqual(Object.keys(expected.bands).sort());
    for (const { band, mag, sigma_mag } of frame.bands) {
      expectNumbers(mag, expected.bands[band].mag);
      const counting = sigma_mag.map((sigma, i) => (Number.isNaN(mag[i]) ? Number.NaN : sigma));
      expectNumbers(counting, expected.bands[band].sigma_mag);
    }
  });

  it('gives the expected facts', () => {
    if (expected.mid === undefined) expect(frame.facts.mid_ms).toBeNaN();
    else expect(new Date(frame.facts.mid_ms).toISOString()).toBe(expected.mid);
    expect(frame.facts).toMatchObject(expected.facts ?? {});
  });
});
