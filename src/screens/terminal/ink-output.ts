import { EventEmitter } from 'node:events';
import type { Overlay } from './canvas.js';
import { CellWriter } from './cell-writer.js';
import { REAL_TIMERS, type Timers } from './key-filter.js';

/** Twenty frames a second: no more is seen. Ten while a frame takes more than half its time, drawn and written. */
const FRAME_MS = 50;
const SLOW_FRAME_MS = 100;
/** The terminal answers this when it has drawn everything before it (status report, ECMA-48). */
const STATUS_REQUEST = '\x1b[5n';
export const STATUS_ANSWER = '\x1b[0n';
/** How long an answer may take while frames wait for it, and at the end, when only the shell is waiting. */
const ANSWER_MS = 3000;
const LAST_ANSWER_MS = 1000;

/** Whether frames wait for the terminal's answers: never, not before it has shown that it gives any, always. */
type Pacing = 'off' | 'untried' | 'asked' | 'on';

/**
 * What Ink writes to in place of the terminal. Ink hands over every frame whole (its debug mode); frames are held back
 * to a steady pace, canvases are laid over the newest, and only changed cells go on to the terminal.
 *
 * Over a remote link the next frame waits until the terminal has answered for the last one: nothing else tells that a
 * slow line has taken it. The first frame asks whether the terminal answers at all; without an answer nothing waits.
 */
export class InkOutput extends EventEmitter {
  /** Ink asks; "no" keeps it from writing cursor and synchronisation sequences of its own. */
  readonly isTTY = false;
  private readonly writer: CellWriter;
  private frame = '';
  private hasFrame = false;
  private paused = false;
  private timer: unknown;
  private lastFlush_ms = Number.NEGATIVE_INFINITY;
  private gap_ms = FRAME_MS;
  private pacing: Pacing;
  private answerTimer: unknown;
  /** Answers that are still on their way. */
  private owed = 0;
  private whenSettled: (() => void) | undefined;

  constructor(
    public columns: number,
    public rows: number,
    private readonly sink: (text: string) => void,
    private readonly overlays: () => Iterable<Overlay>,
    paced: boolean,
    private readonly now_ms: () => number = () => performance.now(),
    private readonly timers: Timers = REAL_TIMERS,
  ) {
    super();
    this.pacing = paced ? 'untried' : 'off';
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
    this.owed = Math.max(0, this.owed - 1);
    if (this.pacing === 'asked') this.pacing = 'on';
    this.stopWaiting();
    if (this.owed === 0) this.whenSettled?.();
    this.schedule();
  }

  resize(columns: number, rows: number): void {
    this.columns = columns;
    this.rows = rows;
    this.writer.resize(columns, rows);
    this.emit('resize');
    this.touch();
  }

  /** Draws everything anew: nothing is known of what the terminal shows. */
  redraw(): void {
    this.writer.forget();
    this.touch();
  }

  /**
   * Writes no more until `resume`. Resolves when the terminal owes no answer, after a second at the latest: an answer
   * that comes when the terminal is no longer ours would be typed into the shell.
   */
  pause(): Promise<void> {
    this.paused = true;
    this.timers.clear(this.timer);
    this.timer = undefined;
    this.stopWaiting();
    if (this.owed === 0) return Promise.resolve();
    return new Promise(resolve => {
      const timer = this.timers.set(resolve, LAST_ANSWER_MS);
      this.whenSettled = () => {
        this.timers.clear(timer);
        resolve();
      };
    });
  }

  resume(): void {
    this.paused = false;
    this.owed = 0;
    this.redraw();
  }

  private schedule(): void {
    if (this.paused || this.timer !== undefined) return;
    if (this.pacing === 'on' && this.answerTimer !== undefined) return;
    const wait = Math.max(0, this.lastFlush_ms + this.gap_ms - this.now_ms());
    this.timer = this.timers.set(() => {
      this.timer = undefined;
      this.flush();
    }, wait);
  }

  private flush(): void {
    const start_ms = this.now_ms();
    const update = this.writer.frame(this.frame, this.overlays());
    if (update !== '') this.send(update);
    this.lastFlush_ms = this.now_ms();
    this.gap_ms = this.lastFlush_ms - start_ms > FRAME_MS / 2 ? SLOW_FRAME_MS : FRAME_MS;
  }

  private send(update: string): void {
    if (this.pacing === 'off' || this.pacing === 'asked') {
      this.sink(update);
      return;
    }
    if (this.pacing === 'untried') this.pacing = 'asked';
    this.owed++;
    this.answerTimer = this.timers.set(() => this.giveUp(), ANSWER_MS);
    this.sink(update + STATUS_REQUEST);
  }

  /** No answer in time: it was lost, or the line is very slow, or the terminal has none to give. */
  private giveUp(): void {
    this.answerTimer = undefined;
    if (this.pacing === 'asked') this.owed = 0;
    this.schedule();
  }

  private stopWaiting(): void {
    this.timers.clear(this.answerTimer);
    this.answerTimer = undefined;
  }
}
