/** Keeps a list in place while its rows come and go: this star stands on this line of the visible part. */
export interface Anchor {
  readonly star: number;
  readonly line: number;
}

export const TOP: Anchor = { star: -1, line: 0 };

type Rows = ArrayLike<number> & { indexOf(star: number): number };

/** Index of the first visible row. */
export function firstVisible(rows: Rows, anchor: Anchor, height: number): number {
  const row = rows.indexOf(anchor.star);
  if (row < 0) return 0;
  return Math.max(0, Math.min(row - anchor.line, rows.length - height));
}

/** The anchor after the cursor went from one row to another: the list moves only as far as it must. */
export function follow(rows: Rows, anchor: Anchor, height: number, to: number): Anchor {
  const first = firstVisible(rows, anchor, height);
  const line = Math.max(0, Math.min(height - 1, to - first));
  return { star: rows[to], line };
}
