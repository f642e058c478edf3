import { BAND_INDEX } from '../../src/science/bands.js';
import type { Random } from '../../src/science/random.js';
import { readTracks } from '../../src/science/tracks/index.js';
import type { Track, TrackPoint } from '../../src/science/tracks/track.js';
import { member } from './populations.js';
import { anywhere, type DemoStar, placed, randomMotion } from './star.js';

/** A star worth finding, with the flag that should find it. */
export interface HiddenStar {
  readonly kind: string;
  readonly flag: string;
  readonly star: DemoStar;
}

/** The stars put in by hand. Magnitudes come from the published tracks, everything else is invented. */
export function hiddenStars(random: Random): HiddenStar[] {
  const tracks = readTracks();
  const dwarfs = trackNamed(tracks, 'dwarfs');
  const whiteDwarfs = trackNamed(tracks, 'white dwarfs DA');
  const lone = (absMag: { V: number; B: number }, distance_pc: number, dust: number, speed = 25) =>
    placed(anywhere(random), absMag, distance_pc, dust, randomMotion(random, distance_pc, speed));
  const subdwarf = (subtype: number, fainter: number, distance_pc: number) => {
    const { V, B } = atSubtype(dwarfs, subtype);
    return lone({ V: V + fainter, B: B + fainter }, distance_pc, 0.2, 120);
  };
  const pair = blend(atTemperature(whiteDwarfs, 15_000), atSubtype(dwarfs, 63));
  const fader = atSubtype(dwarfs, 43);
  const riser = atSubtype(dwarfs, 52);
  return [
    {
      kind: 'white dwarf',
      flag: 'white-dwarf',
      star: lone(atTemperature(whiteDwarfs, 12_000), 60, 0.08, 35),
    },
    {
      kind: 'white dwarf',
      flag: 'white-dwarf',
      star: lone(atTemperature(whiteDwarfs, 20_000), 110, 0.12, 35),
    },
    { kind: 'white dwarf', flag: 'white-dwarf', star: lone(atTemperature(whiteDwarfs, 8_000), 72, 0.1, 35) },
    { kind: 'hot subdwarf', flag: 'hot-subdwarf', star: lone({ V: 4.4, B: 4.4 - 0.27 }, 1050, 0.25, 60) },
    {
      kind: 'supergiant far behind',
      flag: 'supergiant',
      star: lone(atSubtype(trackNamed(tracks, 'supergiants Iab'), 52), 12_500, 0.38),
    },
    {
      kind: 'supergiant far behind',
      flag: 'supergiant',
      star: lone(atSubtype(trackNamed(tracks, 'supergiants Iab'), 22), 15_000, 0.36),
    },
    { kind: 'metal-poor subdwarf', flag: 'subdwarf', star: subdwarf(47, 1.6, 330) },
    { kind: 'metal-poor subdwarf', flag: 'subdwarf', star: subdwarf(51, 1.45, 260) },
    { kind: 'blue straggler', flag: 'blue-straggler', star: member(0.4, 0.4 - 0.08, random) },
    { kind: 'blue straggler', flag: 'blue-straggler', star: member(0.65, 0.65 - 0.05, random) },
    { kind: 'white dwarf with an M dwarf', flag: 'between-sequences', star: lone(pair, 85, 0.1) },
    {
      kind: 'star that fades',
      flag: 'faded',
      star: {
        ...member(fader.V, fader.B, random),
        change: ramp('2026-11-08T20:30:00Z', '2026-11-09T00:30:00Z', 0.5),
      },
    },
    {
      kind: 'star that brightens',
      flag: 'brightened',
      star: { ...lone(riser, 620, 0.24), change: ramp('2026-11-08T22:30:00Z', '2026-11-08T23:00:00Z', -0.6) },
    },
  ];
}

/** Straight change from one time to another, constant before and after. */
function ramp(from: string, to: string, size_mag: number) {
  const start = Date.parse(from);
  const end = Date.parse(to);
  return (time_ms: number) => size_mag * Math.max(0, Math.min(1, (time_ms - start) / (end - start)));
}

function trackNamed(tracks: readonly Track[], name: string): Track {
  const found = tracks.find(track => track.name === name);
  if (found === undefined) throw new Error(`no track called ${name}`);
  return found;
}

function magnitudesOf(point: TrackPoint) {
  return { V: point.absMag[BAND_INDEX.V], B: point.absMag[BAND_INDEX.B] };
}

function atSubtype(track: Track, subtype: number) {
  const point = track.points.find(candidate => candidate.subtype === subtype);
  if (point === undefined) throw new Error(`${track.name} has no subtype ${subtype}`);
  return magnitudesOf(point);
}

function atTemperature(track: Track, teff_K: number) {
  const point = track.points.find(candidate => candidate.teff_K === teff_K);
  if (point === undefined) throw new Error(`${track.name} has no ${teff_K} K`);
  return magnitudesOf(point);
}

/** Two stars as one: fluxes add. */
function blend(a: { V: number; B: number }, b: { V: number; B: number }) {
  const sum = (x: number, y: number) => -2.5 * Math.log10(10 ** (-0.4 * x) + 10 ** (-0.4 * y));
  return { V: sum(a.V, b.V), B: sum(a.B, b.B) };
}
