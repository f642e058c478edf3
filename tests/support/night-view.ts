import { makeProblem } from '../../src/catalogue/problems.js';
import { safeText } from '../../src/catalogue/safe-text.js';
import type { ExposureSuggestion } from '../../src/follow/exposure/suggestion.js';
import { FLAG_CODES, type RaisedFlag } from '../../src/follow/flags/index.js';
import type { TargetWindow } from '../../src/follow/sky/window.js';
import type {
  FrameSummary,
  NightView,
  ShortlistEntry,
  StarColumns,
  StarDetail,
} from '../../src/night/view.js';
import { CLASS_INDEX, CLASSES, type StarClass } from '../../src/science/classes.js';
import { letterPositions, tracksInAxes } from '../../src/science/odds/index.js';
import { readTracks } from '../../src/science/tracks/index.js';
import { BV_AXES } from './star-inputs.js';

/** An invented night: 400 stars along the published sequences, five of them flagged, at 02:41 UT. */
export const NOW_MS = Date.UTC(2026, 10, 9, 2, 41, 20);
const MINUTE_MS = 60_000;

/** Deterministic uniform numbers (mulberry32). */
export function uniform(seed: number): () => number {
  let state = seed;
  return () => {
    state = (state + 0x6d2b79f5) | 0;
    let t = Math.imul(state ^ (state >>> 15), 1 | state);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 4_294_967_296;
  };
}

interface PlacedStar {
  readonly id: string;
  readonly colour: number;
  readonly absMag: number;
  readonly sigma: number;
  readonly starClass: StarClass;
  readonly odds: number;
  readonly subtype: number;
  readonly teff_K: number;
  readonly flag?: string;
}

const MODULUS = 6.2;
const tracks = readTracks();
export const TRACKS = tracksInAxes(tracks, BV_AXES);
const LETTERS = letterPositions(tracks, BV_AXES.colour);

/** Ballesteros 2012 (EPL 97, 34008), good enough for a test's temperatures. */
function teffOf(bv: number): number {
  return 4600 * (1 / (0.92 * bv + 1.7) + 1 / (0.92 * bv + 0.62));
}

function alongTrack(
  name: string,
  starClass: StarClass,
  count: number,
  random: () => number,
  bend: number,
  firstNumber: number,
): PlacedStar[] {
  const track = tracks.find(candidate => candidate.name === name)!;
  const line = TRACKS.find(candidate => candidate.name === name)!;
  return Array.from({ length: count }, (_, i) => {
    const place = random() ** bend * (line.colour.length * 0.82);
    const at = Math.floor(place);
    const colour = line.colour[at] + (random() - 0.5) * 0.06;
    return {
      id: `NS-${String(firstNumber + i).padStart(4, '0')}`,
      colour,
      absMag: line.absMag[at] + (random() + random() - 1) * 0.5,
      sigma: 0.08 + random() * 0.2,
      starClass,
      odds: 0.7 + random() * 0.3,
      subtype: track.points[at]?.subtype ?? Number.NaN,
      teff_K: teffOf(colour),
    };
  });
}

const FLAGGED: readonly PlacedStar[] = [
  flagged('NS-0501', 0.05, 11.3, 'WD', 0.99, Number.NaN, 16_500, 'white-dwarf'),
  flagged('NS-0502', -0.24, 4.4, 'sdOB', 0.94, Number.NaN, 29_000, 'hot-subdwarf'),
  flagged('J034512.30+241530.2', 0.42, 8.6, 'none', 0.87, 35, 7200, 'between-sequences'),
  flagged('NS-0504', 1.62, -4.6, 'Ib', 0.81, 62, 3500, 'supergiant'),
  flagged('NS-0505', 0.71, 5.3, 'V', 0.97, 46, 5500, 'faded'),
];

