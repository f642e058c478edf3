import { execFileSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';

const NUMBERS = ['ra', 'dec', 'B', 'e_B', 'V', 'e_V', 'parallax', 'parallax_error', 'flag'] as const;
const FORMATS = ['12A', 'D', 'D', 'E', 'E', 'E', 'E', 'E', 'E', 'I'];
const ROW_BYTES = 12 + 2 * 8 + 6 * 4 + 2;

function block(text: string, filling: string): string {
  return text.padEnd(Math.ceil(text.length / 2880) * 2880, filling);
}

function header(lines: readonly string[]): Buffer {
  return Buffer.from(block([...lines, 'END'].map(line => line.padEnd(80)).join(''), ' '));
}

function card(key: string, value: string | number): string {
  const text = typeof value === 'number' ? String(value).padStart(20) : `'${value.padEnd(8)}'`;
  return `${key.padEnd(8)}= ${text}`;
}

/** A binary table of made-up stars: an identifier, two doubles, six singles and a flag a row. */
export function fitsTable(rows: number): Uint8Array {
  const columns = ['id', ...NUMBERS].flatMap((name, i) => [
    card(`TTYPE${i + 1}`, name),
    card(`TFORM${i + 1}`, FORMATS[i]),
  ]);
  const sizes = [card('BITPIX', 8), card('NAXIS', 2), card('NAXIS1', ROW_BYTES), card('NAXIS2', rows)];
  const extension = [card('XTENSION', 'BINTABLE'), ...sizes, card('PCOUNT', 0), card('GCOUNT', 1)];
  const data = Buffer.alloc(Math.ceil((rows * ROW_BYTES) / 2880) * 2880);
  for (let row = 0, p = 0; row < rows; row++, p += ROW_BYTES) {
    data.write(`s${row}`, p);
    data.writeDoubleBE(100 + (row % 997) / 100, p + 12);
    data.writeDoubleBE((row % 1009) / 100, p + 20);
    [12.5, 0.01, 11.8, 0.01, 3.2, 0.05].forEach((value, i) => {
      data.writeFloatBE(value + (row % 89) / 1000, p + 28 + 4 * i);
    });
  }
  return Buffer.concat([
    header([`${'SIMPLE'.padEnd(8)}= ${'T'.padStart(20)}`, card('BITPIX', 8), card('NAXIS', 0)]),
    header([...extension, card('TFIELDS', FORMATS.length), ...columns]),
    data,
  ]);
}

/** Readings of which the best counts, on both sides. */
export const READINGS = 10;

/** Reads the file whole and brings its number columns to doubles in this machine's order, as our reader does. */
const SCRIPT = `
import sys, time
import numpy as np
from astropy.io import fits
best = 1e9
for _ in range(${READINGS}):
    start = time.perf_counter()
    with fits.open(sys.argv[1], memmap=False) as parts:
        columns = [np.array(parts[1].data[name], dtype=float) for name in sys.argv[2:]]
    best = min(best, time.perf_counter() - start)
print(best)
`;

const PYTHON = '/usr/bin/python3';

/** Best of several readings by Astropy; undefined where Python or Astropy is missing. */
export function astropySeconds(bytes: Uint8Array): number | undefined {
  const folder = mkdtempSync(join(tmpdir(), 'nightsieve-bench-'));
  const path = join(folder, 'bench.fits');
  try {
    writeFileSync(path, bytes);
    const printed = execFileSync(PYTHON, ['-c', SCRIPT, path, ...NUMBERS], {
      stdio: ['ignore', 'pipe', 'ignore'],
    });
    return Number(printed);
  } catch {
    return undefined;
  } finally {
    rmSync(folder, { recursive: true });
  }
}
