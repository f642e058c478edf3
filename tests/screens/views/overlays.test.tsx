import { EventEmitter } from 'node:events';
import { render } from 'ink';
import { expect, it } from 'vitest';
import { screensOf } from '../../../src/screens/app.js';
import { Surface, SurfaceContext } from '../../../src/screens/terminal/canvas.js';
import { Grid } from '../../../src/screens/terminal/grid.js';
import { nightView } from '../../support/night-view.js';
import { key, newStore, screenText } from '../../support/render-screen.js';

const settled = () => new Promise(resolve => setTimeout(resolve, 5));

it('canvases lie where Ink would have written them, also after a change of height alone', async () => {
  const { store } = newStore(120, 40);
  const surface = new Surface(() => {});
  const stdout = Object.assign(new EventEmitter(), { columns: 132, rows: 60, write: () => true });
  const app = render(<SurfaceContext.Provider value={surface}>{screensOf(store)}</SurfaceContext.Provider>, {
    stdout: stdout as unknown as NodeJS.WriteStream,
    debug: true,
    exitOnCtrlC: false,
    patchConsole: false,
  });
  const composed = () => {
    const grid = new Grid(store.getState().columns, store.getState().rows);
    for (const { x, y, lines } of surface.overlays.values())
      lines.forEach((line, i) => {
        grid.put(x, y + i, line.replace(/\x1b\[[0-9;]*m/g, ''));
      });
    return grid.toPlainText();
  };
  store.dispatch({ kind: 'view', view: nightView() });
  const changes = [
    () => store.dispatch(key('down')),
    () => store.dispatch({ kind: 'resize', columns: 120, rows: 34 }),
    () => store.dispatch({ kind: 'resize', columns: 80, rows: 24 }),
    () => store.dispatch(key('f')),
    () => store.dispatch(key('q')),
  ];
  for (const change of changes) {
    change();
    await settled();
    expect(composed()).toBe(await screenText(store));
  }
  app.unmount();
});
