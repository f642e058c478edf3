import asciichart from 'asciichart';
import type { LightCurve } from '../../night/view.js';
import { glyphsOf } from '../terminal/glyphs.js';
import { Grid } from '../terminal/grid.js';
import type { GlyphName } from '../terminal/look.js';
import { drawBottomAxis, drawLeftAxis } from './axes.js';
import { nearestCell, type Scale } from './scales.js';
import { count } from './status-line.js';
import { clockText } from './text.js';
import { roundTicks, timeTicks } from './ticks.js';

/** Corners and lines for asciichart, in the order it expects them. */
const ASCII_SYMBOLS = ['-', '|', '-', '-', '-', '\\', '/', '\\', '/', '|'];
const LEAST_RANGE_MAG = 0.1;
const COLUMNS_PER_TIME = 9;
const ROWS_PER_TICK = 2;

interface Point {
  readonly time_ms: number;
  readonly mag: number;
}

/**
 * Magnitude against time, bright on top: the readings as points, a line between them as a guide. Readings whose
 * time or magnitude is not known are left out.
 */
export function lightCurvePicture(curve: LightCurve, width: number, height: number, glyphs: GlyphName): Grid {
  const grid = new Grid(width, height);
  const points = knownPoints(curve);
  if (points.length === 0) {
    grid.put(0, 0, `no readings with a time in ${curve.band} yet`, { colour: 'dim' });
    return grid;
  }
  const rows = height - 3;
  const y = magScale(points, curve, rows);
  const { values, decimals } = roundTicks(y.from, y.to, Math.max(3, Math.floor(rows / ROWS_PER_TICK)));
  const magTicks = values.map(value => ({ value, label: value.toFixed(decimals) }));
  const left = Math.max(2, ...magTicks.map(tick => tick.label.length)) + 1;
  const x = timeScale(points, width - left);
  drawGuide(grid, left, 1, points, x, y, glyphs);
  for (const { time_ms, mag } of points)
    grid.set(left + nearestCell(x, time_ms), 1 + nearestCell(y, mag), POINT[glyphs], {
      colour: 'accent',
      bold: true,
    });
  drawLeftAxis(grid, left - 1, 1, y, magTicks, glyphs);
  const times = timeTicks(x.from, x.to, Math.max(1, Math.floor(x.cells / COLUMNS_PER_TIME)));
  const timeLabels = times.map(value => ({ value, label: clockText(value) }));
  drawBottomAxis(grid, left, 1 + rows, x, timeLabels, '', glyphs);
  grid.put(0, 0, curve.band, { colour: 'title' });
  grid.put(
    left,
    0,
    `${count(points.length, 'reading')}, ${glyphsOf(glyphs).plusMinus} ${medianSigma(curve)} mag, UT`,
    { colour: 'dim' },
  );
  return grid;
}

const POINT: Readonly<Record<GlyphName, string>> = { braille: '⬥', block: '⬥', ascii: 'o' };

function knownPoints({ time_ms, mag }: LightCurve): Point[] {
  return Array.from(time_ms, (time, i) => ({ time_ms: time, mag: mag[i] })).filter(
    point => !Number.isNaN(point.time_ms + point.mag),
  );
}

/** Holds every reading; noise of a constant star is not blown up to the full height. */
function magScale(points: readonly Point[], curve: LightCurve, rows: number): Scale {
  const mags = points.map(point => point.mag);
  const sigma = Math.max(0, ...curve.sigma_mag.filter(value => !Number.isNaN(value)));
  const least = Math.max(LEAST_RANGE_MAG, 3 * sigma);
  const [bright, faint] = [Math.min(...mags), Math.max(...mags)];
  const spare = Math.max(0.1 * (faint - bright), (least - (faint - bright)) / 2);
  return { from: bright - spare, to: faint + spare, cells: rows };
}

function timeScale(points: readonly Point[], cells: number): Scale {
  const [first, last] = [points[0].time_ms, points[points.length - 1].time_ms];
  const spare = Math.max(60_000, (last - first) * 0.02);
  return { from: first - spare, to: last + spare, cells };
}

/** The body of an asciichart: one row a column, straight from reading to reading. */
function drawGuide(
  grid: Grid,
  left: number,
  top: number,
  points: readonly Point[],
  x: Scale,
  y: Scale,
  glyphs: GlyphName,
): void {
  const knots = new Map(points.map(({ time_ms, mag }) => [nearestCell(x, time_ms), nearestCell(y, mag)]));
  const columns = [...knots.keys()];
  const [first, last] = [columns[0], columns[columns.length - 1]];
  if (columns.length < 2) return;
  const series = Array.from(
    { length: last - first + 1 },
    (_, i) => y.cells - 1 - rowAt(knots, columns, first + i),
  );
  const text = asciichart.plot(series, {
    min: 0,
    max: y.cells - 1,
    height: y.cells - 1,
    offset: 1,
    format: () => '',
    ...(glyphs === 'ascii' ? { symbols: ASCII_SYMBOLS } : {}),
  });
  text.split('\n').forEach((line, row) => {
    // The first column is asciichart's own axis.
    [...line.slice(1)].forEach((character, column) => {
      if (character !== ' ') grid.set(left + first + column, top + row, character, { colour: 'dim' });
    });
  });
}

/** Row of the straight line between the knots before and after a column. */
function rowAt(knots: ReadonlyMap<number, number>, columns: readonly number[], column: number): number {
  const known = knots.get(column);
  if (known !== undefined) return known;
  const after = columns.findIndex(candidate => candidate > column);
  const [a, b] = [columns[after - 1], columns[after]];
  const [from, to] = [knots.get(a) ?? 0, knots.get(b) ?? 0];
  return Math.round(from + ((column - a) / (b - a)) * (to - from));
}

function medianSigma({ sigma_mag }: LightCurve): string {
  const known = sigma_mag.filter(value => !Number.isNaN(value)).sort();
  return known.length === 0 ? '?' : known[Math.floor(known.length / 2)].toFixed(3);
}
