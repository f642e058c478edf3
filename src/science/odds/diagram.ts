import { BAND_INDEX, type Colour } from '../bands.js';
import { SPECTRAL_LETTERS } from '../spectral-subtype.js';
import type { Track, TrackPoint } from '../tracks/track.js';
import type { DiagramAxes } from './model.js';

/** One mean sequence in the axes of a diagram. */
export interface TrackLine {
  readonly name: string;
  readonly colour: Float32Array;
  readonly absMag: Float32Array;
}

/** The sequences drawn behind the stars: one line for each kind, the points whose bands are known. */
export function tracksInAxes(tracks: readonly Track[], axes: DiagramAxes): readonly TrackLine[] {
  return tracks
    .filter(track => !HIDDEN.test(track.name))
    .map(track => {
      const points = track.points
        .map(point => [colourOf(point, axes.colour), point.absMag[BAND_INDEX[axes.band]]] as const)
        .filter(([colour, absMag]) => !Number.isNaN(colour) && !Number.isNaN(absMag));
      return {
        name: track.name,
        colour: Float32Array.from(points, ([colour]) => colour),
        absMag: Float32Array.from(points, ([, absMag]) => absMag),
      };
    })
    .filter(line => line.colour.length > 1);
}

/** Lines that would only double a neighbour. */
const HIDDEN = /DB$/;

/** Where the class letters stand on the colour axis: at the middle (subtype 5) of each dwarf letter. */
export function letterPositions(
  tracks: readonly Track[],
  colour: Colour,
): { letter: string; colour: number }[] {
  const dwarfs = tracks.filter(track => track.starClass === 'V').flatMap(track => track.points);
  return SPECTRAL_LETTERS.map((letter, i) => {
    const points = dwarfs.filter(
      point =>
        point.subtype >= i * 10 && point.subtype < (i + 1) * 10 && !Number.isNaN(colourOf(point, colour)),
    );
    const middle = i * 10 + 5;
    const nearest = points.reduce<TrackPoint | undefined>(
      (best, point) =>
        best === undefined || Math.abs(point.subtype - middle) < Math.abs(best.subtype - middle)
          ? point
          : best,
      undefined,
    );
    return { letter, colour: nearest === undefined ? Number.NaN : colourOf(nearest, colour) };
  }).filter(position => !Number.isNaN(position.colour));
}

/** Absolute magnitude of a sequence at a colour, the brightest where it passes twice; NaN where it does not. */
export function absMagOnLine(line: TrackLine | undefined, colour: number): number {
  let brightest = Number.NaN;
  if (line === undefined) return brightest;
  for (let i = 0; i + 1 < line.colour.length; i++) {
    const [a, b] = [line.colour[i], line.colour[i + 1]];
    if ((colour - a) * (colour - b) > 0 || a === b) continue;
    const absMag = line.absMag[i] + ((colour - a) / (b - a)) * (line.absMag[i + 1] - line.absMag[i]);
    if (!(absMag > brightest)) brightest = absMag;
  }
  return brightest;
}

function colourOf(point: TrackPoint, colour: Colour): number {
  return point.absMag[BAND_INDEX[colour.blue]] - point.absMag[BAND_INDEX[colour.red]];
}
