import { BANDS, type Band } from '../../science/bands.js';
import type { Assignment } from '../columns/assign.js';
import { COLOURS } from '../columns/meanings.js';
import type { BandColumn } from '../frame.js';
import { isColour, isMagnitude, isMagnitudeError, isPositive, type NumberReader } from './numbers.js';

/** d(mag) per relative error of the flux: 2.5 / ln 10 (Pogson 1856). */
const MAG_PER_RELATIVE_ERROR = 2.5 / Math.LN10;

/** Magnitudes of each band that has a column, and of those that follow from a colour; errors as given, else NaN. */
export function readBandColumns(columns: Assignment, numbers: NumberReader): BandColumn[] {
  const bands: BandColumn[] = [];
  for (const band of BANDS) {
    const assigned = columns.get(`mag.${band}`);
    if (assigned === undefined) continue;
    const mag = numbers.read(assigned, 'mag', isMagnitude);
    bands.push({ band, mag, sigma_mag: readErrors(columns, band, numbers) });
  }
  return addFromColours(bands, columns, numbers);
}

function readErrors(columns: Assignment, band: Band, numbers: NumberReader): Float64Array {
  const given = columns.get(`mag_error.${band}`);
  const ratio = columns.get(`flux_over_error.${band}`);
  if (given !== undefined || ratio === undefined) return numbers.read(given, 'mag', isMagnitudeError);
  return numbers.read({ ...ratio, unit: '' }, 'mag', isPositive).map(value => MAG_PER_RELATIVE_ERROR / value);
}

/** B from B-V and V, and so on, until no colour gives another band. */
function addFromColours(
  given: readonly BandColumn[],
  columns: Assignment,
  numbers: NumberReader,
): BandColumn[] {
  const bands = [...given];
  const find = (band: Band) => bands.find(candidate => candidate.band === band);
  for (let before = -1; before !== bands.length; ) {
    before = bands.length;
    for (const [blue, red] of COLOURS) {
      const assigned = columns.get(`colour.${blue}-${red}`);
      if (assigned === undefined) continue;
      const known = find(red) ?? find(blue);
      if (known === undefined || (find(red) !== undefined && find(blue) !== undefined)) continue;
      const colour = numbers.read(assigned, 'mag', isColour);
      const errors = numbers.read(columns.get(`colour_error.${blue}-${red}`), 'mag', isMagnitudeError);
      const [band, sign] = known.band === red ? [blue, 1] : [red, -1];
      bands.push({
        band,
        mag: colour.map((value, row) => known.mag[row] + sign * value),
        sigma_mag: errors.map((value, row) => partnerError(known.sigma_mag[row], value)),
      });
    }
  }
  return bands;
}

/**
 * Error of the second band such that both together give the colour its stated error; equal to the first band's
 * where the colour has none. A colour better than its band still leaves half of its error.
 */
function partnerError(band_mag: number, colour_mag: number): number {
  if (Number.isNaN(colour_mag)) return band_mag;
  if (Number.isNaN(band_mag)) return colour_mag;
  return Math.sqrt(Math.max(colour_mag ** 2 - band_mag ** 2, (colour_mag / 2) ** 2));
}
