import { BAND_COUNT, BAND_INDEX, BANDS, type Colour } from '../bands.js';
import { CLASS_INDEX, type StarClass } from '../classes.js';
import { ExtinctionLaw } from '../extinction.js';
import type { Kinematics } from '../tangential-velocity.js';
import { SUBDWARF_FEH, subdwarfOffset_mag } from '../tracks/subdwarfs.js';
import type { Track, TrackPoint } from '../tracks/track.js';
import {
  dwarfDensity_perPc3PerMag,
  evolvedDensity_perPc3PerSubtype,
  HOT_SUBDWARF_PER_PC3,
  SUBDWARF_SHARE,
  ULTRACOOL_PER_PC3_PER_SUBTYPE,
  whiteDwarfDensity_perPc3PerMag,
} from './luminosity-function.js';

/** One point of the model: a kind of star, how it looks in every band, and how common it is. */
export interface Node {
  readonly classIndex: number;
  readonly track: string;
  readonly subtype: number;
  readonly teff_K: number;
  readonly bolometricCorrection_V: number;
  /** Laid out as BANDS, NaN = silent in that band. */
  readonly absMag: Float64Array;
  /** A_band / A_V for a star of this colour, laid out as BANDS. */
  readonly extinctionRatio: Float64Array;
  /** Stars of this kind per cubic parsec near the Sun. */
  readonly density_perPc3: number;
  /** Intrinsic scatter in M common to all bands, and in each band on its own: laid out as BANDS. */
  readonly scatter_mag: number;
  readonly bandScatter_mag: readonly number[];
  readonly kinematics: Kinematics;
  /** Sequences beside this one, of the same colours. */
  readonly branches: readonly Branch[];
}

/** Nodes lie closer than the photometric floor in colour, and well inside the scatter in magnitude. */
const COLOUR_STEP_MAG = 0.035;
const MAGNITUDE_STEP_MAG = 0.25;
/** Interior gaps of a column are bridged when they are no wider than this many subtypes. */
const WIDEST_GAP_SUBTYPES = 10;

type ModelledClass = Exclude<StarClass, 'none'>;

interface Scatter {
  readonly magnitude_mag: number;
  readonly band_mag: number;
}

/**
 * Intrinsic widths in M common to all bands, in three steps. The heads of the tables give dwarfs 0.2-0.4,
 * giants 0.7, II and I 0.7-1; white dwarfs spread by their masses about log g 8. Colour scatter: judgement,
 * from the precision the tables claim (0.01-0.03 mag) and the spread of metallicities.
 */
const SCATTER: Readonly<Record<ModelledClass, Scatter>> = {
  V: { magnitude_mag: 0.3, band_mag: 0.025 },
  IV: { magnitude_mag: 0.45, band_mag: 0.03 },
  III: { magnitude_mag: 0.65, band_mag: 0.03 },
  II: { magnitude_mag: 0.65, band_mag: 0.04 },
  Ib: { magnitude_mag: 0.65, band_mag: 0.04 },
  Iab: { magnitude_mag: 0.65, band_mag: 0.05 },
  Ia: { magnitude_mag: 0.65, band_mag: 0.05 },
  WD: { magnitude_mag: 0.3, band_mag: 0.03 },
  sd: { magnitude_mag: 0.3, band_mag: 0.03 },
  sdOB: { magnitude_mag: 0.65, band_mag: 0.03 },
};

export interface Branch {
  /** Share of the node's stars; the shares sum to 1. */
  readonly share: number;
  /** Negative: fainter than the sequence. */
  readonly brighter_mag: number;
}

/**
 * Sequences beside a sequence. Unresolved companions: an equal pair is 0.753 mag brighter; shares from memory
 * (about half of solar-type stars are multiple, Raghavan et al. 2010, ApJS 190, 1; few pairs are near equal).
 * White dwarfs: double degenerates above, massive ones (Sirius B, GD 140: 0.8-1.0 mag) below.
 */
