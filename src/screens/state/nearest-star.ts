import type { StarColumns } from '../../night/view.js';
import type { DiagramWindow } from './diagram-window.js';

export type Direction = 'left' | 'right' | 'up' | 'down';

/** Sideways distance counts this much more than distance ahead, so that a row of stars is walked along. */
const SIDEWAYS_COST = 2;
/** A step goes at least this many cells: thousands of stars may share one. */
const LEAST_STEP_CELLS = 0.5;

/**
 * The star that an arrow key leads to: the nearest one in that direction, in cells of the diagram, inside the
 * window. -1 when there is none.
 */
export function starInDirection(
  stars: StarColumns,
  window: DiagramWindow,
  columns: number,
  rows: number,
  from: number,
  direction: Direction,
): number {
  const cellsPerColour = columns / (window.colourTo - window.colourFrom);
  // A cell is about twice as high as it is wide.
  const cellsPerMag = (2 * rows) / (window.magTo - window.magFrom);
  const [right, down] = STEPS[direction];
  const [x0, y0] = [stars.colour[from], stars.absMag[from]];
  let [best, bestCost] = [-1, Infinity];
  for (let star = 0; star < stars.count; star++) {
    const [colour, mag] = [stars.colour[star], stars.absMag[star]];
    if (!(colour >= window.colourFrom && colour <= window.colourTo)) continue;
    if (!(mag >= window.magFrom && mag <= window.magTo)) continue;
    const dx = (colour - x0) * cellsPerColour;
    const dy = (mag - y0) * cellsPerMag;
    const ahead = dx * right + dy * down;
    if (ahead < LEAST_STEP_CELLS) continue;
    const cost = ahead + SIDEWAYS_COST * Math.abs(dx * down - dy * right);
    if (cost < bestCost) [best, bestCost] = [star, cost];
  }
  return best;
}

const STEPS: Readonly<Record<Direction, readonly [number, number]>> = {
  left: [-1, 0],
  right: [1, 0],
  up: [0, -1],
  down: [0, 1],
};
