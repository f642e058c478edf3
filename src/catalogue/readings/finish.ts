import type { BandColumn, FrameFacts, FrameReadings } from '../frame.js';
import type { ProblemList } from '../problems.js';
import type { SafeText } from '../safe-text.js';
import type { Draft } from './draft.js';

/** Error of a magnitude that comes without one. */
export const ASSUMED_ERROR_MAG = 0.05;

/** Gives magnitudes without an error the assumed one, and says so once a band. */
export function assumeErrors(bands: readonly BandColumn[], kept: Uint8Array, problems: ProblemList): void {
  for (const { band, mag, sigma_mag } of bands) {
    let magnitudes = 0;
    let without = 0;
    for (let row = 0; row < mag.length; row++) {
      if (kept[row] === 0 || Number.isNaN(mag[row])) continue;
      magnitudes++;
      if (!Number.isNaN(sigma_mag[row])) continue;
      sigma_mag[row] = ASSUMED_ERROR_MAG;
      without++;
    }
    if (without === 0) continue;
    const share = without === magnitudes ? 'no errors' : `${without} of ${magnitudes} without an error`;
    problems.add('no-errors', 0, `${band}: ${share}; ${ASSUMED_ERROR_MAG} mag is assumed`);
  }
}

/** Drops the rows that go, and those that say nothing of their star. */
export function finish(draft: Draft, facts: FrameFacts): FrameReadings {
  const rows = keptRows(draft);
  const ids = new Array<SafeText>(rows.length);
  const suspect = new Uint8Array(rows.length);
  for (let i = 0; i < rows.length; i++) {
    ids[i] = draft.ids[rows[i]];
    suspect[i] = draft.suspect[rows[i]];
  }
  return {
    facts,
    rows: rows.length,
    ids,
    hasIds: draft.hasIds,
    ra_deg: pick(draft.ra_deg, rows),
    dec_deg: pick(draft.dec_deg, rows),
    parallax_mas: pick(draft.parallax_mas, rows),
    parallax_sigma_mas: pick(draft.parallax_sigma_mas, rows),
    pmRa_masPerYear: pick(draft.pmRa_masPerYear, rows),
    pmDec_masPerYear: pick(draft.pmDec_masPerYear, rows),
    reddening_EBV: pick(draft.reddening_EBV, rows),
    suspect,
    bands: draft.bands
      .map(({ band, mag, sigma_mag }) => ({ band, mag: pick(mag, rows), sigma_mag: pick(sigma_mag, rows) }))
      .filter(({ mag }) => mag.some(value => !Number.isNaN(value))),
  };
}

function keptRows(draft: Draft): Uint32Array {
  const telling = [
    ...draft.bands.map(({ mag }) => mag),
    draft.parallax_mas,
    draft.pmRa_masPerYear,
    draft.reddening_EBV,
  ];
  const saysSomething = new Uint8Array(draft.rows);
  for (const column of telling) {
    for (let row = 0; row < draft.rows; row++) if (!Number.isNaN(column[row])) saysSomething[row] = 1;
  }
  const rows = new Uint32Array(draft.rows);
  let count = 0;
  for (let row = 0; row < draft.rows; row++) {
    if (draft.kept[row] === 1 && saysSomething[row] === 1) rows[count++] = row;
  }
  return rows.subarray(0, count);
}

function pick(column: Float64Array, rows: Uint32Array): Float64Array {
  const out = new Float64Array(rows.length);
  for (let i = 0; i < out.length; i++) out[i] = column[rows[i]];
  return out;
}
