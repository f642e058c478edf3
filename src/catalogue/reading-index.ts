/** Where the readings of each star in one band are, newest first: a chain through all readings ever added. */
export class ReadingIndex {
  /** Newest reading of each star, -1 for none. */
  private newest = new Int32Array(0);
  /** Columns over the readings: the star's reading before, its frame and the row there. */
  private previous = new Int32Array(0);
  private frames = new Uint32Array(0);
  private rows = new Uint32Array(0);
  private count = 0;

  add(star: number, frame: number, row: number): void {
    this.ensure(star);
    const reading = this.count++;
    this.previous[reading] = this.newest[star];
    this.frames[reading] = frame;
    this.rows[reading] = row;
    this.newest[star] = reading;
  }

  /** Calls back for each reading of a star, newest added first. */
  each(star: number, visit: (frame: number, row: number) => void): void {
    if (star >= this.newest.length) return;
    for (let reading = this.newest[star]; reading >= 0; reading = this.previous[reading]) {
      visit(this.frames[reading], this.rows[reading]);
    }
  }

  private ensure(star: number): void {
    if (star >= this.newest.length) {
      const wider = new Int32Array(Math.max(star + 1, 2 * this.newest.length, 64)).fill(-1);
      wider.set(this.newest);
      this.newest = wider;
    }
    if (this.count < this.previous.length) return;
    const room = Math.max(256, 2 * this.count);
    const [previous, frames, rows] = [new Int32Array(room), new Uint32Array(room), new Uint32Array(room)];
    previous.set(this.previous);
    frames.set(this.frames);
    rows.set(this.rows);
    Object.assign(this, { previous, frames, rows });
  }
}
