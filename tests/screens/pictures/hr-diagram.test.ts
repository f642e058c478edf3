import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { NightView } from '../../../src/night/view.js';
import { rasteriseStars } from '../../../src/screens/pictures/density.js';
import { withMarks } from '../../../src/screens/pictures/diagram-marks.js';
import { hrDiagram } from '../../../src/screens/pictures/hr-diagram.js';
import { type DiagramWindow, wholeWindow } from '../../../src/screens/state/diagram-window.js';
import type { GlyphName } from '../../../src/screens/terminal/look.js';
import { crowdedView, nightView, starColumns } from '../../support/night-view.js';

const NO_MARKS = {
  shortlist: [],
  unseen: new Set<number>(),
  fresh: [],
  selected: -1,
  focused: false,
} as const;
const PLAIN = { sigma: 0.1, starClass: 'V', odds: 0.9, subtype: 42, teff_K: 5800 } as const;

function viewOf(...places: readonly (readonly [number, number])[]): NightView {
  const stars = starColumns(
    places.map(([colour, absMag], i) => ({ ...PLAIN, id: `S${i}`, colour, absMag })),
    0,
  );
  return { ...nightView(), stars, tracks: [], shortlist: [] };
}

function drawn(view: NightView, glyphs: GlyphName = 'ascii', window?: DiagramWindow) {
  return hrDiagram(view, window ?? wholeWindow(view), 60, 24, glyphs);
}

