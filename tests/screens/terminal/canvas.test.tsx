import { EventEmitter } from 'node:events';
import { Box, render, Text } from 'ink';
import { expect, it } from 'vitest';
import { Canvas, Surface, SurfaceContext } from '../../../src/screens/terminal/canvas.js';

const LINES = ['one', 'two'];

function Page({ hasPicture = true }: { hasPicture?: boolean }) {
  return (
    <Box flexDirection="column">
      <Text>title</Text>
      <Box>
        <Text>left </Text>
        {hasPicture && <Canvas lines={LINES} width={6} />}
        <Text>right</Text>
      </Box>
    </Box>
  );
}

function renderPage(surface: Surface | null) {
  let frame = '';
  const stdout = Object.assign(new EventEmitter(), {
    columns: 40,
    rows: 10,
    write: (text: string) => {
      frame = text;
      return true;
    },
  });
  const page = (hasPicture: boolean) => (
    <SurfaceContext.Provider value={surface}>
      <Page hasPicture={hasPicture} />
    </SurfaceContext.Provider>
  );
  const app = render(page(true), {
    stdout: stdout as unknown as NodeJS.WriteStream,
    debug: true,
    exitOnCtrlC: false,
    patchConsole: false,
  });
  return { app, frame: () => frame, hide: () => app.rerender(page(false)) };
}

it('with a surface Ink leaves room for the picture, and the lines go to the surface', () => {
  let changes = 0;
  const surface = new Surface(() => changes++);
  const { app, frame, hide } = renderPage(surface);
  expect([...surface.overlays.values()]).toEqual([{ x: 5, y: 1, lines: LINES }]);
  expect(frame()).toMatch(/^title\nleft {7}right/);
  expect(changes).toBe(1);
  hide();
  expect(surface.overlays.size).toBe(0);
  expect(frame()).toMatch(/left right/);
  app.unmount();
});

it('without a surface the picture is text', () => {
  const { app, frame } = renderPage(null);
  expect(frame()).toMatch(/^title\nleft one *right\n {5}two/);
  app.unmount();
});