function flagged(
  id: string,
  colour: number,
  absMag: number,
  starClass: StarClass,
  odds: number,
  subtype: number,
  teff_K: number,
  flag: string,
): PlacedStar {
  return { id, colour, absMag, sigma: 0.15, starClass, odds, subtype, teff_K, flag };
}

export function starColumns(placed: readonly PlacedStar[], newestFrame: number): StarColumns {
  const column = (of: (star: PlacedStar, index: number) => number) => Float32Array.from(placed, of);
  return {
    count: placed.length,
    ids: placed.map(star => star.id),
    ra_deg: Float64Array.from(placed, (_, i) => 56.1 + ((i * 37) % 400) / 800),
    dec_deg: Float64Array.from(placed, (_, i) => 24.0 + ((i * 53) % 400) / 800),
    mag: column(star => star.absMag + MODULUS),
    colour: column(star => star.colour),
    absMag: column(star => star.absMag),
    absMagSigma: column(star => star.sigma),
    classIndex: Uint8Array.from(placed, star => CLASS_INDEX[star.starClass]),
    classOdds: column(star => star.odds),
    subtype: column(star => star.subtype),
    teff_K: column(star => star.teff_K),
    flagBits: Uint32Array.from(placed, star =>
      star.flag === undefined ? 0 : 2 ** FLAG_CODES.indexOf(star.flag),
    ),
    readings: Uint32Array.from(placed, (_, i) => 20 + (i % 5)),
    lastFrame: new Uint32Array(placed.length).fill(newestFrame),
  };
}

function ordinaryStars(): readonly PlacedStar[] {
  const random = uniform(11);
  return [
    ...alongTrack('dwarfs', 'V', 330, random, 0.6, 1),
    ...alongTrack('giants', 'III', 40, random, 0.4, 331),
    ...alongTrack('subgiants', 'IV', 18, random, 0.5, 371),
    ...alongTrack('white dwarfs DA', 'WD', 7, random, 1, 389),
  ];
}

export function exposure(setup: string, count: number, each_s: number): ExposureSuggestion {
  return {
    setup,
    predicted_mag: 17.4,
    predictedSigma_mag: 0.12,
    count,
    each_s,
    total_s: 180 + count * (each_s + 12),
    totalBright_s: 160 + count * (each_s * 0.85 + 12),
    totalFaint_s: 210 + count * (each_s * 1.25 + 12),
    snr: 52,
    limitedBy: 'sky',
    possible: true,
    caution: '',
  };
}

export const TOO_FAINT: ExposureSuggestion = {
  ...exposure('low-resolution spectrum', 0, Number.NaN),
  total_s: Number.NaN,
  totalBright_s: Number.NaN,
  totalFaint_s: Number.NaN,
  snr: Number.NaN,
  possible: false,
  limitedBy: 'too faint: S/N 11 at most in 90 min',
};

function openFor(minutes: number): TargetWindow {
  return {
    altitudeNow_deg: 51,
    airmassNow: 1.29,
    upFrom_ms: NOW_MS - 300 * MINUTE_MS,
    upUntil_ms: NOW_MS + (minutes + 18) * MINUTE_MS,
    startBy_ms: NOW_MS + minutes * MINUTE_MS,
    blockedBy: '',
  };
}

const LATER: TargetWindow = {
  altitudeNow_deg: 12,
  airmassNow: 4.6,
  upFrom_ms: NOW_MS + 47 * MINUTE_MS,
  upUntil_ms: NOW_MS + 190 * MINUTE_MS,
  startBy_ms: NOW_MS + 171 * MINUTE_MS,
  blockedBy: '',
};

const BLOCKED: TargetWindow = {
  altitudeNow_deg: 18,
  airmassNow: 3.2,
  upFrom_ms: Number.NaN,
  upUntil_ms: Number.NaN,
  startBy_ms: Number.NaN,
  blockedBy: 'below 30 deg since 02:12 UT',
};

