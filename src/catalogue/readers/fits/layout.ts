import { LIMITS } from '../../limits.js';
import { safeText } from '../../safe-text.js';
import type { ColumnHead } from '../../sheet.js';
import { type AsciiFormat, type BinaryFormat, parseAsciiFormat, parseBinaryFormat } from './formats.js';
import type { FitsHeader } from './header.js';
import type { FitsFault, FitsUnit } from './units.js';

/** One column of a table: where it stands in a row, and how its cells become values. */
export interface FitsColumn<Format> {
  readonly head: ColumnHead;
  /** First byte in the row. */
  readonly start: number;
  readonly format: Format;
  /** Value = zero + scale x what is stored. */
  readonly scale: number;
  readonly zero: number;
  /** What is stored where there is no value; '' when nothing is set aside for that. */
  readonly missing: string;
}

/** How a table is laid out: rows of equal length, one behind the other. */
export interface TableLayout<Format> {
  readonly unit: FitsUnit;
  readonly columns: readonly FitsColumn<Format>[];
  readonly rowBytes: number;
  /** Rows that are in the file whole, and rows that the header declares. */
  readonly rows: number;
  readonly declaredRows: number;
}

export type BinaryLayout = TableLayout<BinaryFormat> & { readonly kind: 'binary' };
export type AsciiLayout = TableLayout<AsciiFormat> & { readonly kind: 'ascii' };

/** Reads the layout of a table; `fileBytes` bounds its rows whatever the header declares. */
export function layoutOf(unit: FitsUnit, fileBytes: number): BinaryLayout | AsciiLayout | FitsFault {
  const { header } = unit;
  const fields = header.count('TFIELDS');
  const rowBytes = header.count('NAXIS1');
  const declaredRows = header.count('NAXIS2');
  if (Number.isNaN(fields + rowBytes + declaredRows)) {
    return { code: 'damaged', seen: 'a table without TFIELDS, NAXIS1 or NAXIS2 as whole numbers' };
  }
  if (fields > LIMITS.columns) {
    return { code: 'too-large', seen: `a table of ${fields} columns, at most ${LIMITS.columns} are read` };
  }
  const room = Math.max(0, fileBytes - unit.dataStart);
  const rows = rowBytes === 0 ? 0 : Math.min(declaredRows, Math.floor(room / rowBytes));
  const table = { unit, rowBytes, rows, declaredRows };
  if (unit.kind === 'ascii-table') {
    const columns = readColumns(
      header,
      fields,
      rowBytes,
      parseAsciiFormat,
      i => header.count(`TBCOL${i}`) - 1,
    );
    return 'code' in columns ? columns : { kind: 'ascii', ...table, columns };
  }
  const columns = readColumns(header, fields, rowBytes, parseBinaryFormat, (_, end) => end);
  return 'code' in columns ? columns : { kind: 'binary', ...table, columns };
}

/** `startOf` tells where column i begins, given where the one before it ended. */
function readColumns<Format extends { readonly bytes: number }>(
  header: FitsHeader,
  fields: number,
  rowBytes: number,
  parse: (text: string) => Format | undefined,
  startOf: (i: number, end: number) => number,
): FitsColumn<Format>[] | FitsFault {
  const columns: FitsColumn<Format>[] = [];
  let end = 0;
  let width = 0;
  for (let i = 1; i <= fields; i++) {
    const text = header.text(`TFORM${i}`);
    const format = parse(text);
    if (format === undefined) {
      return { code: 'damaged', seen: `TFORM${i} is '${text}', expected the format of a column` };
    }
    const start = startOf(i, end);
    if (!(start >= 0)) {
      return {
        code: 'damaged',
        seen: `TBCOL${i} is '${header.text(`TBCOL${i}`)}', expected the place of a column`,
      };
    }
    end = start + format.bytes;
    width += format.bytes;
    // The sum too: columns that lie over each other would cost more memory than the file has bytes.
    if (end > rowBytes || width > rowBytes) {
      const seen = `column ${i} ends at byte ${Math.max(end, width)} of a row, expected at most ${rowBytes} (NAXIS1)`;
      return { code: 'damaged', seen };
    }
    columns.push({ head: headOf(header, i), start, format, ...scaling(header, i) });
  }
  return columns;
}

function headOf(header: FitsHeader, i: number): ColumnHead {
  const ucd = header.text(`TUCD${i}`) || header.text(`TBUCD${i}`);
  return {
    name: safeText(header.text(`TTYPE${i}`).trim(), LIMITS.identifier_characters),
    unit: safeText(header.text(`TUNIT${i}`).trim(), LIMITS.unit_characters),
    ucd: safeText(ucd.trim()),
  };
}

function scaling(header: FitsHeader, i: number) {
  const scale = header.number(`TSCAL${i}`);
  const zero = header.number(`TZERO${i}`);
  return {
    scale: Number.isNaN(scale) ? 1 : scale,
    zero: Number.isNaN(zero) ? 0 : zero,
    missing: header.text(`TNULL${i}`).trim(),
  };
}
