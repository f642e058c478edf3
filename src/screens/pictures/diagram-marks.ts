import type { NightView, StarColumns } from '../../night/view.js';
import { type Glyphs, glyphsOf } from '../terminal/glyphs.js';
import { Grid } from '../terminal/grid.js';
import type { GlyphName } from '../terminal/look.js';
import type { DiagramPlot } from './diagram-frame.js';
import type { DiagramPicture } from './hr-diagram.js';
import { nearestCell, placeOf } from './scales.js';

/** What is marked on the diagram besides the dots of all stars. */
export interface DiagramMarks {
  /** Flagged stars, best first: the first nine carry the number they have in the shortlist. */
  readonly shortlist: NightView['shortlist'];
  readonly unseen: ReadonlySet<number>;
  readonly fresh: readonly number[];
  /** -1: none. */
  readonly selected: number;
  /** The arrow keys move in the diagram. */
  readonly focused: boolean;
}

interface Cell {
  readonly column: number;
  readonly row: number;
  /** Where the star really is, when it lies outside the window: '<', '>', '^', 'v'. */
  readonly outside: string;
}

/** Flagged stars are moved by at most so many cells to keep all of them visible. */
const MOST_NUDGE = 2;

/** The diagram with its marks: new stars, flagged stars, and on top the selected one with its error bar. */
export function withMarks(
  picture: DiagramPicture,
  stars: StarColumns,
  marks: DiagramMarks,
  glyphs: GlyphName,
): Grid {
  const { plot } = picture;
  const grid = new Grid(picture.grid.width, picture.grid.height);
  grid.paste(0, 0, picture.grid);
  const signs = glyphsOf(glyphs);
  if (marks.focused) drawPointer(grid, plot, signs);
  for (const star of marks.fresh) {
    const cell = cellFor(plot, stars, star, signs);
    if (cell !== undefined && cell.outside === '')
      setCell(grid, plot, cell, signs.fresh, { colour: 'fresh' });
  }
  const taken = new Map<number, Cell>();
  marks.shortlist.forEach(({ star }, place) => {
    const cell = cellFor(plot, stars, star, signs);
    if (cell === undefined) return;
    const free = freeCell(plot, cell, taken);
    taken.set(free.row * plot.x.cells + free.column, free);
    if (star === marks.selected) drawErrorBar(grid, plot, stars, star, free, signs);
    const isNew = marks.unseen.has(star);
    const sign = place < 9 ? String(place + 1) : isNew ? signs.flaggedFresh : signs.flagged;
    setCell(grid, plot, free, free.outside || sign, {
      colour: star === marks.selected ? 'selected' : 'flagged',
      bold: true,
      inverse: star === marks.selected,
      underline: isNew,
    });
  });
  if (!marks.shortlist.some(({ star }) => star === marks.selected))
    drawSelected(grid, plot, stars, marks.selected, signs);
  return grid;
}

function drawSelected(grid: Grid, plot: DiagramPlot, stars: StarColumns, star: number, signs: Glyphs): void {
  const cell = star < 0 ? undefined : cellFor(plot, stars, star, signs);
  if (cell === undefined) return;
  drawErrorBar(grid, plot, stars, star, cell, signs);
  setCell(grid, plot, cell, cell.outside || signs.selected, { colour: 'selected', inverse: true });
}

/** In the first free cell beside the name of the axis. */
function drawPointer(grid: Grid, plot: DiagramPlot, signs: Glyphs): void {
  let x = plot.left - 1;
  while (x < grid.width && grid.at(x, 0) !== ' ') x++;
  grid.set(x, 0, signs.pointer, { colour: 'title', bold: true });
}

/** One sigma of the absolute magnitude up and down, and a short line across. */
function drawErrorBar(
  grid: Grid,
  plot: DiagramPlot,
  stars: StarColumns,
  star: number,
  cell: Cell,
  signs: Glyphs,
): void {
  const style = { colour: 'selected' } as const;
  for (const side of [-1, 1])
    setCell(grid, plot, { ...cell, column: cell.column + side }, signs.horizontal, style);
  const sigma = stars.absMagSigma[star];
  if (Number.isNaN(sigma)) return;
  const from = nearestCell(plot.y, stars.absMag[star] - sigma);
  const to = nearestCell(plot.y, stars.absMag[star] + sigma);
  for (let row = from; row <= to; row++) setCell(grid, plot, { ...cell, row }, signs.vertical, style);
}

/** Cell of a star, moved to the nearest edge when it lies outside; undefined when it has no place at all. */
function cellFor(plot: DiagramPlot, stars: StarColumns, star: number, signs: Glyphs): Cell | undefined {
  const x = placeOf(plot.x, stars.colour[star]);
  const y = placeOf(plot.y, stars.absMag[star]);
  if (Number.isNaN(x + y)) return undefined;
  const outside =
    x < 0
      ? signs.left
      : x > plot.x.cells
        ? signs.right
        : y < 0
          ? signs.up
          : y > plot.y.cells
            ? signs.down
            : '';
  return {
    column: nearestCell(plot.x, stars.colour[star]),
    row: nearestCell(plot.y, stars.absMag[star]),
    outside,
  };
}

/** The cell itself, or the nearest one that no other flagged star has; the cell itself when all are taken. */
function freeCell(plot: DiagramPlot, cell: Cell, taken: ReadonlyMap<number, Cell>): Cell {
  const isFree = (column: number, row: number) =>
    column >= 0 &&
    row >= 0 &&
    column < plot.x.cells &&
    row < plot.y.cells &&
    !taken.has(row * plot.x.cells + column);
  for (let reach = 0; reach <= MOST_NUDGE; reach++) {
    for (let dx = -reach; dx <= reach; dx++) {
      for (const dy of [reach - Math.abs(dx), Math.abs(dx) - reach]) {
        if (isFree(cell.column + dx, cell.row + dy))
          return { ...cell, column: cell.column + dx, row: cell.row + dy };
      }
    }
  }
  return cell;
}

function setCell(
  grid: Grid,
  plot: DiagramPlot,
  { column, row }: { column: number; row: number },
  character: string,
  style: Parameters<Grid['set']>[3],
): void {
  if (column < 0 || row < 0 || column >= plot.x.cells || row >= plot.y.cells) return;
  grid.set(plot.left + column, plot.top + row, character, style);
}
