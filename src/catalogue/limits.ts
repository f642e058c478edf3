/** What a file may cost: beyond these, a coded problem, never a crash. */
export const LIMITS = {
  file_bytes: 2 ** 30,
  /** What a compressed file may swell to. */
  unpacked_bytes: 2 ** 29,
  rows: 5_000_000,
  columns: 512,
  cell_bytes: 4096,
  line_bytes: 1_000_000,
  headerLines: 10_000,
  /** Headers with their data in one FITS file. */
  fitsUnits: 1000,
  /** Longest cleaned text kept of a cell or header value. */
  text_characters: 400,
  identifier_characters: 64,
  unit_characters: 32,
  fileName_characters: 200,
  problem_characters: 600,
  /** Unreadable cells whose text is kept for the message. */
  unreadableCells: 1000,
  /** Problems of one kind told one by one in one file. */
  problemsOfAKind: 10,
} as const;
