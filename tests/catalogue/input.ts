import type { FrameReadings } from '../../src/catalogue/frame.js';
import type { InputSettings } from '../../src/catalogue/input-settings.js';
import { type ReadFrame, readFrame } from '../../src/catalogue/read-frame.js';
import { safeText } from '../../src/catalogue/safe-text.js';
import type { Band } from '../../src/science/bands.js';

export const INPUT: InputSettings = { columns: {}, band: undefined, matchRadius_arcsec: 1.5, missing: [] };

export function bytesOf(text: string): Uint8Array {
  return new TextEncoder().encode(text);
}

export function read(
  text: string,
  more: Partial<InputSettings> = {},
  name = 'frame.csv',
): Promise<ReadFrame> {
  return readFrame(name, bytesOf(text), { ...INPUT, ...more });
}

/** The frame of a text that has to be readable. */
export async function frameOf(
  text: string,
  more: Partial<InputSettings> = {},
  name = 'frame.csv',
): Promise<FrameReadings> {
  const { frame, problems } = await read(text, more, name);
  if (frame === undefined) throw new Error(problems.map(problem => problem.text).join('\n'));
  return frame;
}

export function codes(result: ReadFrame): string[] {
  return result.problems.map(problem => problem.code);
}

export function magsOf(frame: FrameReadings, band: Band): number[] {
  const column = frame.bands.find(candidate => candidate.band === band);
  return column === undefined ? [] : [...column.mag];
}

export function sigmasOf(frame: FrameReadings, band: Band): number[] {
  const column = frame.bands.find(candidate => candidate.band === band);
  return column === undefined ? [] : [...column.sigma_mag];
}

export interface TestRow {
  readonly id?: string;
  readonly ra: number;
  readonly dec: number;
  readonly mag?: number;
  readonly sigma?: number;
  readonly parallax?: number;
  readonly parallaxSigma?: number;
  readonly suspect?: boolean;
}

/** A frame made by hand; time_min counts minutes, NaN for a catalogue without a time. */
export function makeFrame(rows: readonly TestRow[], band: Band, time_min: number): FrameReadings {
  const column = (value: (row: TestRow) => number | undefined) =>
    Float64Array.from(rows, row => value(row) ?? Number.NaN);
  const nothing = column(() => undefined);
  return {
    facts: {
      name: safeText('made by hand'),
      mid_ms: 1_794_000_000_000 + time_min * 60_000,
      exposure_s: 60,
      fwhm_arcsec: Number.NaN,
      zeroPoint_mag: Number.NaN,
      sky_magPerArcsec2: Number.NaN,
      airmass: Number.NaN,
      object: safeText(''),
    },
    rows: rows.length,
    ids: rows.map(row => safeText(row.id ?? '')),
    hasIds: rows.some(row => row.id !== undefined),
    ra_deg: column(row => row.ra),
    dec_deg: column(row => row.dec),
    parallax_mas: column(row => row.parallax),
    parallax_sigma_mas: column(row => row.parallaxSigma),
    pmRa_masPerYear: nothing,
    pmDec_masPerYear: nothing,
    reddening_EBV: nothing,
    suspect: Uint8Array.from(rows, row => (row.suspect ? 1 : 0)),
    bands: rows.some(row => row.mag !== undefined)
      ? [{ band, mag: column(row => row.mag), sigma_mag: column(row => row.sigma ?? 0.01) }]
      : [],
  };
}