const REASONS: readonly RaisedFlag[] = [
  {
    code: 'white-dwarf',
    odds: 0.99,
    because:
      'M_V +11.3 at B-V 0.05 lies 9.9 mag below the dwarfs; white dwarf odds 0.99; parallax 5.71 ± 0.08 mas',
  },
  {
    code: 'hot-subdwarf',
    odds: 0.94,
    because:
      'M_V +4.4 at B-V -0.24 lies 6.5 mag below the dwarfs; hot subdwarf odds 0.94; parallax 5.8 ± 0.1 mas',
  },
  {
    code: 'between-sequences',
    odds: 0.87,
    because:
      'M_V +8.6 at B-V 0.42 lies 5.2 mag below the dwarfs and 4.4 mag above the white dwarfs; odds 0.87 that it is neither: a white dwarf with a cool companion would lie here; parallax 5.6 ± 0.2 mas',
  },
  {
    code: 'supergiant',
    odds: 0.81,
    because:
      'M_V -4.6 at B-V 1.62 lies 12.8 mag above the dwarfs; supergiant odds 0.81; parallax 0.11 ± 0.04 mas',
  },
  {
    code: 'faded',
    odds: 1,
    because: '0.42 ± 0.03 mag fainter in V than at 22:05 UT (14 sigma, 12 readings to 02:36 UT)',
  },
];

const TYPES = ['D3 WD 0.99', 'sdB sdOB 0.94', 'fits no class 0.87', 'M2 Ib/II 0.55/0.26', 'G6 V 0.97'];
const EXPOSURES = [
  [exposure('imager V', 3, 240), TOO_FAINT],
  [exposure('imager V', 3, 25), exposure('low-resolution spectrum', 4, 600)],
  [exposure('imager V', 5, 90), TOO_FAINT],
  [exposure('imager V', 3, 0.5), exposure('low-resolution spectrum', 1, 120)],
  [exposure('imager V', 12, 300), TOO_FAINT],
];
const WINDOWS = [openFor(61), openFor(19), LATER, openFor(144), BLOCKED];

/** The invented night; `frames` frames of it, the last two of which brought the flagged stars numbers 4 and 5. */
export function nightView(revision = 7, frames = 24): NightView {
  const ordinary = ordinaryStars();
  const placed = [...ordinary, ...FLAGGED];
  return {
    revision,
    time_ms: NOW_MS,
    field: 'Northern strip 4',
    duplicates: 1,
    frames: Array.from({ length: frames }, (_, index) => frame(index)),
    problems: PROBLEMS,
    axes: BV_AXES,
    stars: starColumns(placed, frames - 1),
    shortlist: FLAGGED.map((star, i): ShortlistEntry => {
      return {
        star: ordinary.length + i,
        id: star.id,
        spectralType: TYPES[i],
        flags: [REASONS[i]],
        cautions: i === 3 ? ['its parallax is only 2.8 sigma: a better one would settle it'] : [],
        merit: 10 - i,
        exposures: EXPOSURES[i],
        window: WINDOWS[i],
        firstFrame: i,
      };
    }),
    tracks: TRACKS,
    letters: LETTERS,
    conditions: {
      seeing_arcsec: 1.6,
      seeingMeasured: true,
      cloud_mag: 0.12,
      sky_magPerArcsec2: 21.2,
      sunAltitude_deg: -43,
      moonAltitude_deg: -8,
      moonIllumination: 0.62,
      darkFrom_ms: Date.UTC(2026, 10, 8, 17, 48),
      darkUntil_ms: Date.UTC(2026, 10, 9, 5, 12),
      darkWords: 'dark 17:48-05:12 UT',
    },
  };
}

