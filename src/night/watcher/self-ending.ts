import type { FileHandle } from 'node:fs/promises';
import { LIMITS } from '../../catalogue/limits.js';
import { BLOCK_BYTES, CARD_BYTES, readHeader } from '../../catalogue/readers/fits/header.js';
import { endOf, type FitsUnit, unitOf } from '../../catalogue/readers/fits/units.js';
import { unpack } from '../../catalogue/readers/gzip.js';
import type { Glance } from './completeness.js';
import { isRefusal, readWhole, withRegularFile } from './safe-file.js';

/** Does a file that tells its own end reach it? Text never does; it has to be left alone for a while. */
export async function reachesItsEnd(path: string, { kind, bytes }: Glance): Promise<boolean> {
  if (kind === 'gzip') return await isWholeGzip(path);
  if (kind !== 'fits' || bytes % BLOCK_BYTES !== 0) return false;
  return (await withRegularFile(path, (file, status) => isWholeFits(file, status.size))) === true;
}

/** Its streams end, and their sums are right: what is merely set aside on the disk for the rest is zeros. */
async function isWholeGzip(path: string): Promise<boolean> {
  const bytes = await readWhole(path);
  if (bytes === undefined || isRefusal(bytes)) return false;
  const { kind } = await unpack(bytes);
  return kind === 'whole' || kind === 'too-large';
}

/**
 * The declared data of all parts fill the file to its last byte, and there is a table with rows among them: while
 * the first part stands alone, or the number of rows has still to be filled in, the rest has yet to come.
 */
async function isWholeFits(file: FileHandle, fileBytes: number): Promise<boolean> {
  let position = 0;
  let hasRows = false;
  for (let part = 0; position < fileBytes && part < LIMITS.fitsUnits; part++) {
    const unit = await unitAt(file, position, fileBytes);
    if (unit === undefined) return false;
    if (unit.kind !== 'image' && unit.dataBytes > 0) hasRows = true;
    position = endOf(unit);
  }
  return hasRows && position === fileBytes;
}

const FIRST_READ_BYTES = 10 * BLOCK_BYTES;
const LONGEST_HEADER_BYTES = LIMITS.headerLines * CARD_BYTES;

/** Reads one header, more and more of it until its end comes; the data are stepped over. */
async function unitAt(file: FileHandle, position: number, fileBytes: number): Promise<FitsUnit | undefined> {
  const most = Math.min(fileBytes - position, LONGEST_HEADER_BYTES);
  for (let length = Math.min(FIRST_READ_BYTES, most); ; length = Math.min(2 * length, most)) {
    const bytes = new Uint8Array(length);
    const { bytesRead } = await file.read(bytes, 0, length, position);
    const reading = readHeader(bytes.subarray(0, bytesRead), 0);
    if (reading.kind === 'whole') return unitOf(reading.header, position + reading.end);
    if (reading.kind === 'endless' || length === most) return undefined;
  }
}
