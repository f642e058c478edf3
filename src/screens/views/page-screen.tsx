import { useMemo } from 'react';
import { noticePicture } from '../pictures/notice.js';
import { rowsOf } from '../pictures/parts.js';
import type { ScreenState } from '../state/screen-state.js';
import { pageOfScreen, type ScrollingScreen } from '../state/scroll-screen.js';
import { Frame } from './frame.js';
import { textHeight } from './layout.js';
import { Panel } from './panel.js';

const WAITING: Readonly<Record<ScrollingScreen, string>> = {
  star: 'fetching the star ...',
  files: 'waiting for the first file',
  help: '',
};

/** A screen that is one long page: a star, the files, the keys. */
export function PageScreen({ state, screen }: { state: ScreenState; screen: ScrollingScreen }) {
  const { columns, rows, look, scroll } = state;
  const grid = useMemo(() => {
    const page = pageOfScreen(state, screen);
    const height = textHeight(rows);
    if (page === undefined) return noticePicture([WAITING[screen]], columns, height);
    return rowsOf(page, Math.min(scroll[screen], page.height - height), height);
  }, [state, screen, rows, columns, scroll]);
  return (
    <Frame state={state}>
      <Panel grid={grid} look={look} />
    </Frame>
  );
}
