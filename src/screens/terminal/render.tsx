import { PassThrough } from 'node:stream';
import { render } from 'ink';
import type { ReactNode } from 'react';
import { Surface, SurfaceContext } from './canvas.js';
import { isRemote } from './capabilities.js';
import { InkOutput, STATUS_ANSWER } from './ink-output.js';
import { ESCAPE_MS, KeyFilter, REMOTE_ESCAPE_MS } from './key-filter.js';
import type { KeyPress } from './key-press.js';
import { TerminalSession } from './session.js';

export interface ScreenOptions {
  readonly app: ReactNode;
  readonly onKey: (key: KeyPress) => void;
  readonly onResize: (columns: number, rows: number) => void;
}

/** A running screen. */
export interface RunningScreen {
  readonly redraw: () => void;
  /** Gives the terminal back and lets `done` resolve with the code; the first call counts. */
  readonly stop: (code: number) => void;
  readonly done: Promise<number>;
}

/** Draws an Ink application on the real terminal until stopped. */
export function startScreen({ app, onKey, onResize }: ScreenOptions): RunningScreen {
  let isStopping = false;
  const remote = isRemote(process.env);
  const filter = new KeyFilter(
    {
      onKey: key => {
        if (isStopping) return;
        // Ctrl-Z belongs to the terminal's life, not to the screens.
        if (key.name === 'char' && key.ctrl && key.char === 'z') void session.suspend();
        else onKey(key);
      },
      onReport: sequence => {
        if (sequence === STATUS_ANSWER) output.answered();
      },
    },
    remote ? REMOTE_ESCAPE_MS : ESCAPE_MS,
  );
  const session = new TerminalSession(process.stdin, process.stdout, {
    onInput: chunk => filter.push(chunk),
    onResize: () => {
      const { columns, rows } = session.size;
      output.resize(columns, rows);
      onResize(columns, rows);
    },
    onLeave: () => output.pause(),
    onResume: () => output.resume(),
  });
  const { columns, rows } = session.size;
  const output: InkOutput = new InkOutput(
    columns,
    rows,
    text => session.write(text),
    () => surface.overlays.values(),
    remote,
  );
  const surface = new Surface(output.touch);
  session.start();
  const ink = render(<SurfaceContext.Provider value={surface}>{app}</SurfaceContext.Provider>, {
    stdout: output as unknown as NodeJS.WriteStream,
    stderr: process.stderr,
    stdin: new PassThrough() as unknown as NodeJS.ReadStream,
    debug: true,
    exitOnCtrlC: false,
    patchConsole: false,
  });
  // Ink catches what a component throws, ends itself and leaves its error page standing: a dead screen.
  ink.waitUntilExit().catch(error => session.fail(error));
  let finish: (code: number) => void = () => {};
  const done = new Promise<number>(resolve => {
    finish = resolve;
  });
  const stop = async (code: number) => {
    if (isStopping) return;
    isStopping = true;
    await output.pause();
    ink.unmount();
    session.stop();
    finish(code);
  };
  return { redraw: () => output.redraw(), stop: code => void stop(code), done };
}
