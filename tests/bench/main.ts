import { ProblemList } from '../../src/catalogue/problems.js';
import { readFrame } from '../../src/catalogue/read-frame.js';
import { readFits } from '../../src/catalogue/readers/fits/read-fits.js';
import { safeText } from '../../src/catalogue/safe-text.js';
import type { ReadOptions } from '../../src/catalogue/sheet.js';
import { StarCatalogue } from '../../src/catalogue/stars.js';
import { buildModel, classifyStars, makeOddsColumns, type StarInputs } from '../../src/science/odds/index.js';
import { CellWriter } from '../../src/screens/terminal/cell-writer.js';
import { OPEN_FIELD } from '../support/star-inputs.js';
import { astropySeconds, fitsTable, READINGS } from './fits.js';
import { planOfSixty, windowsOfMany } from './night.js';
import { numpyStarsPerSecond } from './odds-reference.js';

/** Prints how long the heavy steps take on this machine, and ratios that mean something on any: npm run bench. */
const STARS = 100_000;

const FIELD = { ...OPEN_FIELD, extinction_AV: 0.1, extinctionSigma_AV: 0.05 };

async function timed<T>(work: () => T | Promise<T>): Promise<[T, number]> {
  const start = performance.now();
  const result = await work();
  return [result, (performance.now() - start) / 1000];
}

function line(name: string, seconds: number, count: number, unit: string): void {
  console.log(
    `${name.padEnd(46)} ${seconds.toFixed(2).padStart(7)} s ${Math.round(count / seconds)
      .toLocaleString('en')
      .padStart(12)} ${unit}/s`,
  );
}

/** A made-up field along the main sequence, with parallaxes of one S/N (0: none). */
function field(parallaxSnr: number): StarInputs {
  const column = (value: (i: number) => number) => Float64Array.from({ length: STARS }, (_, i) => value(i));
  const colour = (i: number) => (i % 97) / 60;
  const distance_pc = (i: number) => 150 + (i % 89) * 12;
  const v = (i: number) => 3 + colour(i) * 3.4 + 5 * Math.log10(distance_pc(i)) - 5;
  return {
    count: STARS,
    bands: ['B', 'V'],
    mag: [column(i => v(i) + colour(i)), column(v)],
    sigma_mag: [column(() => 0.015), column(() => 0.01)],
    parallax_mas: column(i => (parallaxSnr > 0 ? 1000 / distance_pc(i) : Number.NaN)),
    parallaxSigma_mas: column(i => (parallaxSnr > 0 ? 1000 / distance_pc(i) / parallaxSnr : Number.NaN)),
    pmRa_masPerYear: column(() => Number.NaN),
    pmDec_masPerYear: column(() => Number.NaN),
    reddening_EBV: column(() => Number.NaN),
  };
}

function table(): Uint8Array {
  const { mag, parallax_mas } = field(20);
  const rows = ['id,ra,dec,Bmag,e_Bmag,Vmag,e_Vmag,parallax,parallax_error,pmra,pmdec,flag'];
  for (let i = 0; i < STARS; i++) {
    const place = `${(100 + (i % 400) / 100).toFixed(6)},${(Math.floor(i / 400) / 100).toFixed(6)}`;
    rows.push(
      `s${i},${place},${mag[0][i].toFixed(4)},0.012,${mag[1][i].toFixed(4)},0.010,${parallax_mas[i].toFixed(4)},0.05,1.250,-3.115,0`,
    );
  }
  return new TextEncoder().encode(`${rows.join('\n')}\n`);
}

const model = buildModel(FIELD, { colour: { blue: 'B', red: 'V' }, band: 'V' }, ['B', 'V']);
const out = makeOddsColumns(STARS);
for (const [name, snr] of [
  ['parallax S/N 30', 30],
  ['parallax S/N 4', 4],
  ['no parallax', 0],
] as const) {
  const inputs = field(snr);
  // The second run is measured: a night's worker has long been warm.
  classifyStars(model, inputs, 0, STARS, out);
  const [, seconds] = await timed(() => classifyStars(model, inputs, 0, STARS, out));
  line(`class odds, B and V, ${name}`, seconds, STARS, 'stars');
  if (snr < 10) continue;
  const reference = numpyStarsPerSecond(model, inputs);
  console.log(
    typeof reference === 'string'
      ? `  ${reference}`
      : `  ${(STARS / seconds / reference).toFixed(1)} times as fast as the same sums in NumPy (${Math.round(reference).toLocaleString('en')} stars/s)`,
  );
}

const bytes = table();
const input = { columns: {}, band: undefined, matchRadius_arcsec: 1, missing: [] };
const [splitRows, splitSeconds] = await timed(() =>
  new TextDecoder()
    .decode(bytes)
    .split('\n')
    .map(row => row.split(',').map(Number)),
);
const [{ frame }, readSeconds] = await timed(() => readFrame('bench.csv', bytes, input));
line('reading a table, 12 columns', readSeconds, STARS, 'rows');
console.log(
  `  split and Number over the same bytes takes ${(splitSeconds / readSeconds).toFixed(1)} times as long (${splitRows.length} rows)`,
);

const FITS_ROWS = 500_000;
const fits = fitsTable(FITS_ROWS);
const everything: ReadOptions = { use: () => 'value', missing: [] };
let fitsSeconds = Number.POSITIVE_INFINITY;
for (let i = 0; i < READINGS; i++) {
  const [, seconds] = await timed(() => readFits(fits, everything, new ProblemList(safeText('bench.fits'))));
  fitsSeconds = Math.min(fitsSeconds, seconds);
}
line('reading a FITS table, 10 columns', fitsSeconds, FITS_ROWS, 'rows');
const astropy = astropySeconds(fits);
console.log(
  astropy === undefined
    ? '  not compared with Astropy, which is not installed here'
    : `  Astropy takes ${(astropy / fitsSeconds).toFixed(1)} times as long for the same number columns`,
);

const catalogue = new StarCatalogue(1);
if (frame !== undefined) {
  const [, first] = await timed(() => catalogue.absorb(frame, 0));
  line('first frame into stars', first, STARS, 'rows');
  const [, second] = await timed(() =>
    catalogue.absorb({ ...frame, ids: frame.ids.map(() => frame.facts.object), hasIds: false }, 1),
  );
  line('second frame matched by position', second, STARS, 'rows');
}

// The first round warms up.
planOfSixty(windowsOfMany(false));
const [tonight, windowSeconds] = await timed(() => windowsOfMany(false));
console.log(`windows of 2,000 stars: ${(1000 * windowSeconds).toFixed(0)} ms`);
const [, horizonSeconds] = await timed(() => windowsOfMany(true));
console.log(`windows of 2,000 stars over a horizon of 36 corners: ${(1000 * horizonSeconds).toFixed(0)} ms`);
const [placed, planSeconds] = await timed(() => planOfSixty(tonight));
console.log(`plan of 60 targets: ${(1000 * planSeconds).toFixed(0)} ms (${placed} placed)`);

const writer = new CellWriter(80, 24);
const screen = (row: number, clock: string) =>
  Array.from(
    { length: 24 },
    (_, y) => `${y === row ? '\x1b[7m' : ''}${'star '.repeat(15)}\x1b[0m${y === 0 ? clock : ''}`,
  ).join('\n');
const whole = writer.frame(screen(5, '02:41')).length;
console.log(
  `bytes: whole screen ${whole}, cursor one row down ${writer.frame(screen(6, '02:41')).length}, clock ${writer.frame(screen(6, '02:42')).length}`,
);
