import { glyphsOf } from '../terminal/glyphs.js';
import type { Grid } from '../terminal/grid.js';
import type { GlyphName } from '../terminal/look.js';
import type { Style } from '../terminal/palette.js';
import { cellOf, type Scale } from './scales.js';

export interface AxisTick {
  readonly value: number;
  readonly label: string;
}

/** Cells that a label may stand beside its tick to keep clear of others. */
const MOST_SHIFT = 2;

const LINE: Style = { colour: 'dim' };
const LABEL: Style = { colour: 'text' };

/** A vertical axis whose line stands at column x, the labels to its left. */
export function drawLeftAxis(
  grid: Grid,
  x: number,
  top: number,
  scale: Scale,
  ticks: readonly AxisTick[],
  glyphs: GlyphName,
): void {
  const { vertical, tickLeft } = glyphsOf(glyphs);
  for (let row = 0; row < scale.cells; row++) grid.set(x, top + row, vertical, LINE);
  for (const { value, label } of ticks) {
    const row = cellOf(scale, value);
    if (row < 0) continue;
    grid.set(x, top + row, tickLeft, LINE);
    grid.put(x - label.length, top + row, label, LABEL);
  }
}

/**
 * A horizontal axis: its line in row y, labels below it, the axis' name at the right end. A label that would
 * touch another or the name is left out; its tick stays.
 */
export function drawBottomAxis(
  grid: Grid,
  left: number,
  y: number,
  scale: Scale,
  ticks: readonly AxisTick[],
  name: string,
  glyphs: GlyphName,
): void {
  const { horizontal, tickBottom, cross } = glyphsOf(glyphs);
  grid.set(left - 1, y, glyphs === 'ascii' ? cross : '└', LINE);
  for (let column = 0; column < scale.cells; column++) grid.set(left + column, y, horizontal, LINE);
  const nameAt = left + scale.cells - name.length;
  grid.put(nameAt, y + 1, name, { colour: 'title' });
  let free = left - 1;
  for (const { value, label } of ticks) {
    const column = cellOf(scale, value);
    if (column < 0) continue;
    grid.set(left + column, y, tickBottom, LINE);
    const centred = left + column - Math.floor(label.length / 2);
    const last = nameAt - label.length - (name === '' ? 0 : 1);
    const at = Math.max(free, Math.min(centred, last));
    if (Math.abs(at - centred) > MOST_SHIFT || at > last) continue;
    grid.put(at, y + 1, label, LABEL);
    free = at + label.length + 1;
  }
}
