// The one owner of the terminal's state, and the one screen file that touches a file descriptor: what it writes on
// the way out has to be written at once, in handlers that leave no time for a stream.
import { writeSync } from 'node:fs';

const ENTER = '\x1b[?1049h\x1b[H\x1b[2J\x1b[?25l\x1b[?2004h';
const LEAVE = '\x1b[?2026l\x1b[0m\x1b[?2004l\x1b[?25h\x1b[?1049l';

/** 128 + signal number, as shells report it. */
const SIGNAL_CODES = { SIGINT: 130, SIGTERM: 143, SIGQUIT: 131 } as const;

export interface SessionHandlers {
  readonly onInput: (chunk: Uint8Array) => void;
  readonly onResize: () => void;
  /** Back from a suspension: everything has to be drawn again. */
  readonly onResume: () => void;
}

/**
 * Takes the terminal over (alternate screen, raw mode, no cursor) and gives it back whole, whatever ends the
 * program: a key, a signal, a hang-up, a failure.
 */
export class TerminalSession {
  private active = false;
  private suspended = false;
  private readonly listeners: [NodeJS.EventEmitter, string, (...args: never[]) => void][] = [];

  constructor(
    private readonly input: NodeJS.ReadStream,
    private readonly output: NodeJS.WriteStream,
    private readonly handlers: SessionHandlers,
  ) {}

  get size(): { columns: number; rows: number } {
    return { columns: this.output.columns ?? 80, rows: this.output.rows ?? 24 };
  }

  start(): void {
    this.listen(process, 'exit', () => this.leave());
    for (const signal of ['SIGINT', 'SIGTERM', 'SIGQUIT'] as const) {
      this.listen(process, signal, () => this.quit(SIGNAL_CODES[signal]));
    }
    this.listen(process, 'SIGHUP', () => this.hangUp());
    this.listen(process, 'uncaughtException', error => this.fail(error));
    this.listen(process, 'unhandledRejection', error => this.fail(error));
    this.listen(process, 'SIGTSTP', () => this.suspend());
    this.listen(process, 'SIGCONT', () => this.resume());
    this.listen(this.input, 'error', () => this.hangUp());
    this.listen(this.input, 'end', () => this.hangUp());
    this.listen(this.output, 'error', () => this.hangUp());
    this.listen(this.output, 'resize', () => this.handlers.onResize());
    this.listen(this.input, 'data', (chunk: Buffer) => this.handlers.onInput(chunk));
    this.enter();
    this.input.resume();
  }

  /** Gives the terminal back for good; the program goes on. */
  stop(): void {
    this.leave();
    for (const [emitter, event, listener] of this.listeners)
      emitter.off(event, listener as (...args: unknown[]) => void);
    this.listeners.length = 0;
    this.input.pause();
  }

  write(text: string): void {
    if (this.active) this.output.write(text);
  }

  /** Ctrl-Z: gives the terminal back and stops, until the shell's fg. */
  suspend(): void {
    this.leave();
    this.suspended = true;
    // SIGSTOP, not SIGTSTP: our own handler must not catch it again.
    process.kill(process.pid, 'SIGSTOP');
  }

  private resume(): void {
    if (!this.suspended) return;
    this.suspended = false;
    this.enter();
    this.handlers.onResume();
  }

  private enter(): void {
    if (this.active) return;
    this.active = true;
    this.setRawMode(true);
    writeAtOnce(this.output, ENTER);
  }

  private leave(): void {
    if (!this.active) return;
    this.active = false;
    this.setRawMode(false);
    writeAtOnce(this.output, LEAVE);
  }

  private setRawMode(on: boolean): void {
    try {
      this.input.setRawMode(on);
    } catch {
      // The terminal is gone: there is nothing to set.
    }
  }

  private quit(code: number): void {
    this.leave();
    process.exit(code);
  }

  /**
   * The line dropped. Dying of the signal itself, because `process.exit` on a terminal that has gone away aborts in
   * Node 20 (it resets a descriptor that no longer answers).
   */
  private hangUp(): void {
    this.leave();
    process.removeAllListeners('SIGHUP');
    process.kill(process.pid, 'SIGHUP');
  }

  private fail(error: unknown): void {
    this.leave();
    const words = error instanceof Error ? (error.stack ?? error.message) : String(error);
    try {
      writeSync(2, `nightsieve: this is a fault of the program: ${words}\n`);
    } catch {
      // No one is left to read it.
    }
    process.exit(1);
  }

  private listen(emitter: NodeJS.EventEmitter, event: string, listener: (...args: never[]) => void): void {
    emitter.on(event, listener as (...args: unknown[]) => void);
    this.listeners.push([emitter, event, listener]);
  }
}

/** Writes everything now, waiting for a slow terminal; gives up on one that has gone. */
function writeAtOnce(output: NodeJS.WriteStream, text: string): void {
  const bytes = Buffer.from(text);
  let written = 0;
  for (let tries = 0; written < bytes.length && tries < 200; ) {
    try {
      written += writeSync((output as unknown as { fd: number }).fd, bytes, written);
      tries = 0;
    } catch (error) {
      if ((error as NodeJS.ErrnoException).code !== 'EAGAIN') return;
      tries++;
      Atomics.wait(new Int32Array(new SharedArrayBuffer(4)), 0, 0, 5);
    }
  }
}
