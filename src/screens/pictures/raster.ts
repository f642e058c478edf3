/** Dots inside one cell of the terminal. */
export interface DotGrid {
  readonly wide: number;
  readonly high: number;
}

/** Dots of a picture, gathered by cell: element row * columns + column. */
export interface DotRaster extends DotGrid {
  readonly columns: number;
  readonly rows: number;
  /** Bit dy * wide + dx is set: there is a dot. */
  readonly masks: Uint8Array;
}

export function emptyRaster(columns: number, rows: number, dots: DotGrid): DotRaster {
  return { columns, rows, wide: dots.wide, high: dots.high, masks: new Uint8Array(columns * rows) };
}

/** Sets a dot, in dots from the top left; outside the picture nothing happens. Returns its cell, or -1. */
export function setDot(raster: DotRaster, x: number, y: number): number {
  const { columns, rows, wide, high, masks } = raster;
  if (!(x >= 0 && x < columns * wide && y >= 0 && y < rows * high)) return -1;
  const column = Math.floor(x / wide);
  const row = Math.floor(y / high);
  const cell = row * columns + column;
  masks[cell] |= 1 << ((Math.floor(y) - row * high) * wide + (Math.floor(x) - column * wide));
  return cell;
}

/** Sets every second dot of a straight line, in dots; the parts outside the picture are left out. */
export function setDottedLine(raster: DotRaster, x0: number, y0: number, x1: number, y1: number): void {
  const reach = Math.max(Math.abs(x1 - x0), Math.abs(y1 - y0));
  // Nothing longer than a few pictures is a line of this picture.
  if (!(reach < 10_000)) return;
  const steps = Math.max(1, Math.ceil(reach));
  for (let i = 0; i <= steps; i++) {
    const share = i / steps;
    const [x, y] = [Math.floor(x0 + (x1 - x0) * share), Math.floor(y0 + (y1 - y0) * share)];
    // By place, not by count, so that short pieces of a long line keep the same rhythm.
    if ((x + y) % 2 === 0) setDot(raster, x, y);
  }
}
