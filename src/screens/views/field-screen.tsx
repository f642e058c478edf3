import { Box } from 'ink';
import { useMemo } from 'react';
import { conditionsStrip } from '../pictures/conditions-strip.js';
import { noticePicture } from '../pictures/notice.js';
import { shortlistPanel } from '../pictures/shortlist-panel.js';
import { starSummary } from '../pictures/star-summary.js';
import { NO_STAR, type ScreenState } from '../state/screen-state.js';
import { firstVisible } from '../state/scroll.js';
import { currentStar, shortlistStars } from '../state/selection.js';
import { DiagramView } from './diagram-view.js';
import { Frame } from './frame.js';
import { fieldLayout, GAP, type Size, shortlistEntries } from './layout.js';
import { Panel } from './panel.js';

/** The night at a glance: diagram, shortlist, the star to point at, the sky. */
export function FieldScreen({ state }: { state: ScreenState }) {
  const { columns, rows } = state;
  const layout = useMemo(() => fieldLayout(columns, rows), [columns, rows]);
  const diagram = <DiagramView state={state} size={layout.diagram} />;
  const shortlist = <ShortlistView state={state} size={layout.shortlist} />;
  const summary = <SummaryView state={state} size={layout.detail} />;
  return (
    <Frame state={state}>
      {layout.kind === 'stacked' ? (
        <>
          <Box columnGap={GAP}>
            {diagram}
            {shortlist}
          </Box>
          {summary}
        </>
      ) : (
        <Box columnGap={GAP}>
          {diagram}
          {layout.kind === 'wide' ? (
            <>
              {shortlist}
              {summary}
            </>
          ) : (
            <Box flexDirection="column">
              {shortlist}
              {summary}
            </Box>
          )}
        </Box>
      )}
      <ConditionsView state={state} />
    </Frame>
  );
}

function ShortlistView({ state, size }: { state: ScreenState; size: Size }) {
  const { view, shortlistAnchor, unseen, focus, now_ms, look } = state;
  const current = currentStar(state);
  const grid = useMemo(() => {
    const entries = shortlistEntries(size);
    const first = firstVisible([...shortlistStars(view)], shortlistAnchor, entries);
    const input = {
      shortlist: view?.shortlist ?? [],
      first,
      entries,
      current,
      unseen,
      focused: focus === 'shortlist',
      now_ms,
      glyphs: look.glyphs,
      emptyText: view === undefined || view.frames.length === 0 ? '' : 'no star is flagged yet',
    };
    return shortlistPanel(input, size.width, size.height);
  }, [view, shortlistAnchor, unseen, focus, now_ms, look, current, size]);
  return <Panel grid={grid} look={look} />;
}

function SummaryView({ state, size }: { state: ScreenState; size: Size }) {
  const { view, selected, now_ms, look } = state;
  const star = currentStar(state);
  const grid = useMemo(() => {
    if (view === undefined) return noticePicture([], size.width, size.height);
    const input = { view, star, isNext: selected === NO_STAR, now_ms, glyphs: look.glyphs };
    return starSummary(input, size.width, size.height);
  }, [view, star, selected, now_ms, look, size]);
  return <Panel grid={grid} look={look} />;
}

function ConditionsView({ state }: { state: ScreenState }) {
  const { view, now_ms, columns, look } = state;
  const grid = useMemo(() => conditionsStrip(view?.conditions, now_ms, columns), [view, now_ms, columns]);
  return <Panel grid={grid} look={look} />;
}
