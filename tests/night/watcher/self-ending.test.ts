import { appendFileSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { gunzipSync, gzipSync } from 'node:zlib';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { FolderWatcher } from '../../../src/night/watcher/folder-watcher.js';
import { glance, isRefusal } from '../../../src/night/watcher/safe-file.js';
import { reachesItsEnd } from '../../../src/night/watcher/self-ending.js';

const sample = (name: string) => readFileSync(new URL(`../../samples/${name}`, import.meta.url));
const SEVERAL = sample('several-parts.fits');
const PACKED = sample('header-facts.fits.gz');

let folder: string;
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'nightsieve-ending-'));
});
afterEach(() => rmSync(folder, { recursive: true, force: true }));

async function endsAfter(bytes: Uint8Array): Promise<boolean> {
  const path = join(folder, 'file');
  writeFileSync(path, bytes);
  const seen = await glance(path);
  if (seen === undefined || isRefusal(seen)) throw new Error('the file is there');
  return await reachesItsEnd(path, seen);
}

describe('a file that tells its own end', () => {
  it.each(['all-types.fits', 'ascii-table.fits', 'lists.fits', 'several-parts.fits', 'header-facts.fits.gz'])(
    '%s reaches it',
    async name => expect(await endsAfter(sample(name))).toBe(true),
  );

  it('FITS: with the last block of a part that has rows before or in it, and nowhere else', async () => {
    const whole: number[] = [];
    for (let blocks = 0; blocks * 2880 <= SEVERAL.length; blocks++) {
      if (await endsAfter(SEVERAL.subarray(0, blocks * 2880))) whole.push(blocks);
    }
    // Five parts, each a block of header and one of data; the first is an image.
    expect(whole).toEqual([4, 6, 8, 10]);
    expect(await endsAfter(SEVERAL.subarray(0, -1))).toBe(false);
    expect(await endsAfter(Buffer.concat([SEVERAL, Buffer.alloc(2880)]))).toBe(false);
  });

  it('FITS: not before its rows have been counted', async () => {
    const bytes = readFileSync(new URL('../../broken/empty-file.table.fits', import.meta.url));
    expect(await endsAfter(bytes)).toBe(false);
  });

  it('FITS: with a header longer than is read in one go', async () => {
    const bytes = sample('lists.fits');
    const end = bytes.indexOf('END'.padEnd(80));
    const cards = 'COMMENT on and on'.padEnd(80).repeat(36 * 25);
    expect(
      await endsAfter(Buffer.concat([bytes.subarray(0, end), Buffer.from(cards), bytes.subarray(end)])),
    ).toBe(true);
  });

  it('gzip: with its sum, and not before', async () => {
    for (let length = 2; length < PACKED.length; length += 7) {
      expect(await endsAfter(PACKED.subarray(0, length))).toBe(false);
    }
    const setAside = Buffer.concat([PACKED.subarray(0, 400), Buffer.alloc(PACKED.length - 400)]);
    expect(await endsAfter(setAside)).toBe(false);
  });

  it('text never does', async () => expect(await endsAfter(Buffer.from('id,ra\na,1\n'))).toBe(false));
});

describe('FolderWatcher', () => {
  it('reads such files at once, and waits for the rest of the others', async () => {
    const files: [string, number][] = [];
    const packed = gzipSync(gunzipSync(PACKED));
    // Without its newline it has to wait: what comes before it has not waited.
    writeFileSync(join(folder, 'open.csv'), 'ra,dec');
    writeFileSync(join(folder, 'whole.fits'), SEVERAL);
    writeFileSync(join(folder, 'half.fits'), SEVERAL.subarray(0, 3 * 2880));
    writeFileSync(join(folder, 'half.csv.gz'), packed.subarray(0, 500));
    const watcher = new FolderWatcher(folder, false, {
      onFile: (name, { length }) => {
        files.push([name, length]);
      },
      onRefused: () => {},
      onFolder: () => {},
      onIdle: () => {},
    });
    const until = (count: number) =>
      vi.waitFor(() => expect(files).toHaveLength(count), { timeout: 8000, interval: 5 });
    await until(1);
    appendFileSync(join(folder, 'half.fits'), SEVERAL.subarray(3 * 2880));
    appendFileSync(join(folder, 'half.csv.gz'), packed.subarray(500));
    await until(4);
    await watcher.close();
    expect(files[0]).toEqual(['whole.fits', SEVERAL.length]);
    expect(new Map(files.slice(1, 3))).toEqual(
      new Map([
        ['half.fits', SEVERAL.length],
        ['half.csv.gz', packed.length],
      ]),
    );
    expect(files[3]).toEqual(['open.csv', 6]);
  });
});
