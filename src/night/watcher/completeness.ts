/** How a file shows that it is finished: text by being left alone, the others by what they hold. */
export type EndingKind = 'text' | 'fits' | 'gzip';

/** What is known of a file without reading it whole. */
export interface Glance {
  readonly kind: EndingKind;
  readonly bytes: number;
  readonly modified_ms: number;
  /** Last byte; undefined for an empty file. */
  readonly lastByte: number | undefined;
}

/** How long a file has been left alone, by two clocks: on network disks the file's time is another machine's. */
export interface Stillness {
  /** Since the time written in the file system; negative when that clock is ahead of ours. */
  readonly byFileTime_ms: number;
  /** Since we saw the file as it is now, by our own clock. */
  readonly seen_ms: number;
}

/** A text table has to lie still this long before it is taken as finished. */
export const QUIET_MS = 150;
/** A file that never gets its closing newline is taken as it is after this long. */
export const PATIENCE_MS = 2000;

const NEWLINE = 10;

/**
 * Is a file finished, by how still it lies? A text table ends with a newline and has not been touched for a while (an
 * old file that is renamed into place is taken at once); or it does not, and nothing has come for so long, as we have
 * seen ourselves, that nothing will. A writer that pauses longer is caught by the later change: the file is read again
 * and replaces its earlier frame. In other files a newline means nothing: those that do not reach the end that they
 * tell of themselves (`reachesItsEnd`) are given the same patience.
 */
export function isComplete({ kind, lastByte }: Glance, still: Stillness): boolean {
  if (kind !== 'text' || lastByte !== NEWLINE) return still.seen_ms >= PATIENCE_MS;
  return Math.max(still.byFileTime_ms, still.seen_ms) >= QUIET_MS;
}
