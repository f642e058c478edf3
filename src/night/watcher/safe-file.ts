import { constants } from 'node:fs';
import { type FileHandle, lstat, open } from 'node:fs/promises';
import { LIMITS } from '../../catalogue/limits.js';
import type { ProblemCode } from '../../catalogue/problem-codes.js';
import { isFits, isGzip, KIND_BYTES } from '../../catalogue/readers/file-kind.js';
import type { EndingKind, Glance } from './completeness.js';

/** Why a file was not read. */
export interface Refusal {
  readonly code: ProblemCode;
  readonly seen: string;
}

/** Looks at a file in a watched folder: kind, size, time, last byte. Undefined when it is gone, or a folder. */
export async function glance(path: string): Promise<Glance | Refusal | undefined> {
  const entry = await lstat(path).catch(() => undefined);
  if (entry?.isDirectory()) return undefined;
  // A link may lead anywhere, out of the folder too; only `classify`, which is given names, follows one.
  if (entry?.isSymbolicLink()) return { code: 'not-regular', seen: 'this is a link' };
  return await withRegularFile(path, async (file, status) => {
    const first = Buffer.alloc(KIND_BYTES);
    await file.read(first, 0, KIND_BYTES, 0);
    const last = Buffer.alloc(1);
    if (status.size > 0) await file.read(last, 0, 1, status.size - 1);
    return {
      kind: kindOf(first),
      bytes: status.size,
      modified_ms: status.mtimeMs,
      lastByte: status.size > 0 ? last[0] : undefined,
    };
  });
}

function kindOf(first: Uint8Array): EndingKind {
  if (isGzip(first)) return 'gzip';
  return isFits(first) ? 'fits' : 'text';
}

/** Reads a whole file, up to the limit. Undefined when it is gone. */
export async function readWhole(path: string): Promise<Uint8Array | Refusal | undefined> {
  return await withRegularFile<Uint8Array | Refusal>(path, async (file, status) => {
    if (status.size > LIMITS.file_bytes) {
      return {
        code: 'too-large',
        seen: `the file has ${status.size} bytes, at most ${LIMITS.file_bytes} are read`,
      };
    }
    const bytes = new Uint8Array(status.size);
    let filled = 0;
    while (filled < bytes.length) {
      const { bytesRead } = await file.read(bytes, filled, bytes.length - filled, filled);
      if (bytesRead === 0) break;
      filled += bytesRead;
    }
    return bytes.subarray(0, filled);
  });
}

/** Opens without waiting, so that a pipe or device cannot hang the night, and goes on with regular files only. */
export async function withRegularFile<T>(
  path: string,
  use: (file: FileHandle, status: { size: number; mtimeMs: number }) => Promise<T>,
): Promise<T | Refusal | undefined> {
  let file: FileHandle | undefined;
  try {
    file = await open(path, constants.O_RDONLY | constants.O_NONBLOCK);
    const status = await file.stat();
    if (!status.isFile()) return { code: 'not-regular', seen: 'this is a pipe, device, socket or folder' };
    return await use(file, status);
  } catch (error) {
    const { code } = error as NodeJS.ErrnoException;
    if (code === 'ENOENT') return undefined;
    if (code === 'ENXIO' || code === 'ELOOP')
      return { code: 'not-regular', seen: 'this is a socket or a loop of links' };
    return { code: 'unreadable', seen: `it could not be opened (${code ?? 'unknown error'})` };
  } finally {
    await file?.close();
  }
}

export function isRefusal(value: unknown): value is Refusal {
  return typeof value === 'object' && value !== null && 'code' in value && 'seen' in value;
}
