import { gzipSync } from 'node:zlib';
import { describe, expect, it } from 'vitest';
import { readFrame } from '../../src/catalogue/read-frame.js';
import { unpack } from '../../src/catalogue/readers/gzip.js';
import { bytesOf, codes, INPUT } from './input.js';

const TABLE = bytesOf('id,ra,dec,V,e_V\na,10,20,12.5,0.01\nb,11,21,13.5,0.02\n');
const MEGABYTE = 2 ** 20;

describe('gzip', () => {
  it('comes out as it went in, all members of it', async () => {
    const packed = Buffer.concat([gzipSync(TABLE.subarray(0, 30)), gzipSync(TABLE.subarray(30))]);
    const unpacked = await unpack(packed);
    expect(unpacked).toEqual({ kind: 'whole', bytes: Buffer.from(TABLE) });
  });

  it('leaves everything else alone', async () => {
    expect(await unpack(TABLE)).toEqual({ kind: 'whole', bytes: TABLE });
  });

  it('is cut short at every length but its own', async () => {
    const packed = gzipSync(TABLE);
    for (let length = 2; length < packed.length; length++) {
      expect((await unpack(packed.subarray(0, length))).kind).toBe('cut-short');
    }
    expect((await unpack(packed)).kind).toBe('whole');
  });

  it('is damaged when its sum or its stream is wrong', async () => {
    for (const place of [3, 12, -6]) {
      const packed = gzipSync(TABLE);
      packed[(packed.length + place) % packed.length] ^= 0xff;
      expect((await unpack(packed)).kind).toBe('damaged');
    }
  });

  it('that swells beyond the limit is given up there, and never held whole', async () => {
    const bomb = gzipSync(Buffer.alloc(256 * MEGABYTE));
    const before = process.memoryUsage().arrayBuffers;
    let most = 0;
    const watch = setInterval(() => {
      most = Math.max(most, process.memoryUsage().arrayBuffers - before);
    }, 1);
    const unpacked = await unpack(bomb, 8 * MEGABYTE);
    clearInterval(watch);
    most = Math.max(most, process.memoryUsage().arrayBuffers - before);
    expect(unpacked).toEqual({ kind: 'too-large' });
    expect(most).toBeLessThan(32 * MEGABYTE);
    expect((await unpack(gzipSync(Buffer.alloc(8 * MEGABYTE)), 8 * MEGABYTE)).kind).toBe('whole');
  });

  it('of a text table reads like the table, and counts as the same content', async () => {
    const packed = await readFrame('f.csv.gz', gzipSync(TABLE), INPUT);
    expect(codes(packed)).toEqual([]);
    expect(packed.frame?.ids).toEqual(['a', 'b']);
    expect(Buffer.from(packed.content)).toEqual(Buffer.from(TABLE));
  });

  it('takes the band from the name of a packed file', async () => {
    const table = bytesOf('id,ra,dec,mag,mag_err\na,10,20,12.5,0.01\n');
    const { frame } = await readFrame('M67_V_003.csv.gz', gzipSync(table), INPUT);
    expect(frame?.bands.map(({ band }) => band)).toEqual(['V']);
  });
});