const BRANCHES: Readonly<Partial<Record<StarClass, readonly Branch[]>>> = {
  V: [
    { share: 0.8, brighter_mag: 0 },
    { share: 0.12, brighter_mag: 0.35 },
    { share: 0.08, brighter_mag: 0.753 },
  ],
  WD: [
    { share: 0.86, brighter_mag: 0 },
    { share: 0.05, brighter_mag: 0.753 },
    { share: 0.09, brighter_mag: -0.85 },
  ],
  // Ib stars with good parallaxes (alpha and beta Aqr, Polaris, epsilon Peg) lie 0.2-1.3 mag below the calibration.
  Ib: [
    { share: 0.5, brighter_mag: 0 },
    { share: 0.5, brighter_mag: -0.9 },
  ],
  // Old thick disc, inner halo, outer halo: [Fe/H] -1.0, -1.5, -2.0 in equal parts.
  sd: [-1.0, SUBDWARF_FEH, -2.0].map(metallicity => ({
    share: 1 / 3,
    brighter_mag: subdwarfOffset_mag(SUBDWARF_FEH) - subdwarfOffset_mag(metallicity),
  })),
};

const SINGLE: readonly Branch[] = [{ share: 1, brighter_mag: 0 }];

/** Colours that the spacing of nodes has to resolve when nothing is known of a night's bands. */
const USUAL_COLOURS: readonly Colour[] = [
  { blue: 'B', red: 'V' },
  { blue: 'BP', red: 'RP' },
  { blue: 'g', red: 'r' },
];

/** Resamples every track into nodes, finely enough for the given colours. */
export function makeNodes(tracks: readonly Track[], colours = USUAL_COLOURS): readonly Node[] {
  const law = new ExtinctionLaw();
  return tracks.flatMap(track => {
    const samples = resample(bridgeGaps(track.points), colours);
    const bandScatter_mag = bandScatterOf(track);
    return samples.map(({ point, step_mag, step_subtypes }) => {
      const density_perPc3 = densityOf(track, point, step_mag, step_subtypes, samples.length);
      return makeNode(track, point, density_perPc3, bandScatter_mag, law);
    });
  });
}

/** Dwarfs earlier than A0 brighten by a magnitude while they still are dwarfs: their sequence is wider. */
const HOT_DWARF_SCATTER_MAG = 0.45;
const FIRST_A_SUBTYPE = 20;

function isHotDwarf(starClass: ModelledClass, point: TrackPoint): boolean {
  return starClass === 'V' && point.subtype < FIRST_A_SUBTYPE;
}

/** Colour scatter of the class, together with that of the transformation a band was filled by. */
function bandScatterOf(track: Track): readonly number[] {
  const { band_mag } = SCATTER[track.starClass as ModelledClass];
  return Array.from(track.fillSigma_mag, sigma => Math.hypot(band_mag, sigma));
}

function makeNode(
  track: Track,
  point: TrackPoint,
  density_perPc3: number,
  bandScatter_mag: readonly number[],
  law: ExtinctionLaw,
): Node {
  const starClass = track.starClass as ModelledClass;
  const bpRp = point.absMag[BAND_INDEX.BP] - point.absMag[BAND_INDEX.RP];
  return {
    classIndex: CLASS_INDEX[starClass],
    track: track.name,
    subtype: point.subtype,
    teff_K: point.teff_K,
    bolometricCorrection_V: point.bolometricCorrection_V,
    absMag: point.absMag,
    extinctionRatio: Float64Array.from(BANDS, band => law.ratio(band, bpRp)),
    density_perPc3,
    scatter_mag: isHotDwarf(starClass, point) ? HOT_DWARF_SCATTER_MAG : SCATTER[starClass].magnitude_mag,
    bandScatter_mag,
    kinematics: starClass === 'sd' ? 'metal-poor' : 'disc',
    branches: BRANCHES[starClass] ?? SINGLE,
  };
}

function densityOf(
  track: Track,
  point: TrackPoint,
  step_mag: number,
  step_subtypes: number,
  samples: number,
): number {
  const v = point.absMag[BAND_INDEX.V];
  switch (track.starClass) {
    case 'V':
      return Number.isNaN(v)
        ? ULTRACOOL_PER_PC3_PER_SUBTYPE * step_subtypes
        : dwarfDensity_perPc3PerMag(v) * step_mag;
    case 'sd':
      return dwarfDensity_perPc3PerMag(v) * SUBDWARF_SHARE * step_mag;
    case 'WD':
      // Hydrogen atmospheres are the larger part (about five in six, from memory).
      return whiteDwarfDensity_perPc3PerMag(v) * step_mag * (track.name.endsWith('DA') ? 5 / 6 : 1 / 6);
    case 'sdOB':
      return HOT_SUBDWARF_PER_PC3 / samples;
    default:
      return evolvedDensity_perPc3PerSubtype(track.starClass, point.subtype) * step_subtypes;
  }
}

