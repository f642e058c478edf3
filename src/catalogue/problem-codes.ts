/** What a problem cost: only that row, the whole file, or nothing (but the observer should know). */
export type Cost = 'row' | 'file' | 'nothing';

/** Meaning of a code for the documentation, and the advice that ends its message. */
export interface CodeWording {
  readonly cause: string;
  readonly remedy: string;
  readonly cost: Cost;
}

/** Every code that reading a file can give. */
export const PROBLEM_CODES = {
  unreadable: {
    cause: 'The file cannot be opened or read.',
    remedy: 'Check its permissions and the disk.',
    cost: 'file',
  },
  'not-regular': {
    cause: 'A directory, link, pipe or device stands where a file should be.',
    remedy: 'Only ordinary files are read.',
    cost: 'file',
  },
  'not-a-table': {
    cause: 'The content is not a table that can be read.',
    remedy: 'Write the photometry as a table with a header line.',
    cost: 'file',
  },
  'empty-file': {
    cause: 'The file has no rows.',
    remedy: 'Check the reduction of this frame.',
    cost: 'file',
  },
  'too-large': {
    cause: 'The file, a line or a cell is larger than is read.',
    remedy: 'Split the table, or leave columns out.',
    cost: 'file',
  },
  'cut-short': {
    cause: 'The file ends before what it declares.',
    remedy: 'Write or copy it again; it is read anew as soon as it changes.',
    cost: 'file',
  },
  damaged: {
    cause: 'The content breaks the rules of its own format.',
    remedy: 'Write or copy the file again.',
    cost: 'file',
  },
  'more-tables': {
    cause: 'The file holds further tables with usable columns.',
    remedy: 'Write one file a table if they are wanted too.',
    cost: 'nothing',
  },
  'no-header': {
    cause: 'No line names the columns.',
    remedy: 'Put a line with the column names before the first row.',
    cost: 'file',
  },
  'no-position': {
    cause: 'No column holds positions.',
    remedy: 'Name the columns in the profile, for example ra = "ALPHA" and dec = "DELTA" under [columns].',
    cost: 'file',
  },
  'no-data': {
    cause: 'No column holds magnitudes or parallaxes.',
    remedy: 'Name a magnitude column in the profile, for example "mag.V" = "VCAL" under [columns].',
    cost: 'file',
  },
  'no-band': {
    cause: 'The band of the magnitudes is not known.',
    remedy:
      'Write "# FILTER = V" at the top, _V_ in the file name, or band = "V" under [input] of the profile.',
    cost: 'file',
  },
  'unknown-band': {
    cause: 'A band name that is not known, or that may be one of two.',
    remedy: 'Say in the profile which band it is, for example "mag.Rc" = "R" under [columns].',
    cost: 'file',
  },
  'ambiguous-column': {
    cause: 'A column could mean two things, or two columns the same thing.',
    remedy: 'Until then it is not used.',
    cost: 'nothing',
  },
  'missing-column': {
    cause: 'A column named in the profile is not in the file.',
    remedy: 'Correct the name under [columns] of the profile.',
    cost: 'nothing',
  },
  'unknown-unit': {
    cause: 'A column in a unit that cannot be converted.',
    remedy: 'The column is not used; write it in one of these units.',
    cost: 'nothing',
  },
  'text-column': {
    cause: 'A column that should hold numbers holds text.',
    remedy: 'The column is not used; write plain numbers with a decimal point.',
    cost: 'nothing',
  },
  'many-values': {
    cause: 'A column with several values a row.',
    remedy: 'The column is not used; write one value a row.',
    cost: 'nothing',
  },
  'row-width': {
    cause: 'A row has more or fewer cells than the header.',
    remedy: 'Write the row again; a cell with the separator in it needs quotes.',
    cost: 'row',
  },
  'open-quote': {
    cause: 'A quoted cell is never closed.',
    remedy: 'Close the quotes, or double a quote that belongs to the text.',
    cost: 'row',
  },
  'bad-number': {
    cause: 'A cell that should be a number is not one.',
    remedy: 'Correct the cell, or leave it empty.',
    cost: 'row',
  },
  'bad-position': {
    cause: 'A right ascension or declination that cannot be.',
    remedy: 'Correct the position.',
    cost: 'row',
  },
  'repeated-star': {
    cause: 'A star has two readings in one band in one file.',
    remedy: 'The first is kept; write one file per exposure.',
    cost: 'row',
  },
  'repeated-ids': {
    cause: 'Identifiers that stand for several rows each do not tell stars apart.',
    remedy: 'Stars are matched by position instead.',
    cost: 'nothing',
  },
  'no-errors': {
    cause: 'Magnitudes without errors.',
    remedy: 'Give an error column, for example "mag_error.V" = "VERR" under [columns] of the profile.',
    cost: 'nothing',
  },
  'all-suspect': {
    cause: 'The quality columns speak against nearly every row.',
    remedy: 'If their non-zero values mean good rows, rename them.',
    cost: 'nothing',
  },
  'bad-time': {
    cause: 'The time of the exposure cannot be used.',
    remedy:
      'Write "# DATE-OBS = 2026-11-08T21:14:03" (UTC, start) and "# EXPTIME = 60" (seconds) at the top.',
    cost: 'nothing',
  },
} as const satisfies Readonly<Record<string, CodeWording>>;

export type ProblemCode = keyof typeof PROBLEM_CODES;
