// The one owner of the terminal's state, and the one screen file that touches a file descriptor: what it writes on
// the way out has to be written at once, in handlers that leave no time for a stream.
import { writeSync } from 'node:fs';

const ENTER = '\x1b[?1049h\x1b[H\x1b[2J\x1b[?25l\x1b[?2004h';
const LEAVE = '\x1b[?2026l\x1b[0m\x1b[?2004l\x1b[?25h\x1b[?1049l';

/** 128 + signal number, as shells report it. */
const SIGNAL_CODES = { SIGINT: 130, SIGTERM: 143, SIGQUIT: 131 } as const;

const STDERR = 2;

/** A window that is being dragged is followed at this pace. */
const RESIZE_MS = 40;

export interface SessionHandlers {
  readonly onInput: (chunk: Uint8Array) => void;
  readonly onResize: () => void;
  /** Before the terminal is given back in good order: what is still under way comes to rest first. */
  readonly onLeave: () => Promise<void>;
  /** Back from a suspension: everything has to be drawn again. */
  readonly onResume: () => void;
}

/**
 * Takes the terminal over (alternate screen, raw mode, no cursor) and gives it back whole, whatever ends the
 * program: a key, a signal, a hang-up, a failure.
 */
export class TerminalSession {
  private active = false;
  private isSuspending = false;
  private resizeTimer: NodeJS.Timeout | undefined;
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
      this.listen(process, signal, () => void this.quit(SIGNAL_CODES[signal]));
    }
    this.listen(process, 'SIGHUP', () => this.hangUp());
    this.listen(process, 'uncaughtException', error => this.fail(error));
    this.listen(process, 'unhandledRejection', error => this.fail(error));
    this.listen(process, 'SIGTSTP', this.onStop);
    this.listen(process, 'SIGCONT', () => this.takeAgain());
    this.listen(this.input, 'error', () => this.hangUp());
    this.listen(this.input, 'end', () => this.hangUp());
    this.listen(this.output, 'error', () => this.hangUp());
    this.listen(this.output, 'resize', () => this.resized());
    this.listen(this.input, 'data', (chunk: Buffer) => this.handlers.onInput(chunk));
    this.take();
    this.input.resume();
  }

  /** Gives the terminal back for good; the program goes on. */
  stop(): void {
    this.leave();
    clearTimeout(this.resizeTimer);
    for (const [emitter, event, listener] of this.listeners)
      emitter.off(event, listener as (...args: unknown[]) => void);
    this.listeners.length = 0;
    this.input.pause();
  }

  write(text: string): void {
    if (this.active) this.output.write(text);
  }

  /**
   * Ctrl-Z: gives the terminal back and stops until the shell's fg. The default action of SIGTSTP stops the whole
   * job, with the parent that started us, as the shell expects; and where no shell could ever continue the job, the
   * system ignores it and the screen goes on.
   */
  async suspend(): Promise<void> {
    if (this.isSuspending) return;
    this.isSuspending = true;
    await this.handlers.onLeave();
    this.isSuspending = false;
    // Something else has ended the session in the meantime.
    if (!this.active) return;
    this.leave();
    process.off('SIGTSTP', this.onStop);
    process.kill(0, 'SIGTSTP');
    // Stopped here; this is the first line after fg.
    process.on('SIGTSTP', this.onStop);
    this.take();
    this.handlers.onResume();
  }

  /** A fault of the program: the terminal is given back first, so that the message stays to be read. */
  fail(error: unknown): void {
    this.leave();
    const words = error instanceof Error ? (error.stack ?? error.message) : String(error);
    writeAtOnce(STDERR, `nightsieve: this is a fault of the program: ${words}\n`);
    process.exit(1);
  }

  private readonly onStop = (): void => void this.suspend();

  /** Continued after a stop that gave no notice (SIGSTOP): the shell may have changed everything. */
  private takeAgain(): void {
    if (!this.active) return;
    this.setRawMode(false);
    this.active = false;
    this.take();
    this.handlers.onResume();
  }

  private take(): void {
    this.active = true;
    this.setRawMode(true);
    writeAtOnce(this.outputDescriptor, ENTER);
  }

  private leave(): void {
    if (!this.active) return;
    this.active = false;
    this.setRawMode(false);
    writeAtOnce(this.outputDescriptor, LEAVE);
  }

  private get outputDescriptor(): number {
    return (this.output as unknown as { readonly fd: number }).fd;
  }

  private setRawMode(on: boolean): void {
    try {
      this.input.setRawMode(on);
    } catch {
      // The terminal is gone: there is nothing to set.
    }
  }

  private resized(): void {
    this.resizeTimer ??= setTimeout(() => {
      this.resizeTimer = undefined;
      this.handlers.onResize();
    }, RESIZE_MS);
  }

  private async quit(code: number): Promise<void> {
    await this.handlers.onLeave();
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

  private listen(emitter: NodeJS.EventEmitter, event: string, listener: (...args: never[]) => void): void {
    emitter.on(event, listener as (...args: unknown[]) => void);
    this.listeners.push([emitter, event, listener]);
  }
}

/** Writes everything now, waiting for a slow terminal; gives up on one that has gone. */
function writeAtOnce(descriptor: number, text: string): void {
  const bytes = Buffer.from(text);
  let written = 0;
  for (let tries = 0; written < bytes.length && tries < 200; ) {
    try {
      written += writeSync(descriptor, bytes, written);
      tries = 0;
    } catch (error) {
      if ((error as NodeJS.ErrnoException).code !== 'EAGAIN') return;
      tries++;
      Atomics.wait(new Int32Array(new SharedArrayBuffer(4)), 0, 0, 5);
    }
  }
}
