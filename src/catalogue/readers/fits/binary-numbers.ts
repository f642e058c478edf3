/** Rows that are read in one go: few enough that their bytes stay close to the processor for all columns. */
export const BATCH_ROWS = 4096;

/** Fills rows [from, to) of one column: `place` is the cell of row `from` in the table, `step` a row's bytes. */
export type FillRows = (from: number, to: number, place: number, step: number) => void;

/** Which of its two words is the low one of an eight-byte number on this machine. */
const LOW_WORD = new Uint8Array(Uint32Array.of(1).buffer)[0] === 1 ? 0 : 1;

/** The stored numbers of one type, most significant byte first (FITS Standard 4.0, 5.2 and 5.3), as doubles. */
export function filler(
  type: 'B' | 'I' | 'J' | 'K' | 'E' | 'D',
  bytes: Uint8Array,
  out: Float64Array,
): FillRows {
  switch (type) {
    case 'B':
      return (from, to, place, step) => {
        for (let row = from, p = place; row < to; row++, p += step) out[row] = bytes[p];
      };
    case 'I':
      return (from, to, place, step) => {
        for (let row = from, p = place; row < to; row++, p += step) {
          out[row] = ((bytes[p] << 24) >> 16) | bytes[p + 1];
        }
      };
    case 'J':
      return (from, to, place, step) => {
        for (let row = from, p = place; row < to; row++, p += step) out[row] = word(bytes, p);
      };
    case 'K':
      return (from, to, place, step) => {
        for (let row = from, p = place; row < to; row++, p += step) {
          out[row] = word(bytes, p) * 2 ** 32 + (word(bytes, p + 4) >>> 0);
        }
      };
    case 'E':
      return fillSingles(bytes, out);
    case 'D':
      return fillDoubles(bytes, out);
  }
}

function word(bytes: Uint8Array, p: number): number {
  return (bytes[p] << 24) | (bytes[p + 1] << 16) | (bytes[p + 2] << 8) | bytes[p + 3];
}

/** Bit patterns are put together as whole words and read back as what they mean: no call for each cell. */
function fillSingles(bytes: Uint8Array, out: Float64Array): FillRows {
  const words = new Int32Array(Math.min(BATCH_ROWS, out.length));
  const singles = new Float32Array(words.buffer);
  return (from, to, place, step) => {
    const count = to - from;
    for (let i = 0, p = place; i < count; i++, p += step) words[i] = word(bytes, p);
    for (let i = 0; i < count; i++) out[from + i] = singles[i];
  };
}

function fillDoubles(bytes: Uint8Array, out: Float64Array): FillRows {
  const words = new Int32Array(out.buffer, out.byteOffset, 2 * out.length);
  return (from, to, place, step) => {
    for (let row = from, p = place; row < to; row++, p += step) {
      words[2 * row + 1 - LOW_WORD] = word(bytes, p);
      words[2 * row + LOW_WORD] = word(bytes, p + 4);
    }
  };
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
