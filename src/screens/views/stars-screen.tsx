import { Box } from 'ink';
import { useMemo } from 'react';
import { asciiText } from '../pictures/ascii-only.js';
import { noticePicture } from '../pictures/notice.js';
import { cellText, starColumns } from '../pictures/star-columns.js';
import { tableChoice, tableReason } from '../pictures/table-lines.js';
import { visibleRows } from '../state/navigation.js';
import type { ScreenState } from '../state/screen-state.js';
import { currentStar } from '../state/selection.js';
import { Frame } from './frame.js';
import { tableHeight } from './layout.js';
import { Panel } from './panel.js';
import {
  AsciiTableLine,
  StarTable,
  TableCell,
  TableHeading,
  TableLine,
  TableLook,
  type TableRow,
} from './star-table.js';

/** Lines of the table besides its rows. */
const TABLE_LINES = 4;

/** All stars as a table: order, search, and why the star of the cursor is flagged. */
export function StarsScreen({ state }: { state: ScreenState }) {
  const { columns, view, table, look } = state;
  const current = currentStar(state);
  const choice = useMemo(() => tableChoice(table, view?.stars.count ?? 0, columns), [table, view, columns]);
  const reason = useMemo(
    () => tableReason(view, current, columns, look.glyphs),
    [view, current, columns, look],
  );
  return (
    <Frame state={state}>
      <Panel grid={choice} look={look} />
      <Box flexDirection="column" height={tableHeight(state.rows) + TABLE_LINES}>
        <TableBody state={state} current={current} />
      </Box>
      <Panel grid={reason} look={look} />
    </Frame>
  );
}

function TableBody({ state, current }: { state: ScreenState; current: number }) {
  const { columns, view, look } = state;
  const rows = visibleRows(state);
  if (view === undefined || rows.length === 0) {
    const text = view === undefined || view.stars.count === 0 ? 'no stars yet' : 'no star matches';
    return <Panel grid={noticePicture([text], columns, 1)} look={look} />;
  }
  const shown = starColumns(view, columns);
  const plain = look.glyphs === 'ascii';
  const data = Array.from(rows, (star): TableRow => {
    const cells = shown.map(column => {
      const text = cellText(column, view, star);
      return [column.title, plain ? asciiText(text) : text];
    });
    return { ...Object.fromEntries(cells), isCurrent: star === current };
  });
  return (
    <TableLook look={look}>
      <StarTable
        data={data}
        columns={shown.map(column => ({ key: column.title, align: column.alignRight ? 'right' : 'left' }))}
        cell={TableCell}
        header={TableHeading}
        skeleton={plain ? AsciiTableLine : TableLine}
      />
    </TableLook>
  );
}
