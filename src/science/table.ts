/**
 * Reads the published tables that the program carries: CSV with '#' comment lines, a header line, quoted
 * cells. A blank cell means "not given" and reads as NaN.
 */
export interface Table {
  readonly columns: readonly string[];
  readonly rows: readonly Row[];
}

export class Row {
  constructor(private readonly cells: ReadonlyMap<string, string>) {}

  text(column: string): string {
    const cell = this.cells.get(column);
    if (cell === undefined) throw new Error(`the table has no column ${column}`);
    return cell;
  }

  /** NaN where the cell is blank; a cell that is neither blank nor a number is a mistake in the table. */
  number(column: string): number {
    const cell = this.text(column).trim();
    if (cell === '') return Number.NaN;
    const value = Number(cell);
    if (Number.isNaN(value)) throw new Error(`${column}: '${cell}' is not a number`);
    return value;
  }
}

export function parseTable(text: string): Table {
  const lines = text.split(/\r?\n/).filter(line => line !== '' && !line.startsWith('#'));
  const [header, ...body] = lines;
  if (header === undefined) throw new Error('the table is empty');
  const columns = splitCells(header);
  const rows = body.map(line => {
    const cells = splitCells(line);
    return new Row(new Map(columns.map((column, i) => [column, cells[i] ?? ''])));
  });
  return { columns, rows };
}

function splitCells(line: string): string[] {
  const cells: string[] = [];
  let cell = '';
  let quoted = false;
  for (let i = 0; i < line.length; i++) {
    const character = line[i];
    if (quoted) {
      if (character !== '"') cell += character;
      else if (line[i + 1] === '"') {
        cell += '"';
        i++;
      } else quoted = false;
    } else if (character === '"') quoted = true;
    else if (character === ',') {
      cells.push(cell);
      cell = '';
    } else cell += character;
  }
  cells.push(cell);
  return cells;
}
