import { Box, type DOMElement, Text } from 'ink';
import { createContext, memo, useContext, useLayoutEffect, useRef } from 'react';

/** Lines laid over Ink's frame at a place of the screen. */
export interface Overlay {
  readonly x: number;
  readonly y: number;
  readonly lines: readonly string[];
}

/** Where canvases leave their lines for the writer, which puts them over the frame Ink has laid out. */
export class Surface {
  readonly overlays = new Map<object, Overlay>();

  constructor(private readonly onChange: () => void) {}

  place(key: object, overlay: Overlay): void {
    this.overlays.set(key, overlay);
    this.onChange();
  }

  remove(key: object): void {
    if (this.overlays.delete(key)) this.onChange();
  }
}

export const SurfaceContext = createContext<Surface | null>(null);

/**
 * A picture of ready-made lines, `width` cells wide. Ink lays out an empty box; the lines go past it to the
 * writer, because Ink takes every cell of its own text apart on every frame. Without a surface (in tests) they are
 * ordinary text.
 */
export const Canvas = memo(function Canvas({ lines, width }: { lines: readonly string[]; width: number }) {
  const surface = useContext(SurfaceContext);
  const box = useRef<DOMElement>(null);
  useLayoutEffect(() => {
    if (surface !== null && box.current !== null) surface.place(box, { ...placeOf(box.current), lines });
  });
  useLayoutEffect(() => () => surface?.remove(box), [surface]);
  if (surface === null) return <Text wrap="truncate">{lines.join('\n')}</Text>;
  return <Box ref={box} width={width} height={lines.length} flexShrink={0} />;
});

/** Place of a laid-out element on the screen. */
function placeOf(element: DOMElement): { x: number; y: number } {
  let x = 0;
  let y = 0;
  for (let node: DOMElement | undefined = element; node?.yogaNode !== undefined; node = node.parentNode) {
    x += node.yogaNode.getComputedLeft();
    y += node.yogaNode.getComputedTop();
  }
  return { x, y };
}
