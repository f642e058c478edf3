import { Box } from 'ink';
import { type PropsWithChildren, useMemo } from 'react';
import { keyLine } from '../pictures/key-line.js';
import { statusLine } from '../pictures/status-line.js';
import type { ScreenState } from '../state/screen-state.js';
import { Panel } from './panel.js';

/** What every screen has: the status line above, the line of keys below. */
export function Frame({ state, children }: PropsWithChildren<{ state: ScreenState }>) {
  const { columns, look } = state;
  const status = useMemo(() => statusLine(state, columns), [state, columns]);
  const keys = useMemo(() => keyLine(state, columns), [state, columns]);
  return (
    <Box flexDirection="column" width={columns} height={state.rows}>
      <Panel grid={status} look={look} />
      <Box flexGrow={1} flexDirection="column">
        {children}
      </Box>
      <Panel grid={keys} look={look} />
    </Box>
  );
}
