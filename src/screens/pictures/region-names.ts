import type { TrackLine } from '../../science/odds/index.js';
import type { Grid } from '../terminal/grid.js';
import type { DiagramPlot } from './diagram-frame.js';
import { placeOf } from './scales.js';

/** The tracks whose neighbourhood is named, most helpful first. */
const NAMES: readonly (readonly [string, string])[] = [
  ['white dwarfs DA', 'white dwarfs'],
  ['giants', 'giants'],
  ['supergiants Iab', 'supergiants'],
  ['dwarfs', 'main sequence'],
  ['hot subdwarfs', 'hot subdwarfs'],
];

/** Rows from the track at which a name is tried, nearest first. */
const ROW_OFFSETS = [1, -1, 0, 2, -2];
/** Where the name stands beside a point of the track: around it, ending before it, beginning after it. */
const ALIGNMENTS: readonly ((length: number) => number)[] = [
  length => -Math.floor(length / 2),
  length => -length - 2,
  () => 3,
];
const CLEAR_COLUMNS = 1;

/** Writes each name beside its track, where it covers neither stars nor a track; else not at all. */
export function drawRegionNames(grid: Grid, plot: DiagramPlot, tracks: readonly TrackLine[]): void {
  for (const [track, name] of NAMES) {
    const line = tracks.find(candidate => candidate.name === track);
    const place = line === undefined ? undefined : placeFor(grid, plot, line, name.length);
    if (place !== undefined) grid.put(place.x, place.y, name, { colour: 'dim' });
  }
}

function placeFor(
  grid: Grid,
  plot: DiagramPlot,
  line: TrackLine,
  length: number,
): { x: number; y: number } | undefined {
  const visible = Array.from(line.colour, (colour, i) => ({
    column: Math.floor(placeOf(plot.x, colour)),
    row: Math.floor(placeOf(plot.y, line.absMag[i])),
  })).filter(({ column, row }) => column >= 0 && column < plot.x.cells && row >= 0 && row < plot.y.cells);
  const middle = Math.floor(visible.length / 2);
  const nearMiddleFirst = visible
    .map((point, i) => ({ ...point, away: Math.abs(i - middle) }))
    .sort((a, b) => a.away - b.away);
  for (const rowOffset of ROW_OFFSETS) {
    for (const { column, row } of nearMiddleFirst) {
      const y = plot.top + row + rowOffset;
      for (const shift of ALIGNMENTS) {
        const x = plot.left + column + shift(length);
        if (isFree(grid, plot, x, y, length)) return { x, y };
      }
    }
  }
  return undefined;
}

function isFree(grid: Grid, plot: DiagramPlot, x: number, y: number, length: number): boolean {
  if (y < plot.top || y >= plot.top + plot.y.cells) return false;
  const from = x - CLEAR_COLUMNS;
  const to = x + length + CLEAR_COLUMNS;
  if (from < plot.left || to > plot.left + plot.x.cells) return false;
  for (let column = from; column < to; column++) if (grid.at(column, y) !== ' ') return false;
  return true;
}
