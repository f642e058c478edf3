import type { AssignedColumn } from '../columns/assign.js';
import { acceptedUnits, type TargetUnit, unitFactor } from '../columns/units.js';
import type { ProblemList } from '../problems.js';
import type { Sheet } from '../sheet.js';
import { UNREADABLE } from '../sheet.js';

/** Takes number columns out of a sheet: units converted, fillers taken out, unreadable cells reported. */
export class NumberReader {
  private readonly fillers: ReadonlySet<number>;

  constructor(
    private readonly sheet: Sheet,
    /** Set to 0 for rows that have to go. */
    private readonly kept: Uint8Array,
    missing: readonly string[],
    private readonly problems: ProblemList,
  ) {
    this.fillers = new Set(missing.filter(word => word.trim() !== '').map(Number));
  }

  /** All NaN where there is no such column, or none that can be used. */
  read(
    assigned: AssignedColumn | undefined,
    target: TargetUnit,
    isValid: (value: number) => boolean,
  ): Float64Array {
    const out = new Float64Array(this.sheet.rows).fill(Number.NaN);
    if (assigned === undefined) return out;
    const { column, unit } = assigned;
    if (column.kind === 'text') {
      const cell = firstText(column.text, this.sheet.rows);
      this.problems.add('text-column', 0, `'${column.name}' should hold numbers, but begins with '${cell}'`);
      return out;
    }
    const factor = unitFactor(unit, target);
    if (factor === undefined) {
      const seen = `'${column.name}' is in '${unit}', expected one of ${acceptedUnits(target)}`;
      this.problems.add('unknown-unit', 0, seen);
      return out;
    }
    const hasFillers = this.fillers.size > 0;
    for (let row = 0; row < out.length; row++) {
      const raw = column.values[row];
      if (raw === UNREADABLE) this.drop(row, column.name);
      else if (isValid(raw * factor) && !(hasFillers && this.fillers.has(raw))) out[row] = raw * factor;
    }
    return out;
  }

  private drop(row: number, column: string): void {
    if (this.kept[row] === 0) return;
    this.kept[row] = 0;
    const cell = this.sheet.unreadable.find(
      candidate => candidate.row === row && candidate.column === column,
    );
    const seen = cell === undefined ? '' : ` '${cell.seen}'`;
    this.problems.add(
      'bad-number',
      this.sheet.lines[row],
      `${column} is${seen || ' unreadable'}, expected a number`,
    );
  }
}

function firstText(text: (row: number) => string, rows: number): string {
  for (let row = 0; row < rows; row++) if (text(row).trim() !== '') return text(row);
  return '';
}

/** No star is this faint or bright: 99, 99.99, -999 and the like are fillers. */
export function isMagnitude(value: number): boolean {
  return Math.abs(value) < 50;
}

/** No colour is this large; 9.99 is a filler too. */
export function isColour(value: number): boolean {
  return Math.abs(value) < 9;
}

/** Errors of 0 and of 9 and more say "not known". */
export function isMagnitudeError(value: number): boolean {
  return value > 0 && value < 9;
}

/** -99, 999, -9999.9: nothing but nines, and too large to be one by chance. */
export function isNoFiller(value: number): boolean {
  return value > -99 && value < 999 ? true : !/^-?99+(\.9+)?$/.test(String(value));
}

export function isPositive(value: number): boolean {
  return value > 0 && isNoFiller(value);
}
