import { BANDS, type Band } from '../../science/bands.js';
import type { BandColumn } from '../frame.js';
import type { ProblemList } from '../problems.js';
import type { TextColumn } from '../sheet.js';
import { type BandNames, type BandReading, wording } from './band-name.js';
import { type Draft, starKey } from './draft.js';

/**
 * Turns a table with a row per star and band into one with a row per star: the first row of a star stays and
 * takes the magnitudes of the others. Rows of unknown bands go; of two readings in one band the first stays.
 */
export function gatherBands(
  draft: Draft,
  bandColumn: TextColumn,
  mag: Float64Array,
  sigma_mag: Float64Array,
  names: BandNames,
  problems: ProblemList,
): readonly BandColumn[] {
  const readings = new Map<string, BandReading>();
  const firstRows = new Map<string, number>();
  const columns = new Map<Band, BandColumn>();
  for (let row = 0; row < draft.rows; row++) {
    if (draft.kept[row] === 0) continue;
    const name = bandColumn.text(row).trim();
    const reading = readings.get(name) ?? names.read(name);
    readings.set(name, reading);
    if (reading.band === undefined) {
      draft.kept[row] = 0;
      problems.add(
        'unknown-band',
        draft.lines[row],
        wording(`${bandColumn.name} is '${name}'`, reading),
        'row',
      );
      continue;
    }
    const key = starKey(draft, row);
    const first = firstRows.get(key) ?? row;
    firstRows.set(key, first);
    if (first !== row) {
      draft.kept[row] = 0;
      draft.suspect[first] |= draft.suspect[row];
    }
    const column = columns.get(reading.band) ?? emptyColumn(reading.band, draft.rows);
    columns.set(reading.band, column);
    if (!Number.isNaN(column.mag[first])) {
      problems.add('repeated-star', draft.lines[row], `a second reading of '${key}' in ${reading.band}`);
      continue;
    }
    column.mag[first] = mag[row];
    column.sigma_mag[first] = sigma_mag[row];
  }
  return BANDS.flatMap(band => columns.get(band) ?? []);
}

function emptyColumn(band: Band, rows: number): BandColumn {
  const nothing = () => new Float64Array(rows).fill(Number.NaN);
  return { band, mag: nothing(), sigma_mag: nothing() };
}
