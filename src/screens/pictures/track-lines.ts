import type { TrackLine } from '../../science/odds/index.js';
import type { Grid } from '../terminal/grid.js';
import type { GlyphName } from '../terminal/look.js';
import type { DiagramPlot } from './diagram-frame.js';
import { DOT_GRIDS, dotCharacter } from './dots.js';
import { type DotRaster, emptyRaster, setDottedLine } from './raster.js';
import { placeOf } from './scales.js';

/** Tables jump where a spectral class has no point in a band; longer gaps than this many cells are not bridged. */
const LONGEST_STEP_CELLS = 40;

/** The mean sequences as thin lines of dots, in the cells of the plot. */
export function rasteriseTracks(
  tracks: readonly TrackLine[],
  plot: DiagramPlot,
  glyphs: GlyphName,
): DotRaster {
  const dots = DOT_GRIDS[glyphs];
  const raster = emptyRaster(plot.x.cells, plot.y.cells, dots);
  for (const { colour, absMag } of tracks) {
    for (let i = 0; i + 1 < colour.length; i++) {
      const [x0, y0] = [placeOf(plot.x, colour[i]), placeOf(plot.y, absMag[i])];
      const [x1, y1] = [placeOf(plot.x, colour[i + 1]), placeOf(plot.y, absMag[i + 1])];
      if (!(Math.hypot(x1 - x0, y1 - y0) < LONGEST_STEP_CELLS)) continue;
      setDottedLine(raster, x0 * dots.wide, y0 * dots.high, x1 * dots.wide, y1 * dots.high);
    }
  }
  return raster;
}

/** Draws the tracks; in sets without fine dots a sign of their own keeps them apart from the stars. */
export function drawTracks(grid: Grid, plot: DiagramPlot, raster: DotRaster, glyphs: GlyphName): void {
  for (let row = 0; row < raster.rows; row++) {
    for (let column = 0; column < raster.columns; column++) {
      const mask = raster.masks[row * raster.columns + column];
      if (mask === 0) continue;
      const character = glyphs === 'braille' ? dotCharacter(mask, glyphs, false) : LINE_SIGNS[glyphs];
      grid.set(plot.left + column, plot.top + row, character, { colour: 'track', dim: true });
    }
  }
}

const LINE_SIGNS = { block: '·', ascii: '-' } as const;
