import { appendFileSync, readFileSync, renameSync, writeFileSync } from 'node:fs';
import { basename, join } from 'node:path';
import type { ClockSetting } from '../night/clock.js';
import { namesIn, type Timetable } from './timetable.js';

interface Step {
  readonly at_ms: number;
  readonly act: () => void;
}

/** Puts the files of a recorded night into a folder as its timetable says, at the clock's speed. */
export class NightPlayer {
  private readonly steps: readonly Step[];
  private next = 0;
  private lastStep_ms = 0;
  private timer: NodeJS.Timeout | undefined;

  constructor(
    private readonly source: string,
    private readonly target: string,
    timetable: Timetable,
    private readonly clock: ClockSetting,
  ) {
    this.files = namesIn(timetable).size;
    this.steps = timetable.files.flatMap(entry => this.stepsOf(entry)).sort((a, b) => a.at_ms - b.at_ms);
  }

  /** Files that the folder holds at the end of the night. */
  readonly files: number;

  get finished(): boolean {
    return this.next >= this.steps.length;
  }

  /** Time since the last file was written; 0 while there are more. */
  finishedFor_ms(): number {
    return this.finished ? Date.now() - this.lastStep_ms : 0;
  }

  start(): void {
    this.play();
  }

  stop(): void {
    clearTimeout(this.timer);
    this.next = this.steps.length;
  }

  private play(): void {
    const now = Date.now();
    while (this.next < this.steps.length && this.worldTime(this.steps[this.next].at_ms) <= now) {
      this.steps[this.next++].act();
      this.lastStep_ms = now;
    }
    if (this.finished) return;
    this.timer = setTimeout(
      () => this.play(),
      Math.max(1, this.worldTime(this.steps[this.next].at_ms) - now),
    );
  }

  private worldTime(night_ms: number): number {
    return this.clock.startedAt_ms + (night_ms - this.clock.begins_ms) / this.clock.speed;
  }

  private stepsOf(entry: Timetable['files'][number]): Step[] {
    const from = join(this.source, entry.file);
    const to = join(this.target, basename(entry.file));
    if (entry.pieces === undefined) {
      return [
        {
          at_ms: entry.arrives,
          act: () => {
            writeFileSync(`${to}.tmp`, readFileSync(from));
            renameSync(`${to}.tmp`, to);
          },
        },
      ];
    }
    let written = 0;
    return entry.pieces.map(piece => {
      const start = written;
      written = piece.bytes;
      return {
        at_ms: piece.arrives,
        act: () => appendFileSync(to, readFileSync(from).subarray(start, piece.bytes)),
      };
    });
  }
}
