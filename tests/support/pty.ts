import pty from '@lydell/node-pty';
import xterm from '@xterm/headless';

export interface PtyOptions {
  readonly columns?: number;
  readonly rows?: number;
  readonly env?: Readonly<Record<string, string | undefined>>;
  /** How long the terminal's own answers are on their way, as over a slow line. */
  readonly answer_ms?: number;
}

/** A real program in a real pseudo-terminal, its screen read through a terminal emulator. */
export class PtySession {
  readonly terminal: InstanceType<typeof xterm.Terminal>;
  readonly exit: Promise<{ exitCode: number; signal?: number | undefined }>;
  bytes = 0;
  /** Everything the program wrote. */
  raw = '';
  private readonly process: pty.IPty;
  private readonly waiters = new Set<() => void>();
  private ended = false;

  constructor(
    command: string,
    args: readonly string[],
    { columns = 80, rows = 24, env = {}, answer_ms = 0 }: PtyOptions = {},
  ) {
    const inherited = { ...process.env, CI: undefined, NO_COLOR: undefined, FORCE_COLOR: undefined };
    const wanted = { ...inherited, TERM: 'xterm-256color', LANG: 'C.UTF-8', LC_ALL: undefined, ...env };
    const given = Object.entries(wanted).filter((entry): entry is [string, string] => entry[1] !== undefined);
    this.terminal = new xterm.Terminal({ cols: columns, rows, allowProposedApi: true, scrollback: 200 });
    this.process = pty.spawn(command, [...args], { cols: columns, rows, env: Object.fromEntries(given) });
    this.terminal.onData(data => {
      setTimeout(() => !this.ended && this.process.write(data), answer_ms);
    });
    this.process.onData(data => {
      this.bytes += Buffer.byteLength(data);
      this.raw += data;
      this.terminal.write(data, () => {
        for (const waiter of this.waiters) waiter();
      });
    });
    this.exit = new Promise(resolve => {
      this.process.onExit(result => {
        this.ended = true;
        resolve(result);
      });
    });
  }

  get pid(): number {
    return this.process.pid;
  }

  type(keys: string): void {
    this.process.write(keys);
  }

  resize(columns: number, rows: number): void {
    this.terminal.resize(columns, rows);
    this.process.resize(columns, rows);
  }

  kill(signal: string): void {
    if (!this.ended) this.process.kill(signal);
  }

  /** The line drops: the terminal itself goes away. */
  hangUp(): void {
    (this.process as unknown as { readonly destroy: () => void }).destroy();
  }

  screen(): string {
    const buffer = this.terminal.buffer.active;
    const lines = Array.from(
      { length: this.terminal.rows },
      (_, y) => buffer.getLine(buffer.baseY + y)?.translateToString(true) ?? '',
    );
    return lines.join('\n');
  }

  /** The text on the screen that is drawn in anything but pure red. */
  textWithoutRed(): string {
    const buffer = this.terminal.buffer.active;
    let text = '';
    for (let y = 0; y < this.terminal.rows; y++) {
      const line = buffer.getLine(buffer.baseY + y);
      for (let x = 0; x < this.terminal.cols; x++) {
        const cell = line?.getCell(x);
        if (cell !== undefined && cell.getChars().trim() !== '' && !isRed(cell)) text += cell.getChars();
      }
    }
    return text;
  }

  get onAlternateScreen(): boolean {
    return this.terminal.buffer.active.type === 'alternate';
  }

  /** Waits until the emulator has taken in everything that was written. */
  settled(): Promise<void> {
    return new Promise(resolve => this.terminal.write('', resolve));
  }

  /** Waits until the screen shows something. */
  shows(what: string | RegExp, patience_ms = 15_000): Promise<void> {
    const shown = () => (typeof what === 'string' ? this.screen().includes(what) : what.test(this.screen()));
    return this.until(shown, String(what), patience_ms);
  }

  /** Waits until something is true; looks whenever the program has written. */
  async until(shown: () => boolean, what: string, patience_ms = 15_000): Promise<void> {
    if (shown()) return;
    await new Promise<void>((resolve, reject) => {
      const timer = setTimeout(() => {
        this.waiters.delete(check);
        reject(new Error(`the screen never showed ${what}:\n${this.screen()}`));
      }, patience_ms);
      const check = () => {
        if (!shown()) return;
        clearTimeout(timer);
        this.waiters.delete(check);
        resolve();
      };
      this.waiters.add(check);
    });
  }
}

type Cell = NonNullable<
  ReturnType<NonNullable<ReturnType<PtySession['terminal']['buffer']['active']['getLine']>>['getCell']>
>;

function isRed(cell: Cell): boolean {
  const colour = cell.getFgColor();
  return cell.isFgRGB() ? (colour & 0xffff) === 0 : cell.isFgPalette() && RED_INDICES.includes(colour);
}

/** Red and bright red of the 16, and the pure reds of the cube of the 256. */
const RED_INDICES = [1, 9, 52, 88, 124, 160, 196];
