/** A seeded stream of random numbers: the same seed gives the same night everywhere. */
export class Random {
  private state: number;

  constructor(seed: number) {
    this.state = seed >>> 0;
  }

  /** Uniform in [0, 1): the 32-bit generator "mulberry32" (public domain, T. Ettinger). */
  uniform(): number {
    this.state = (this.state + 0x6d2b79f5) >>> 0;
    let t = this.state;
    t = Math.imul(t ^ (t >>> 15), t | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 4_294_967_296;
  }

  between(low: number, high: number): number {
    return low + (high - low) * this.uniform();
  }

  /** Standard normal (Box & Muller 1958). */
  normal(mean = 0, sigma = 1): number {
    const radius = Math.sqrt(-2 * Math.log(1 - this.uniform()));
    return mean + sigma * radius * Math.cos(2 * Math.PI * this.uniform());
  }

  /** Index drawn in proportion to the weights, given their running sums. */
  weighted(runningSums: ArrayLike<number>): number {
    const target = this.uniform() * runningSums[runningSums.length - 1];
    let low = 0;
    let high = runningSums.length - 1;
    while (low < high) {
      const middle = (low + high) >> 1;
      if (runningSums[middle] <= target) low = middle + 1;
      else high = middle;
    }
    return low;
  }
}
