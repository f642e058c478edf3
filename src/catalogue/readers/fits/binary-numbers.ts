/** Rows that are read in one go: few enough that their bytes stay close to the processor for all columns. */
export const BATCH_ROWS = 4096;

/** Fills rows [from, to) of one column: `place` is the cell of row `from` in the table, `step` a row's bytes. */
export type FillRows = (from: number, to: number, place: number, step: number) => void;

/**
 * The stored numbers of one type, most significant byte first (FITS Standard 4.0, 5.2 and 5.3), as doubles; what is
 * not finite is none. A loop for each type, since a call for each cell would cost more than the cell; views of the
 * bytes were measured to be faster here than words put together by shifts.
 */
export function filler(type: 'B' | 'I' | 'J' | 'K' | 'E' | 'D', view: DataView, out: Float64Array): FillRows {
  switch (type) {
    case 'B':
      return (from, to, place, step) => {
        for (let row = from, p = place; row < to; row++, p += step) out[row] = view.getUint8(p);
      };
    case 'I':
      return (from, to, place, step) => {
        for (let row = from, p = place; row < to; row++, p += step) out[row] = view.getInt16(p);
      };
    case 'J':
      return (from, to, place, step) => {
        for (let row = from, p = place; row < to; row++, p += step) out[row] = view.getInt32(p);
      };
    case 'K':
      return (from, to, place, step) => {
        for (let row = from, p = place; row < to; row++, p += step) {
          out[row] = view.getInt32(p) * 2 ** 32 + view.getUint32(p + 4);
        }
      };
    case 'E':
      return (from, to, place, step) => {
        for (let row = from, p = place; row < to; row++, p += step) {
          const value = view.getFloat32(p);
          out[row] = value - value === 0 ? value : Number.NaN;
        }
      };
    case 'D':
      return (from, to, place, step) => {
        for (let row = from, p = place; row < to; row++, p += step) {
          const value = view.getFloat64(p);
          out[row] = value - value === 0 ? value : Number.NaN;
        }
      };
  }
}

const TRUE = 84;
const FALSE = 70;

/** Logical cells: how many of them are true; NaN where the first is neither true nor false. */
export function fillLogical(bytes: Uint8Array, out: Float64Array, cells: number): FillRows {
  return (from, to, place, step) => {
    for (let row = from, p = place; row < to; row++, p += step) {
      let marks = 0;
      for (let i = 0; i < cells; i++) if (bytes[p + i] === TRUE) marks++;
      out[row] = bytes[p] === TRUE || bytes[p] === FALSE ? marks : Number.NaN;
    }
  };
}

/** Bit cells: how many bits are set, so that a quality column of any width is 0 where nothing is wrong. */
export function fillBits(bytes: Uint8Array, out: Float64Array, bits: number): FillRows {
  const whole = bits >> 3;
  // What fills up the last byte means nothing.
  const lastMask = (0xff00 >> (bits & 7)) & 0xff;
  return (from, to, place, step) => {
    for (let row = from, p = place; row < to; row++, p += step) {
      let set = 0;
      for (let i = 0; i < whole; i++) set += bitsSet(bytes[p + i]);
      out[row] = lastMask === 0 ? set : set + bitsSet(bytes[p + whole] & lastMask);
    }
  };
}

function bitsSet(byte: number): number {
  let set = 0;
  for (let rest = byte; rest !== 0; rest &= rest - 1) set++;
  return set;
}
