import type { NightView } from '../../night/view.js';
import type { DiagramWindow } from '../state/diagram-window.js';
import { Grid } from '../terminal/grid.js';
import type { GlyphName } from '../terminal/look.js';
import type { Style } from '../terminal/palette.js';
import { crowding, rasteriseStars, type StarRaster } from './density.js';
import { type DiagramPlot, drawFrame, plotOf } from './diagram-frame.js';
import { DOT_GRIDS, dotCharacter } from './dots.js';
import { drawRegionNames } from './region-names.js';
import { drawTracks, rasteriseTracks } from './track-lines.js';

/** The diagram without the marks on single stars, and where its plot stands. */
export interface DiagramPicture {
  readonly grid: Grid;
  readonly plot: DiagramPlot;
}

/**
 * The Hertzsprung-Russell diagram: colour to the right (hot stars left), absolute magnitude downwards (bright
 * stars on top), the mean sequences behind. Pure; made anew only when night, window, size or glyphs change.
 */
export function hrDiagram(
  view: Pick<NightView, 'axes' | 'stars' | 'tracks' | 'letters'>,
  window: DiagramWindow,
  width: number,
  height: number,
  glyphs: GlyphName,
): DiagramPicture {
  const grid = new Grid(width, height);
  const plot = plotOf(width, height, window);
  drawTracks(grid, plot, rasteriseTracks(view.tracks, plot, glyphs), glyphs);
  drawStars(
    grid,
    plot,
    rasteriseStars(view.stars, window, plot.x.cells, plot.y.cells, DOT_GRIDS[glyphs]),
    glyphs,
  );
  drawRegionNames(grid, plot, view.tracks);
  drawFrame(grid, plot, view, glyphs);
  return { grid, plot };
}

function drawStars(grid: Grid, plot: DiagramPlot, raster: StarRaster, glyphs: GlyphName): void {
  for (let row = 0; row < raster.rows; row++) {
    for (let column = 0; column < raster.columns; column++) {
      const cell = row * raster.columns + column;
      const level = crowding(raster.counts[cell]);
      if (level === 0) continue;
      const character = dotCharacter(raster.masks[cell], glyphs, level === 3);
      grid.set(plot.left + column, plot.top + row, character, styleOf(raster.logTeff[cell], level === 3));
    }
  }
}

function styleOf(logTeff: number, crowded: boolean): Style {
  const teff_K = Math.round(10 ** logTeff);
  return Number.isNaN(logTeff) ? { colour: 'text', bold: crowded } : { colour: { teff_K }, bold: crowded };
}