/** The plot's cells that hold a star. */
function starCells(text: string): number {
  return [
    ...text
      .split('\n')
      .slice(1, -2)
      .join('')
      .matchAll(/[':.%]/g),
  ].length;
}

describe('the HR diagram', () => {
  it('has bright stars on top and hot stars on the left', () => {
    const { grid, plot } = drawn(viewOf([-0.2, -3], [1.4, 12]));
    const cells: [number, number][] = [];
    for (let y = 0; y < plot.y.cells; y++)
      for (let x = 0; x < plot.x.cells; x++)
        if (/[':.]/.test(grid.at(plot.left + x, plot.top + y))) cells.push([x, y]);
    expect(cells).toHaveLength(2);
    const [[hotX, hotY], [coolX, coolY]] = cells;
    expect(hotX).toBeLessThan(coolX);
    expect(hotY).toBeLessThan(coolY);
  });

  it('draws with no star, one star, equal stars and unknown values', () => {
    expect(starCells(drawn(viewOf()).grid.toPlainText())).toBe(0);
    expect(starCells(drawn(viewOf([0.6, 4.8])).grid.toPlainText())).toBe(1);
    expect(starCells(drawn(viewOf([0.6, 4.8], [0.6, 4.8])).grid.toPlainText())).toBe(1);
    expect(starCells(drawn(viewOf([Number.NaN, 4.8], [0.6, Number.NaN])).grid.toPlainText())).toBe(0);
  });

  it('says with a denser sign, and bold, where many stars share a cell', () => {
    const crowd = Array.from({ length: 40 }, () => [0.6, 4.8] as const);
    const { grid, plot } = drawn(viewOf(...crowd, [-0.2, -3]));
    const text = grid.toPlainText();
    expect(text.match(/%/g)).toHaveLength(1);
    for (let y = 0; y < grid.height; y++)
      for (let x = plot.left; x < grid.width; x++)
        if (grid.at(x, y) === '%')
          expect(grid.styleAt(x, y)).toMatchObject({ bold: true, colour: { teff_K: 5800 } });
  });

  it('counts every star inside the window once: compared with a slow count', () => {
    const view = crowdedView(5000);
    const window: DiagramWindow = { colourFrom: 0.2, colourTo: 1.1, magFrom: 2, magTo: 8 };
    const { colour, absMag } = view.stars;
    const inside = [...colour].filter(
      (value, star) => value >= 0.2 && value < 1.1 && absMag[star] >= 2 && absMag[star] < 8,
    ).length;
    const raster = rasteriseStars(view.stars, window, 40, 20, { wide: 2, high: 4 });
    expect(raster.counts.reduce((sum, count) => sum + count, 0)).toBe(inside);
    for (let cell = 0; cell < raster.counts.length; cell++)
      expect(raster.masks[cell] === 0).toBe(raster.counts[cell] === 0);
  });

  it('names regions without covering a star', () => {
    const view = nightView();
    const bare = drawn({ ...view, tracks: [] }, 'braille').grid;
    const named = drawn(view, 'braille').grid;
    expect(named.toPlainText()).toContain('white dwarfs');
    for (let y = 1; y < 22; y++)
      for (let x = 5; x < 60; x++) if (/[⠁-⣿]/.test(bare.at(x, y))) expect(named.at(x, y)).toMatch(/[⠁-⣿]/);
  });
});

describe('marks on the diagram', () => {
  it('show every flagged star, wherever it lies and however small the window is', () => {
    const view = nightView();
    const number = fc.double({ min: 0.05, max: 0.95, noNaN: true });
    fc.assert(
      fc.property(number, number, fc.constantFrom('ascii', 'braille', 'block'), (x, y, glyphs) => {
        const whole = wholeWindow(view);
        const window = {
          colourFrom: whole.colourFrom + x,
          colourTo: whole.colourFrom + x + 0.4,
          magFrom: whole.magFrom + 10 * y,
          magTo: whole.magFrom + 10 * y + 4,
        };
        const picture = hrDiagram(view, window, 50, 20, glyphs as GlyphName);
        const grid = withMarks(
          picture,
          view.stars,
          { ...NO_MARKS, shortlist: view.shortlist },
          glyphs as GlyphName,
        );
        let marks = 0;
        for (let row = 1; row < 18; row++)
          for (let column = 0; column < 50; column++)
            if (grid.styleAt(column, row)?.colour === 'flagged') marks++;
        expect(marks).toBe(view.shortlist.length);
      }),
      { seed: 8, numRuns: 60 },
    );
  });

  it('keep flagged stars of one cell apart', () => {
    const view = viewOf([0.6, 4.8], [0.6, 4.8], [0.6, 4.8]);
    const shortlist = [0, 1, 2].map(star => ({ ...nightView().shortlist[0], star }));
    const text = withMarks(drawn(view), view.stars, { ...NO_MARKS, shortlist }, 'ascii').toPlainText();
    for (const number of ['1', '2', '3'])
      expect(
        text
          .split('\n')
          .slice(1, -3)
          .join('')
          .replace(/[+-]\d+/g, ''),
      ).toContain(number);
  });

  it('put the selected star on top with its error bar', () => {
    const view = viewOf([0.6, 4.8], [0.1, 1]);
    const { stars } = view;
    const wide = { ...view, stars: { ...stars, absMagSigma: Float32Array.from([1.2, 0.1]) } };
    const text = withMarks(drawn(wide), wide.stars, { ...NO_MARKS, selected: 0 }, 'ascii').toPlainText();
    expect(text).toContain('-@-');
    expect(
      text
        .split('\n')
        .slice(1, -2)
        .filter(line => line.slice(5).includes('|')).length,
    ).toBeGreaterThan(1);
  });

  it('say where the arrow keys move', () => {
    const view = nightView();
    const text = (focused: boolean) =>
      withMarks(drawn(view), view.stars, { ...NO_MARKS, focused }, 'ascii')
        .toPlainText()
        .split('\n')[0];
    expect(text(true)).toMatch(/^M_V>/);
    expect(text(false)).not.toContain('>');
  });

  it('leave the picture they are drawn on as it was', () => {
    const view = nightView();
    const picture = drawn(view);
    const before = picture.grid.toPlainText();
    withMarks(picture, view.stars, { ...NO_MARKS, shortlist: view.shortlist, selected: 5 }, 'ascii');
    expect(picture.grid.toPlainText()).toBe(before);
  });
});
