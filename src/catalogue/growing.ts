/** Number columns that grow star by star, all to the same capacity. */
export class GrowingColumns<Name extends string> {
  private capacity = 0;
  private readonly arrays = new Map<Name, Float64Array>();

  /** New cells of each column begin as `blank`. */
  constructor(
    private readonly names: readonly Name[],
    private readonly blank: number,
  ) {
    this.ensure(16);
  }

  /** Makes room; the arrays handed out before stay valid for the stars they held. */
  ensure(count: number): void {
    if (count <= this.capacity) return;
    const larger = Math.max(count, 2 * this.capacity);
    for (const name of this.names) {
      const array = new Float64Array(larger).fill(this.blank);
      const old = this.arrays.get(name);
      if (old !== undefined) array.set(old);
      this.arrays.set(name, array);
    }
    this.capacity = larger;
  }

  get(name: Name): Float64Array {
    return this.arrays.get(name) as Float64Array;
  }

  /** Back to blank, keeping the room. */
  clear(): void {
    for (const array of this.arrays.values()) array.fill(this.blank);
  }
}
