import type { NightView } from '../../night/view.js';

/** The part of the HR diagram that is shown. Colour grows to the right, magnitudes grow downwards. */
export interface DiagramWindow {
  readonly colourFrom: number;
  readonly colourTo: number;
  /** Brightest magnitude, at the top. */
  readonly magFrom: number;
  readonly magTo: number;
}

/** Shown until the first star is placed: from hot to red dwarfs, from supergiants to white dwarfs. */
const UNKNOWN_FIELD: DiagramWindow = { colourFrom: -0.5, colourTo: 2, magFrom: -7, magTo: 16 };
/** Beyond these a value is an artefact of the reduction and must not squeeze all the others together. */
const PLAUSIBLE: DiagramWindow = { colourFrom: -1, colourTo: 6, magFrom: -12, magTo: 25 };
/** Less than this shows noise only; the whole diagram also never spans less than LEAST_WHOLE. */
const LEAST_ZOOM = { colour: 0.1, mag: 0.8 };
const LEAST_WHOLE = { colour: 1.2, mag: 9 };
const STEP = { colour: 0.1, mag: 1 };

type Placed = Pick<NightView, 'stars'>;

/**
 * The window that holds every plausible star of the night, rounded outwards to whole steps so that a new star
 * seldom moves the picture.
 */
export function wholeWindow(view: Placed): DiagramWindow {
  const { colour, absMag, count } = view.stars;
  let [colourFrom, colourTo, magFrom, magTo] = [Infinity, -Infinity, Infinity, -Infinity];
  for (let star = 0; star < count; star++) {
    const [x, y] = [colour[star], absMag[star]];
    if (!(x >= PLAUSIBLE.colourFrom && x <= PLAUSIBLE.colourTo)) continue;
    if (!(y >= PLAUSIBLE.magFrom && y <= PLAUSIBLE.magTo)) continue;
    if (x < colourFrom) colourFrom = x;
    if (x > colourTo) colourTo = x;
    if (y < magFrom) magFrom = y;
    if (y > magTo) magTo = y;
  }
  if (colourFrom === Infinity) return UNKNOWN_FIELD;
  const [left, right] = roundOut(colourFrom, colourTo, STEP.colour, LEAST_WHOLE.colour);
  const [top, bottom] = roundOut(magFrom, magTo, STEP.mag, LEAST_WHOLE.mag);
  return { colourFrom: left, colourTo: right, magFrom: top, magTo: bottom };
}

/** Widened by half a step on each side, to the least span, and to multiples of the step. */
function roundOut(low: number, high: number, step: number, leastSpan: number): [number, number] {
  const spare = Math.max(0, leastSpan - (high - low) - step) / 2;
  const from = Math.floor((low - spare) / step - 0.5) * step;
  const to = Math.ceil((high + spare) / step + 0.5) * step;
  return [from, to];
}

/**
 * The window made smaller (factor below 1) or larger around a point, which becomes its centre; kept inside the
 * whole. Undefined: the whole diagram again.
 */
export function zoomed(
  window: DiagramWindow,
  whole: DiagramWindow,
  factor: number,
  colour: number,
  mag: number,
): DiagramWindow | undefined {
  const wide = whole.colourTo - whole.colourFrom;
  const high = whole.magTo - whole.magFrom;
  const width = Math.max(LEAST_ZOOM.colour, (window.colourTo - window.colourFrom) * factor);
  const height = Math.max(LEAST_ZOOM.mag, (window.magTo - window.magFrom) * factor);
  if (width >= wide && height >= high) return undefined;
  return around(whole, Math.min(width, wide), Math.min(height, high), colour, mag);
}

/** The window moved by shares of its own size, kept inside the whole. */
export function panned(
  window: DiagramWindow,
  whole: DiagramWindow,
  right: number,
  down: number,
): DiagramWindow {
  const width = window.colourTo - window.colourFrom;
  const height = window.magTo - window.magFrom;
  const colour = (window.colourFrom + window.colourTo) / 2 + right * width;
  const mag = (window.magFrom + window.magTo) / 2 + down * height;
  return around(whole, width, height, colour, mag);
}

/** Moved just so far that a point lies inside. */
export function holding(
  window: DiagramWindow,
  whole: DiagramWindow,
  colour: number,
  mag: number,
): DiagramWindow {
  const inside =
    colour >= window.colourFrom && colour <= window.colourTo && mag >= window.magFrom && mag <= window.magTo;
  if (inside || Number.isNaN(colour + mag)) return window;
  return around(whole, window.colourTo - window.colourFrom, window.magTo - window.magFrom, colour, mag);
}

function around(
  whole: DiagramWindow,
  width: number,
  height: number,
  colour: number,
  mag: number,
): DiagramWindow {
  const colourFrom = clamp(colour - width / 2, whole.colourFrom, whole.colourTo - width);
  const magFrom = clamp(mag - height / 2, whole.magFrom, whole.magTo - height);
  return { colourFrom, colourTo: colourFrom + width, magFrom, magTo: magFrom + height };
}

function clamp(value: number, low: number, high: number): number {
  return Math.max(low, Math.min(Math.max(low, high), value));
}
