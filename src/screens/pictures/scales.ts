/** A linear map from values to cells and back; `to` may lie below `from` (an inverted axis). */
export interface Scale {
  readonly from: number;
  readonly to: number;
  readonly cells: number;
}

/** Place of a value in cells, 0 at the beginning of the first cell; outside 0 ... cells when out of range. */
export function placeOf(scale: Scale, value: number): number {
  return ((value - scale.from) / (scale.to - scale.from)) * scale.cells;
}

/** Cell that holds a value; the end of the range belongs to the last cell. -1 when outside or NaN. */
export function cellOf(scale: Scale, value: number): number {
  const place = placeOf(scale, value);
  if (!(place >= 0 && place <= scale.cells)) return -1;
  return Math.min(scale.cells - 1, Math.floor(place));
}

/** Nearest cell to a value; NaN stays NaN. */
export function nearestCell(scale: Scale, value: number): number {
  return Math.max(0, Math.min(scale.cells - 1, Math.floor(placeOf(scale, value))));
}

/** Value in the middle of a cell. */
export function valueAt(scale: Scale, cell: number): number {
  return scale.from + ((cell + 0.5) / scale.cells) * (scale.to - scale.from);
}
