import { Random } from '../../src/science/random.js';
import { type Exposure, exposures, frameTable } from './frames.js';
import { hiddenStars } from './hidden.js';
import { backgroundStars, clusterStars, ordinaryNodes } from './populations.js';
import { SCENARIO } from './scenario.js';
import type { DemoStar } from './star.js';

interface Arrival {
  readonly file: string;
  readonly arrives: string;
  /** For a file that is written slowly: how much of it is there, and when. */
  readonly pieces?: readonly { readonly bytes: number; readonly arrives: string }[];
}

const ASTROMETRY = 'night/00-astrometry.csv';
const BROKEN_AFTER = 9;
const DUPLICATED = 14;
const IN_PIECES = 21;

/** Every file of the demo with its content, the same for ever. */
export function makeDemo(): Map<string, string> {
  const random = new Random(SCENARIO.seed);
  const nodes = ordinaryNodes();
  const hidden = hiddenStars(random);
  const stars = [
    ...hidden.map(({ star }) => star),
    ...clusterStars(nodes, random),
    ...backgroundStars(nodes, random),
  ].sort((a, b) => a.ra_deg - b.ra_deg);
  const night = exposures(random);
  const files = new Map<string, string>();
  const arrivals: Arrival[] = [];

  files.set(ASTROMETRY, astrometryTable(stars, random));
  arrivals.push({ file: ASTROMETRY, arrives: iso(night[0].mid_ms - 300_000) });
  for (const exposure of night) {
    const name = frameName(exposure);
    const table = frameTable(exposure, stars, random);
    const arrives_ms = exposure.mid_ms + exposure.exposure_s * 500 + SCENARIO.night.reduction_s * 1000;
    files.set(name, table);
    arrivals.push(
      exposure.number === IN_PIECES
        ? inPieces(name, table, arrives_ms)
        : { file: name, arrives: iso(arrives_ms) },
    );
    if (exposure.number === BROKEN_AFTER) {
      files.set('night/frame-09-B-crashed.csv', brokenTable(table));
      arrivals.push({ file: 'night/frame-09-B-crashed.csv', arrives: iso(arrives_ms + 120_000) });
    }
    if (exposure.number === DUPLICATED) {
      files.set('night/frame-14-V-again.csv', table);
      arrivals.push({ file: 'night/frame-14-V-again.csv', arrives: iso(arrives_ms + 180_000) });
    }
  }
  const last = night[night.length - 1];
  files.set(
    'timetable.json',
    json({
      about: 'Invented night: when each file of demo-run/night arrives.',
      profile: 'demo',
      begins: iso(night[0].mid_ms - 420_000),
      ends: iso(last.mid_ms + 600_000),
      files: arrivals,
    }),
  );
  files.set(
    'truth.json',
    json({
      about: 'Invented stars hidden in the demo night, and the flag that should find each.',
      stars: hidden.map(({ kind, flag, star }) => ({
        id: identifier(stars.indexOf(star)),
        kind,
        flag,
        ra_deg: Number(star.ra_deg.toFixed(5)),
        dec_deg: Number(star.dec_deg.toFixed(5)),
        V: Number(star.V.toFixed(2)),
        B_V: Number((star.B - star.V).toFixed(2)),
      })),
      files: {
        broken: 'night/frame-09-B-crashed.csv',
        duplicate: 'night/frame-14-V-again.csv',
        inPieces: arrivals.find(arrival => arrival.pieces !== undefined)?.file,
      },
    }),
  );
  return files;
}

function frameName(exposure: Exposure): string {
  return `night/frame-${String(exposure.number).padStart(2, '0')}-${exposure.band}.csv`;
}

/** Positions, parallaxes and proper motions, with errors that grow towards faint stars as Gaia's do. */
function astrometryTable(stars: readonly DemoStar[], random: Random): string {
  const lines = ['# invented data, see demo-run/README.md', 'id,ra,dec,parallax,parallax_error,pmra,pmdec'];
  stars.forEach((star, i) => {
    const sigma = star.V < 14.5 ? 0.018 : 0.018 * 10 ** (0.21 * (star.V - 14.5));
    const cells = [
      identifier(i),
      star.ra_deg.toFixed(6),
      star.dec_deg.toFixed(6),
      (1000 / star.distance_pc + random.normal(0, sigma)).toFixed(3),
      sigma.toFixed(3),
      (star.pmRa_masPerYear + random.normal(0, sigma)).toFixed(2),
      (star.pmDec_masPerYear + random.normal(0, sigma)).toFixed(2),
    ];
    lines.push(cells.join(','));
  });
  return `${lines.join('\n')}\n`;
}

function identifier(place: number): string {
  return `IC1-${String(place + 1).padStart(4, '0')}`;
}

/** What a reduction leaves behind when it dies: a good beginning, half a row, then rubbish. */
function brokenTable(table: string): string {
  return `${table.slice(0, 900)}\u0000\u0001\u0000\ufffd#$%\u0000\u0000`;
}

/** A slow writer: cut in the middle of rows, minutes apart. */
function inPieces(file: string, table: string, arrives_ms: number): Arrival {
  const bytes = table.length;
  return {
    file,
    arrives: iso(arrives_ms),
    pieces: [
      { bytes: Math.floor(bytes * 0.4) + 3, arrives: iso(arrives_ms) },
      { bytes: Math.floor(bytes * 0.8) + 5, arrives: iso(arrives_ms + 120_000) },
      { bytes, arrives: iso(arrives_ms + 240_000) },
    ],
  };
}

function iso(time_ms: number): string {
  return new Date(time_ms).toISOString().replace('.000Z', 'Z');
}

function json(value: unknown): string {
  return `${JSON.stringify(value, null, 2)}\n`;
}
