import { readdirSync, readFileSync } from 'node:fs';
import { gzipSync } from 'node:zlib';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { ProblemList } from '../../src/catalogue/problems.js';
import { readFrame } from '../../src/catalogue/read-frame.js';
import { readFits } from '../../src/catalogue/readers/fits/read-fits.js';
import { safeText } from '../../src/catalogue/safe-text.js';
import { INPUT } from './input.js';

const FOLDER = new URL('../samples/', import.meta.url);
const SAMPLES = readdirSync(FOLDER)
  .filter(name => name.endsWith('.fits'))
  .map(name => readFileSync(new URL(name, FOLDER)));

/** One change to a file. Places are shares of its length, so that they fit every sample. */
type Change = (bytes: Uint8Array) => Buffer;

const share = fc.double({ min: 0, max: 1, noNaN: true, maxExcluded: true });

const flip: fc.Arbitrary<Change> = fc
  .tuple(share, fc.integer({ min: 0, max: 7 }))
  .map(([place, bit]) => bytes => {
    const changed = Buffer.from(bytes);
    changed[Math.floor(place * bytes.length)] ^= 1 << bit;
    return changed;
  });

const cut: fc.Arbitrary<Change> = share.map(
  place => bytes => Buffer.from(bytes.subarray(0, Math.floor(place * bytes.length))),
);

const SIZES = [
  '0',
  '-1',
  '1',
  '8',
  '999',
  '5000000',
  '2147483648',
  '99999999999',
  '1E300',
  '0.5',
  'T',
  "'x'",
  '',
];
const FORMATS = [
  '1D',
  '0D',
  '99999999D',
  '7X',
  '999999999999999X',
  '1P',
  '3A',
  'A',
  'F8.3',
  'I99',
  '1QE(7)',
  '???',
];
const KEYS = [
  ...['NAXIS', 'NAXIS1', 'NAXIS2', 'BITPIX', 'PCOUNT', 'GCOUNT', 'TFIELDS', 'TBCOL1', 'TBCOL2'],
  ...['TSCAL4', 'TZERO4', 'TNULL4', 'TZERO1', 'XTENSION', 'SIMPLE', 'END', 'CONTINUE'],
];

/** Rewrites a card where it stands, in whichever part has it, or puts it in place of the card there. */
const edit: fc.Arbitrary<Change> = fc
  .tuple(
    share,
    fc.oneof(
      fc.tuple(fc.constantFrom(...KEYS), fc.constantFrom(...SIZES)),
      fc.tuple(
        fc.constantFrom('TFORM1', 'TFORM2', 'TFORM4'),
        fc.constantFrom(...FORMATS).map(text => `'${text}'`),
      ),
    ),
  )
  .map(([place, [key, value]]) => bytes => {
    const changed = Buffer.from(bytes);
    const anywhere = Math.floor((place * bytes.length) / 80) * 80;
    const found = changed.indexOf(`${key.padEnd(8)}=`, anywhere);
    changed.write(`${key.padEnd(8)}= ${value}`.padEnd(80), found < 0 ? anywhere : found, 'latin1');
    return changed;
  });

const double: fc.Arbitrary<Change> = share.map(place => bytes => {
  const block = Math.floor((place * bytes.length) / 2880) * 2880;
  return Buffer.concat([bytes.subarray(0, block), bytes.subarray(block), bytes.subarray(block)]);
});

const damaged = fc
  .tuple(
    fc.constantFrom(...SAMPLES),
    fc.array(fc.oneof({ weight: 3, arbitrary: edit }, flip, cut, double), { minLength: 1, maxLength: 6 }),
  )
  .map(([sample, changes]) => changes.reduce<Buffer>((bytes, change) => change(bytes), sample));

/** More than this for each byte of a file is out of proportion: eight bytes a cell, and a cell has one at least. */
const MOST_BYTES_PER_BYTE = 16;

describe('damaged FITS files', () => {
  it('give a sheet or a coded problem, of a size that the file backs', () => {
    let read = 0;
    let refused = 0;
    fc.assert(
      fc.property(damaged, fc.boolean(), (bytes, asText) => {
        const problems = new ProblemList(safeText('damaged.fits'));
        const options = { use: () => (asText ? 'text' : 'value') as 'text', missing: [] };
        const sheet = readFits(bytes, options, problems);
        if (sheet === undefined) {
          refused++;
          expect(problems.all().some(({ cost }) => cost === 'file')).toBe(true);
          return;
        }
        read++;
        let held = sheet.lines.byteLength;
        for (const column of sheet.columns) {
          if (column.kind === 'number') {
            held += column.values.byteLength;
            expect(column.values).toHaveLength(sheet.rows);
          } else for (let row = 0; row < sheet.rows; row++) expect(column.text(row)).not.toMatch(/[\0-\x1f]/);
        }
        expect(held).toBeLessThanOrEqual(MOST_BYTES_PER_BYTE * bytes.length);
      }),
      { seed: 20261108, numRuns: 3000 },
    );
    // Changes that nothing survives, or that nothing suffers from, would test nothing.
    expect(Math.min(read, refused)).toBeGreaterThan(500);
  });

  it('never stop the frame that is made of them, plain or packed', async () => {
    await fc.assert(
      fc.asyncProperty(damaged, fc.boolean(), share, async (bytes, packed, place) => {
        const file = packed ? gzipSync(bytes, { level: 1 }) : bytes;
        if (packed && place < 0.5) file[Math.floor(place * file.length)] ^= 0x55;
        const { frame, problems } = await readFrame('damaged.fits', file, INPUT);
        if (frame === undefined) expect(problems.some(({ cost }) => cost === 'file')).toBe(true);
        else expect(frame.rows).toBeGreaterThan(0);
      }),
      { seed: 20261108, numRuns: 1000 },
    );
  });
});
