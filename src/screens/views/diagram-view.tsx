import { useMemo } from 'react';
import { withMarks } from '../pictures/diagram-marks.js';
import { hrDiagram } from '../pictures/hr-diagram.js';
import { noticePicture } from '../pictures/notice.js';
import { wholeWindow } from '../state/diagram-window.js';
import type { ScreenState } from '../state/screen-state.js';
import { currentStar } from '../state/selection.js';
import type { Size } from './layout.js';
import { Panel } from './panel.js';

/** The HR diagram. The dots are drawn once a view, window and size; only the marks follow the cursor. */
export function DiagramView({ state, size }: { state: ScreenState; size: Size }) {
  const { view, window, look, unseen, fresh } = state;
  const { width, height } = size;
  const { glyphs } = look;
  const whole = useMemo(() => (view === undefined ? undefined : wholeWindow(view)), [view]);
  const picture = useMemo(
    () =>
      view === undefined || whole === undefined
        ? undefined
        : hrDiagram(view, window ?? whole, width, height, glyphs),
    [view, whole, window, width, height, glyphs],
  );
  const selected = currentStar(state);
  const focused = state.focus === 'diagram';
  const grid = useMemo(() => {
    if (view === undefined || picture === undefined || view.frames.length === 0)
      return noticePicture(['waiting for the first file in', state.place], width, height);
    const marks = { shortlist: view.shortlist, unseen, fresh, selected, focused };
    return withMarks(picture, view.stars, marks, glyphs);
  }, [picture, view, unseen, fresh, selected, focused, glyphs, state.place, width, height]);
  return <Panel grid={grid} look={look} />;
}
