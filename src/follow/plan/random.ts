/** Even numbers from a seed, the same on every machine (mulberry32, public domain). */
export class Random {
  constructor(private state: number) {}

  /** 0 to below 1. */
  next(): number {
    this.state = (this.state + 0x6d2b79f5) | 0;
    let mixed = Math.imul(this.state ^ (this.state >>> 15), this.state | 1);
    mixed ^= mixed + Math.imul(mixed ^ (mixed >>> 7), mixed | 61);
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 4_294_967_296;
  }

  /** Whole number from 0 to below a limit. */
  below(limit: number): number {
    return Math.floor(this.next() * limit);
  }
}