function frame(index: number): FrameSummary {
  return {
    index,
    name: `field_${String(index + 1).padStart(3, '0')}_${index % 2 === 0 ? 'B' : 'V'}.csv`,
    mid_ms: NOW_MS - (24 - index) * 11 * MINUTE_MS,
    bands: [index % 2 === 0 ? 'B' : 'V'],
    rows: 396 + (index % 5),
    fwhm_arcsec: 1.7 + (index % 4) * 0.1,
    airmass: 1.12 + (index % 8) * 0.03,
    sky_magPerArcsec2: 21.2 - (index % 3) * 0.1,
    zeroPoint_mag: 23.41 - (index % 6) * 0.02,
  };
}

const PROBLEMS = [
  makeProblem('row-width', safeText('field_007_B.csv'), 212, '7 cells where the header has 12'),
  makeProblem('bad-number', safeText('field_011_B.csv'), 48, "'nul' in column mag, expected a number"),
  makeProblem('no-header', safeText('focus_run.csv'), 0, 'the first line holds numbers only'),
];

/** Everything about the first flagged star. */
export function starDetail(view: NightView, place = 0): StarDetail {
  const entry = view.shortlist[place];
  const { stars } = view;
  const times = Float64Array.from({ length: 12 }, (_, i) => NOW_MS - (24 - 2 * i) * 11 * MINUTE_MS);
  return {
    star: entry.star,
    id: entry.id,
    ra_deg: stars.ra_deg[entry.star],
    dec_deg: stars.dec_deg[entry.star],
    spectralType: entry.spectralType,
    luminosityClass: CLASSES[stars.classIndex[entry.star]],
    odds: { ...NO_ODDS, WD: 0.987, sdOB: 0.009, sd: 0.001, none: 0.003 },
    mags: [
      { band: 'B', mag: 17.55, sigma_mag: 0.02, readings: 12, scatter_mag: 0.024 },
      { band: 'V', mag: 17.5, sigma_mag: 0.015, readings: 12, scatter_mag: 0.018 },
    ],
    absMag: { band: 'V', value: 11.3, sigma: 0.15 },
    teff_K: 16_500,
    teffSigma_K: 900,
    distance_pc: 175.1,
    distanceLow_pc: 172.7,
    distanceHigh_pc: 177.6,
    extinction_AV: 0.08,
    extinctionSigma_AV: 0.04,
    evidence: [
      {
        starClass: 'WD',
        odds: 0.99,
        subtype: Number.NaN,
        teff_K: 16_500,
        modulus_mag: 6.2,
        extinction_AV: 0.08,
        misfits: [
          { band: 'B', sigma: 0.3 },
          { band: 'V', sigma: -0.4 },
        ],
      },
      {
        starClass: 'sdOB',
        odds: 0.01,
        subtype: 12,
        teff_K: 24_000,
        modulus_mag: 6.3,
        extinction_AV: 0.31,
        misfits: [
          { band: 'B', sigma: 4.1 },
          { band: 'V', sigma: -3.9 },
        ],
      },
    ],
    logLuminosity: -1.62,
    logLuminositySigma: 0.05,
    parallax_mas: 5.71,
    parallaxSigma_mas: 0.08,
    flags: entry.flags,
    cautions: ['its proper motion is not known: a second epoch would confirm it'],
    exposures: entry.exposures,
    window: entry.window,
    lightCurves: [
      {
        band: 'V',
        time_ms: times,
        mag: Float64Array.from(times, (_, i) => 17.48 + 0.06 * Math.sin(i * 1.1) + (i > 8 ? 0.1 : 0)),
        sigma_mag: new Float64Array(times.length).fill(0.02),
      },
    ],
  };
}

const NO_ODDS = Object.fromEntries(CLASSES.map(name => [name, 0])) as Record<StarClass, number>;

/** A night with nothing but a number of stars spread over the dwarf sequence, for the large cases. */
export function crowdedView(count: number): NightView {
  const random = uniform(5);
  const placed = alongTrack('dwarfs', 'V', count, random, 0.6, 1);
  return { ...nightView(), stars: starColumns(placed, 0), shortlist: [] };
}
