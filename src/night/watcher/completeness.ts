/** What is known of a file without reading it whole. */
export interface Glance {
  readonly bytes: number;
  readonly modified_ms: number;
  /** Last byte; undefined for an empty file. */
  readonly lastByte: number | undefined;
}

/** A text table has to lie still this long before it is taken as finished. */
export const QUIET_MS = 150;
/** A file that never gets its closing newline is taken as it is after this long. */
export const PATIENCE_MS = 2000;

const NEWLINE = 10;

/**
 * Is a text table finished? It ends with a newline and has not been touched for a while; or it does not, and
 * nothing has come for so long that nothing will. A writer that pauses longer is caught by the later change:
 * the file is read again and replaces its earlier frame.
 */
export function isComplete(glance: Glance, now_ms: number): boolean {
  const still_ms = now_ms - glance.modified_ms;
  // Modified "in the future": another machine's clock. Then the size has to speak, which the caller watches.
  if (still_ms < 0) return glance.lastByte === NEWLINE;
  return glance.lastByte === NEWLINE ? still_ms >= QUIET_MS : still_ms >= PATIENCE_MS;
}
