import { EventEmitter } from 'node:events';
import type { Overlay } from './canvas.js';
import { CellWriter } from './cell-writer.js';
import { REAL_TIMERS, type Timers } from './key-filter.js';

/** Ten frames a second under load, twenty while keys are held: no more is seen, and a slow line keeps up. */
const FRAME_MS = 50;
/** The terminal answers this when it has drawn everything before it (status report, ECMA-48). */
const STATUS_REQUEST = '\x1b[5n';
export const STATUS_ANSWER = '\x1b[0n';
const ANSWER_MS = 3000;

/**
 * What Ink writes to in place of the terminal. Ink hands over every frame whole (its debug mode); frames are held back
 * to a steady pace, canvases are laid over the newest, and only changed cells go on to the terminal.
 *
 * Over a remote link the next frame waits until the terminal has answered for the last one: nothing else tells that a
 * slow line has taken it. A terminal that does not answer the first time is not asked again.
 */
export class InkOutput extends EventEmitter {
  /** Ink asks; "no" keeps it from writing cursor and synchronisation sequences of its own. */
  readonly isTTY = false;
  private readonly writer: CellWriter;
  private frame = '';
  private hasFrame = false;
  private timer: unknown;
  private lastFlush_ms = Number.NEGATIVE_INFINITY;
  private answerTimer: unknown;
  private closed = false;

  constructor(
    public columns: number,
    public rows: number,
    private readonly sink: (text: string) => void,
    private readonly overlays: () => Iterable<Overlay>,
    private paced: boolean,
    private readonly now_ms: () => number = () => performance.now(),
    private readonly timers: Timers = REAL_TIMERS,
  ) {
    super();
    this.writer = new CellWriter(columns, rows);
  }

  /** Takes a frame from Ink. */
  readonly write = (frame: string): boolean => {
    this.frame = frame;
    this.hasFrame = true;
    this.schedule();
    return true;
  };

  /** An overlay has changed. */
  readonly touch = (): void => {
    if (this.hasFrame) this.schedule();
  };

  /** The terminal has answered. */
  answered(): void {
    if (this.answerTimer === undefined) return;
    this.timers.clear(this.answerTimer);
    this.answerTimer = undefined;
    this.schedule();
  }

  /** True while an answer is on its way: it has to be waited for, or it would end up in the shell. */
  get awaitsAnswer(): boolean {
    return this.answerTimer !== undefined;
  }

  resize(columns: number, rows: number): void {
    this.columns = columns;
    this.rows = rows;
    this.writer.resize(columns, rows);
    this.emit('resize');
    this.touch();
  }

  redraw(): void {
    this.writer.forget();
    this.touch();
  }

  close(): void {
    this.closed = true;
    if (this.timer !== undefined) this.timers.clear(this.timer);
    if (this.answerTimer !== undefined) this.timers.clear(this.answerTimer);
  }

  private schedule(): void {
    if (this.closed || this.timer !== undefined || this.answerTimer !== undefined) return;
    const wait = Math.max(0, this.lastFlush_ms + FRAME_MS - this.now_ms());
    this.timer = this.timers.set(() => {
      this.timer = undefined;
      this.flush();
    }, wait);
  }

  private flush(): void {
    const update = this.writer.frame(this.frame, this.overlays());
    this.lastFlush_ms = this.now_ms();
    if (update === '') return;
    if (!this.paced) {
      this.sink(update);
      return;
    }
    this.answerTimer = this.timers.set(() => {
      this.answerTimer = undefined;
      this.paced = false;
      this.schedule();
    }, ANSWER_MS);
    this.sink(update + STATUS_REQUEST);
  }
}
