/** The smallest terminal that everything fits into. */
export const LEAST_COLUMNS = 60;
export const LEAST_ROWS = 16;

export function fitsScreen(columns: number, rows: number): boolean {
  return columns >= LEAST_COLUMNS && rows >= LEAST_ROWS;
}

export interface Size {
  readonly width: number;
  readonly height: number;
}

/** Status line above, conditions and keys below. */
const FIELD_FRAME_ROWS = 3;
/** Between panels that stand side by side. */
export const GAP = 1;
/** Lines about the selected star where it has no panel of its own: fewer on a low terminal. */
const SUMMARY_ROWS = 5;
const LOW_SUMMARY_ROWS = 4;
const LOW_TERMINAL_ROWS = 22;

/**
 * How the Field screen is divided. `stacked`: diagram and shortlist, a summary across below them. `columns`:
 * the shortlist above the detail, beside the diagram. `wide`: all three side by side.
 */
export interface FieldLayout {
  readonly kind: 'stacked' | 'columns' | 'wide';
  readonly diagram: Size;
  readonly shortlist: Size;
  readonly detail: Size;
}

export function fieldLayout(columns: number, rows: number): FieldLayout {
  const body = rows - FIELD_FRAME_ROWS;
  if (columns >= 170 && rows >= 36) {
    const side = Math.min(62, Math.floor(columns * 0.27));
    const diagram = { width: columns - 2 * (side + GAP), height: body };
    return {
      kind: 'wide',
      diagram,
      shortlist: { width: side, height: body },
      detail: { width: side, height: body },
    };
  }
  if (columns >= 100 && rows >= 30) {
    const side = Math.min(54, Math.floor(columns * 0.42));
    const detail = Math.min(16, Math.floor(body / 2));
    return {
      kind: 'columns',
      diagram: { width: columns - side - GAP, height: body },
      shortlist: { width: side, height: body - detail },
      detail: { width: side, height: detail },
    };
  }
  const side = Math.max(36, Math.min(42, Math.floor(columns * 0.45)));
  const summary = rows < LOW_TERMINAL_ROWS ? LOW_SUMMARY_ROWS : SUMMARY_ROWS;
  const height = body - summary;
  return {
    kind: 'stacked',
    diagram: { width: columns - side - GAP, height },
    shortlist: { width: side, height },
    detail: { width: columns, height: summary },
  };
}

/** Entries of the shortlist take two lines, below one line of heading. */
export function shortlistEntries(shortlist: Size): number {
  return Math.max(1, Math.floor((shortlist.height - 1) / 2));
}

/** Lines below the star table that say why a star is flagged. */
export const REASON_ROWS = 2;

/** Rows of the star table: without status, choice, borders, heading, the reason and the keys. */
export function tableHeight(rows: number): number {
  return Math.max(1, rows - 7 - REASON_ROWS);
}

/** Lines of the screens that only scroll: without the status line and the keys. */
export function textHeight(rows: number): number {
  return Math.max(1, rows - 2);
}
