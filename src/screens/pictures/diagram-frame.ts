import type { NightView } from '../../night/view.js';
import { colourName } from '../../science/bands.js';
import type { DiagramWindow } from '../state/diagram-window.js';
import type { Grid } from '../terminal/grid.js';
import type { GlyphName } from '../terminal/look.js';
import { drawBottomAxis, drawLeftAxis } from './axes.js';
import { cellOf, type Scale } from './scales.js';
import { signed } from './text.js';
import { roundTicks } from './ticks.js';

/** Where the plot stands inside the picture, and its scales. */
export interface DiagramPlot {
  readonly left: number;
  readonly top: number;
  readonly x: Scale;
  readonly y: Scale;
}

/** Class letters above; axis line and its labels below. */
const ROWS_ABOVE = 1;
const ROWS_BELOW = 2;
/** Cells that a tick needs to stand clear of the next. */
const COLUMNS_PER_TICK = 7;
const ROWS_PER_TICK = 2;

/** Temperature in the middle of each letter's dwarfs (subtype 5; Pecaut & Mamajek 2013, ApJS 208, 9), for its colour. */
const LETTER_TEFF_K: Readonly<Record<string, number>> = {
  O: 41_400,
  B: 15_700,
  A: 8080,
  F: 6550,
  G: 5660,
  K: 4440,
  M: 3060,
};

/** Divides a picture into the plot and its frame. */
export function plotOf(width: number, height: number, window: DiagramWindow): DiagramPlot {
  const rows = Math.max(1, height - ROWS_ABOVE - ROWS_BELOW);
  const y: Scale = { from: window.magFrom, to: window.magTo, cells: rows };
  const left = Math.max(3, ...magTicks(y).map(tick => tick.label.length)) + 1;
  const x: Scale = { from: window.colourFrom, to: window.colourTo, cells: Math.max(1, width - left) };
  return { left, top: ROWS_ABOVE, x, y };
}

/** Axes with ticks at round values, the class letters on top. */
export function drawFrame(
  grid: Grid,
  plot: DiagramPlot,
  view: Pick<NightView, 'axes' | 'letters'>,
  glyphs: GlyphName,
): void {
  const { left, top, x, y } = plot;
  drawLeftAxis(grid, left - 1, top, y, magTicks(y), glyphs);
  const { values, decimals } = roundTicks(x.from, x.to, Math.floor(x.cells / COLUMNS_PER_TICK));
  const ticks = values.map(value => ({ value, label: value.toFixed(decimals) }));
  drawBottomAxis(grid, left, top + y.cells, x, ticks, colourName(view.axes.colour), glyphs);
  grid.put(0, 0, `M_${view.axes.band}`, { colour: 'title' });
  drawLetters(grid, plot, view.letters);
}

function magTicks(y: Scale): { value: number; label: string }[] {
  const { values, decimals } = roundTicks(y.from, y.to, Math.max(2, Math.floor(y.cells / ROWS_PER_TICK)));
  return values.map(value => ({ value, label: value === 0 ? '0' : signed(value, decimals) }));
}

/** A letter whose place is taken by its neighbour is left out. */
function drawLetters(grid: Grid, plot: DiagramPlot, letters: NightView['letters']): void {
  for (const { letter, colour } of letters) {
    const column = cellOf(plot.x, colour);
    const teff_K = LETTER_TEFF_K[letter];
    if (column < 0 || teff_K === undefined || grid.at(plot.left + column, 0) !== ' ') continue;
    grid.put(plot.left + column, 0, letter, { colour: { teff_K }, bold: true });
  }
}
