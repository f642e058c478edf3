import { useMemo } from 'react';
import { asciiOnly } from '../pictures/ascii-only.js';
import { Canvas } from '../terminal/canvas.js';
import type { Grid } from '../terminal/grid.js';
import type { Look } from '../terminal/look.js';

/** A picture on the screen; its lines are made anew only when the picture or the look changes. */
export function Panel({ grid, look }: { grid: Grid; look: Look }) {
  const lines = useMemo(() => (look.glyphs === 'ascii' ? asciiOnly(grid) : grid).toLines(look), [grid, look]);
  return <Canvas lines={lines} width={grid.width} />;
}