interface Sample {
  readonly point: TrackPoint;
  readonly step_mag: number;
  readonly step_subtypes: number;
}

/** Points at even small steps along the track; each stands for the stretch of track around it. */
function resample(points: readonly TrackPoint[], colours: readonly Colour[]): readonly Sample[] {
  const samples: Sample[] = [];
  for (let i = 0; i + 1 < points.length; i++) {
    const from = points[i];
    const to = points[i + 1];
    const pieces = Math.max(1, Math.ceil(separation(from, to, colours)));
    for (let piece = 0; piece < pieces; piece++) {
      samples.push({
        point: between(from, to, (piece + 0.5) / pieces),
        step_mag: largestMagnitudeStep(from, to) / pieces,
        step_subtypes: Math.abs(to.subtype - from.subtype) / pieces,
      });
    }
  }
  return samples;
}

/** Distance of two points in units of the allowed steps. */
function separation(from: TrackPoint, to: TrackPoint, colours: readonly Colour[]): number {
  let colour = 0;
  for (const { blue, red } of colours) {
    const change =
      to.absMag[BAND_INDEX[blue]] -
      to.absMag[BAND_INDEX[red]] -
      (from.absMag[BAND_INDEX[blue]] - from.absMag[BAND_INDEX[red]]);
    if (!Number.isNaN(change)) colour = Math.max(colour, Math.abs(change));
  }
  return Math.max(colour / COLOUR_STEP_MAG, largestMagnitudeStep(from, to) / MAGNITUDE_STEP_MAG);
}

/** Change of M_V; where a track has no V, of the band it has. */
function largestMagnitudeStep(from: TrackPoint, to: TrackPoint): number {
  for (const band of ['V', 'G', 'J'] as const) {
    const change = Math.abs(to.absMag[BAND_INDEX[band]] - from.absMag[BAND_INDEX[band]]);
    if (!Number.isNaN(change)) return change;
  }
  return MAGNITUDE_STEP_MAG;
}

function between(from: TrackPoint, to: TrackPoint, share: number): TrackPoint {
  const mix = (a: number, b: number) => a + (b - a) * share;
  return {
    subtype: mix(from.subtype, to.subtype),
    // Teff in the logarithm: the scale runs over a factor of fifty.
    teff_K: Math.exp(mix(Math.log(from.teff_K), Math.log(to.teff_K))),
    bolometricCorrection_V: mix(from.bolometricCorrection_V, to.bolometricCorrection_V),
    absMag: from.absMag.map((value, band) => mix(value, to.absMag[band])),
  };
}

/** Straight lines across short interior gaps of each band, relative to V so that a colour is bridged. */
function bridgeGaps(points: readonly TrackPoint[]): readonly TrackPoint[] {
  const bridged = points.map(point => ({ ...point, absMag: point.absMag.slice() }));
  for (let band = 0; band < BAND_COUNT; band++) {
    let lastKnown = -1;
    for (let i = 0; i < bridged.length; i++) {
      if (Number.isNaN(bridged[i].absMag[band])) continue;
      if (lastKnown >= 0 && i - lastKnown > 1) bridge(bridged, band, lastKnown, i);
      lastKnown = i;
    }
  }
  return bridged;
}

function bridge(points: { subtype: number; absMag: Float64Array }[], band: number, from: number, to: number) {
  const width = points[to].subtype - points[from].subtype;
  if (!(width <= WIDEST_GAP_SUBTYPES)) return;
  const relative = (i: number) => points[i].absMag[band] - points[i].absMag[BAND_INDEX.V];
  const a = relative(from);
  const b = relative(to);
  for (let i = from + 1; i < to; i++) {
    const share = (points[i].subtype - points[from].subtype) / width;
    points[i].absMag[band] = points[i].absMag[BAND_INDEX.V] + a + (b - a) * share;
  }
}
