import { promisify } from 'node:util';
import { gunzip as gunzipWithCallback } from 'node:zlib';
import { LIMITS } from '../limits.js';
import { isGzip } from './file-kind.js';

const gunzip = promisify(gunzipWithCallback);

/** The bytes a file holds, or why they cannot be had. */
export type Unpacked =
  | { readonly kind: 'whole'; readonly bytes: Uint8Array }
  /** The file ends before its stream does: it may still be being written. */
  | { readonly kind: 'cut-short' }
  | { readonly kind: 'damaged' }
  | { readonly kind: 'too-large' };

/** Grown in pieces of this size, so that a small file costs little and a large one few copies. */
const PIECE_BYTES = 1 << 18;

/**
 * Content of a gzip file (RFC 1952), all its members; any other file comes back as it is. Not a byte more than
 * `limit_bytes` is unpacked, whatever the file would swell to. Its sums are checked, so that 'whole' means whole.
 */
export async function unpack(
  bytes: Uint8Array,
  limit_bytes: number = LIMITS.unpacked_bytes,
): Promise<Unpacked> {
  if (!isGzip(bytes)) return { kind: 'whole', bytes };
  try {
    const content = await gunzip(bytes, { maxOutputLength: limit_bytes, chunkSize: PIECE_BYTES });
    return { kind: 'whole', bytes: content };
  } catch (error) {
    const { code } = error as NodeJS.ErrnoException;
    if (code === 'ERR_BUFFER_TOO_LARGE') return { kind: 'too-large' };
    return { kind: code === 'Z_BUF_ERROR' ? 'cut-short' : 'damaged' };
  }
}
