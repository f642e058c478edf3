import { Text } from 'ink';
import { type ReactNode, useSyncExternalStore } from 'react';
import type { ScreenState } from './state/screen-state.js';
import type { ScreenStore } from './state/store.js';
import { FieldScreen } from './views/field-screen.js';
import { fitsScreen, LEAST_COLUMNS, LEAST_ROWS } from './views/layout.js';
import { PageScreen } from './views/page-screen.js';
import { StarsScreen } from './views/stars-screen.js';

/** All screens; shows what the store holds. Keys reach the store from the terminal session, not from here. */
export function App({ store }: { store: ScreenStore }) {
  const state = useSyncExternalStore(store.subscribe, store.getState);
  if (!fitsScreen(state.columns, state.rows)) return <TooSmall state={state} />;
  // A new size builds the screen anew: a canvas learns its place only when it is drawn.
  const size = `${state.columns}x${state.rows}`;
  switch (state.screen) {
    case 'field':
      return <FieldScreen key={size} state={state} />;
    case 'stars':
      return <StarsScreen key={size} state={state} />;
    default:
      return <PageScreen key={size} state={state} screen={state.screen} />;
  }
}

/** What the terminal session is given to draw. */
export function screensOf(store: ScreenStore): ReactNode {
  return <App store={store} />;
}

function TooSmall({ state }: { state: ScreenState }) {
  const { columns, rows } = state;
  return (
    <Text wrap="truncate">
      {`needs ${LEAST_COLUMNS} x ${LEAST_ROWS} cells, has ${columns} x ${rows}; Ctrl-C quits`}
    </Text>
  );
}
