import type { AssignedColumn } from '../columns/assign.js';
import { plainUnit } from '../columns/units.js';
import { type ParsedAngle, parseDec, parseRa } from '../coordinates/parse-angle.js';
import type { ProblemList } from '../problems.js';
import { missingWords } from '../readers/missing-words.js';
import type { Sheet, TextColumn } from '../sheet.js';
import type { NumberReader } from './numbers.js';

export interface Positions {
  readonly ra_deg: Float64Array;
  readonly dec_deg: Float64Array;
}

/**
 * Positions in degrees from number columns (degrees, hours or radians) or text columns (sexagesimal). A row
 * whose position cannot be is dropped and reported; an empty one stays NaN.
 */
export function readPositions(
  sheet: Sheet,
  ra: AssignedColumn | undefined,
  dec: AssignedColumn | undefined,
  numbers: NumberReader,
  kept: Uint8Array,
  problems: ProblemList,
): Positions {
  const read = (assigned: AssignedColumn | undefined, parse: (text: string) => ParsedAngle) =>
    assigned?.column.kind === 'text'
      ? readText(sheet, assigned.column, parse, kept, problems)
      : numbers.read(withAngleUnit(assigned), 'deg', () => true);
  const ra_deg = read(ra, parseRa);
  const dec_deg = read(dec, parseDec);
  for (let row = 0; row < sheet.rows; row++) {
    if (kept[row] === 0) continue;
    // A little below 0 or up to 360 is a matter of rounding; -999 and 720 are not.
    if (ra_deg[row] < 0 && ra_deg[row] > -180) ra_deg[row] += 360;
    if (ra_deg[row] === 360) ra_deg[row] = 0;
    const isWrong = ra_deg[row] < 0 || ra_deg[row] > 360 || Math.abs(dec_deg[row]) > 90;
    if (!isWrong) continue;
    kept[row] = 0;
    const seen = `RA ${ra_deg[row]} and Dec ${dec_deg[row]} degrees, expected 0 to 360 and -90 to 90`;
    problems.add('bad-position', sheet.lines[row], seen);
  }
  return { ra_deg, dec_deg };
}

/** A number in a column that is headed sexagesimal is a degree after all. */
function withAngleUnit(assigned: AssignedColumn | undefined): AssignedColumn | undefined {
  if (assigned === undefined || plainUnit(assigned.unit) !== 'sexagesimal') return assigned;
  return { ...assigned, unit: 'deg' };
}

function readText(
  sheet: Sheet,
  column: TextColumn,
  parse: (text: string) => ParsedAngle,
  kept: Uint8Array,
  problems: ProblemList,
): Float64Array {
  const missing = missingWords([]);
  const out = new Float64Array(sheet.rows).fill(Number.NaN);
  for (let row = 0; row < sheet.rows; row++) {
    const text = column.text(row).trim();
    if (missing.has(text.toLowerCase())) continue;
    const angle = parse(text);
    out[row] = angle.deg;
    if (angle.refused === '' || kept[row] === 0) continue;
    kept[row] = 0;
    problems.add('bad-position', sheet.lines[row], `${column.name} is '${text}': ${angle.refused}`);
  }
  return out;
}
