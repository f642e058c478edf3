import type { StarColumns } from '../../night/view.js';
import type { DiagramWindow } from '../state/diagram-window.js';
import { type DotGrid, type DotRaster, emptyRaster } from './raster.js';

/** The stars of a diagram by cell: their dots, how many they are and how hot. */
export interface StarRaster extends DotRaster {
  readonly counts: Uint32Array;
  /** Mean of log10 Teff over the cell's stars whose Teff is known; NaN without any. */
  readonly logTeff: Float32Array;
}

/** One pass over all stars; those outside the window or without a place are left out. */
export function rasteriseStars(
  stars: StarColumns,
  window: DiagramWindow,
  columns: number,
  rows: number,
  dots: DotGrid,
): StarRaster {
  const raster = emptyRaster(columns, rows, dots);
  const { masks } = raster;
  const { wide, high } = dots;
  const cells = columns * rows;
  const counts = new Uint32Array(cells);
  const logTeff = new Float32Array(cells);
  const known = new Uint32Array(cells);
  const dotsPerColour = (columns * wide) / (window.colourTo - window.colourFrom);
  const dotsPerMag = (rows * high) / (window.magTo - window.magFrom);
  const { colour, absMag, teff_K, count } = stars;
  for (let star = 0; star < count; star++) {
    const x = Math.floor((colour[star] - window.colourFrom) * dotsPerColour);
    const y = Math.floor((absMag[star] - window.magFrom) * dotsPerMag);
    if (!(x >= 0 && x < columns * wide && y >= 0 && y < rows * high)) continue;
    const column = (x / wide) | 0;
    const row = (y / high) | 0;
    const cell = row * columns + column;
    masks[cell] |= 1 << ((y - row * high) * wide + (x - column * wide));
    counts[cell]++;
    if (teff_K[star] > 0) {
      logTeff[cell] += Math.log10(teff_K[star]);
      known[cell]++;
    }
  }
  for (let cell = 0; cell < cells; cell++)
    logTeff[cell] = known[cell] > 0 ? logTeff[cell] / known[cell] : NaN;
  return { ...raster, counts, logTeff };
}

/** Stars in a cell above which its dots no longer tell how many they are. */
const FEW = 3;
const MANY = 24;

/** How crowded a cell is: 0 empty, 1 a few, 2 more, 3 many. */
export function crowding(count: number): 0 | 1 | 2 | 3 {
  if (count === 0) return 0;
  if (count <= FEW) return 1;
  return count < MANY ? 2 : 3;
}
