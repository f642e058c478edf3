import { Grid } from '../terminal/grid.js';
import { toWidth } from './text.js';

/** A few words in the middle of an empty picture. */
export function noticePicture(lines: readonly string[], width: number, height: number): Grid {
  const grid = new Grid(width, height);
  lines.forEach((line, i) => {
    const text = toWidth(line, Math.min(line.length, width));
    const y = Math.max(0, Math.floor((height - lines.length) / 2)) + i;
    grid.put(Math.floor((width - text.length) / 2), y, text, { colour: 'dim' });
  });
  return grid;
}
