import { Text } from 'ink';
import { type CellProps, Table } from 'ink-table';
import { createContext, type PropsWithChildren, useContext } from 'react';
import { asciiText } from '../pictures/ascii-only.js';
import type { Look } from '../terminal/look.js';

/** A row of ready-made texts by column title. `isCurrent` is no column: it marks the row of the cursor. */
export type TableRow = Readonly<Record<string, string | boolean>>;

const CurrentRow = createContext(false);

/** Colour of all the table's text; without one it is the terminal's own. */
const TableColour = createContext<{ color?: string }>({});

const RED = { color: '#d70000' };
const NO_COLOUR = {};

/** Only the red palette colours the table: nothing on the screen may spoil dark-adapted eyes. */
export function TableLook({ look, children }: PropsWithChildren<{ look: Look }>) {
  const isRed = look.palette === 'red' && look.depth !== 'none';
  return <TableColour.Provider value={isRed ? RED : NO_COLOUR}>{children}</TableColour.Provider>;
}

/** ink-table puts the index of a row at the end of its separator's key. */
const FIRST_SEPARATOR = /-0$/;

/**
 * The table of ink-table with one line below the heading instead of one between all rows, and with the row of the
 * cursor inverted. Give it the visible rows only, their texts padded to the column: it measures what it is given.
 */
export class StarTable extends Table<Record<string, string | boolean>> {
  constructor(props: Table<Record<string, string | boolean>>['props']) {
    super(props);
    const { separator, data } = this;
    this.separator = line => (FIRST_SEPARATOR.test(line.key) ? separator(line) : NOTHING);
    this.data = row => (
      <CurrentRow.Provider key={row.key} value={row.data.isCurrent === true}>
        {data(row)}
      </CurrentRow.Provider>
    );
  }
}

const NOTHING = <></>;

export function TableCell({ children }: CellProps) {
  const isCurrent = useContext(CurrentRow);
  return (
    <Text {...useContext(TableColour)} bold={isCurrent} inverse={isCurrent}>
      {children}
    </Text>
  );
}

export function TableHeading({ children }: PropsWithChildren) {
  return (
    <Text {...useContext(TableColour)} bold>
      {children}
    </Text>
  );
}

export function TableLine({ children }: PropsWithChildren) {
  return (
    <Text {...useContext(TableColour)} dimColor>
      {children}
    </Text>
  );
}

/** The lines of the table where the terminal shows ASCII only. */
export function AsciiTableLine({ children }: PropsWithChildren) {
  return <TableLine>{asciiText(String(children))}</TableLine>;
}
