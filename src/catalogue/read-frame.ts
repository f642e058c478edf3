import { type Assignment, assignColumns } from './columns/assign.js';
import { Recogniser } from './columns/recogniser.js';
import type { BandColumn, FrameReadings } from './frame.js';
import type { InputSettings } from './input-settings.js';
import { LIMITS } from './limits.js';
import { type Problem, ProblemList } from './problems.js';
import { unpack } from './readers/gzip.js';
import { readSheet } from './readers/read-sheet.js';
import { BandNames } from './readings/band-name.js';
import type { Draft } from './readings/draft.js';
import { readFacts } from './readings/facts.js';
import { assumeErrors, finish } from './readings/finish.js';
import { readIdentifiers, withoutRepeats } from './readings/identifiers.js';
import { gatherBands } from './readings/long-table.js';
import { readBandColumns } from './readings/magnitudes.js';
import { isMagnitude, isMagnitudeError, isNoFiller, isPositive, NumberReader } from './readings/numbers.js';
import { readPositions } from './readings/positions.js';
import { readSuspect } from './readings/quality.js';
import { type SafeText, safeText } from './safe-text.js';
import type { Sheet } from './sheet.js';

/** What a file gave: its readings, or at least one problem of cost 'file'. */
export interface ReadFrame {
  /** What the file holds, unpacked: a table and its compressed copy are the same. */
  readonly content: Uint8Array;
  readonly frame: FrameReadings | undefined;
  readonly problems: readonly Problem[];
}

const UNPACKING_WORDS = {
  'cut-short': 'the gzip stream stops before its end',
  damaged: 'the gzip stream cannot be unpacked, or not to what it was',
  'too-large': `unpacked, it has more than ${LIMITS.unpacked_bytes} bytes`,
} as const;

/** Reads one photometry file. `name` is its name for people, and may hold a band as in 'M67_V_003.csv'. */
export async function readFrame(name: string, bytes: Uint8Array, input: InputSettings): Promise<ReadFrame> {
  const file = safeText(name, LIMITS.fileName_characters);
  const problems = new ProblemList(file);
  const recogniser = new Recogniser(input);
  const options = { use: recogniser.use.bind(recogniser), missing: input.missing };
  const unpacked = await unpack(bytes);
  if (unpacked.kind !== 'whole') {
    problems.add(unpacked.kind, 0, UNPACKING_WORDS[unpacked.kind]);
    return { content: bytes, frame: undefined, problems: problems.all() };
  }
  const content = unpacked.bytes;
  const sheet = await readSheet(content, options, problems);
  const frame = sheet && frameOfSheet(file, sheet, input, recogniser, problems);
  return { content, frame, problems: problems.all() };
}

/** Readings of a table that has been read from whatever format. */
export function frameOfSheet(
  file: SafeText,
  sheet: Sheet,
  input: InputSettings,
  recogniser: Recogniser,
  problems: ProblemList,
): FrameReadings | undefined {
  const columns = assignColumns(sheet.columns, recogniser, problems);
  tellMissingFlags(sheet, input, problems);
  const kept = new Uint8Array(sheet.rows).fill(1);
  const numbers = new NumberReader(sheet, kept, input.missing, problems);
  const draft = readDraft(sheet, columns, kept, numbers, input, problems);
  if (draft === undefined) return undefined;

  const bands = readBands(draft, file, sheet, columns, numbers, input, problems);
  if (bands === undefined) return undefined;
  assumeErrors(bands, kept, problems);
  const frame = finish({ ...draft, bands }, readFacts(file, sheet, columns, problems));
  if (frame.rows > 0) return frame;
  problems.add('empty-file', 0, `none of ${sheet.rows} rows has a value that can be used`);
  return undefined;
}

/** Everything of the rows but their magnitudes. */
function readDraft(
  sheet: Sheet,
  columns: Assignment,
  kept: Uint8Array,
  numbers: NumberReader,
  input: InputSettings,
  problems: ProblemList,
): Draft | undefined {
  const hasPosition = columns.has('ra') && columns.has('dec');
  const isLong = columns.has('band') && columns.has('mag');
  const found = readIdentifiers(sheet, columns.get('id')?.column, input.missing);
  const identifiers = isLong ? found : withoutRepeats(found, kept, sheet.lines, problems);
  if (!hasPosition) {
    const seen = `no right ascension and declination among the columns ${columnList(sheet)}`;
    problems.add('no-position', 0, seen, identifiers.hasIds ? 'nothing' : 'file');
    if (!identifiers.hasIds) return undefined;
  }
  const positions = readPositions(sheet, columns.get('ra'), columns.get('dec'), numbers, kept, problems);
  for (let row = 0; row < sheet.rows; row++) {
    const isPlaced = !Number.isNaN(positions.ra_deg[row]) && !Number.isNaN(positions.dec_deg[row]);
    if (isPlaced || kept[row] === 0 || identifiers.ids[row] !== '') continue;
    kept[row] = 0;
    problems.add('bad-position', sheet.lines[row], 'neither a position nor an identifier');
  }
  return {
    rows: sheet.rows,
    kept,
    lines: sheet.lines,
    ...identifiers,
    ...positions,
    parallax_mas: numbers.read(columns.get('parallax'), 'mas', isNoFiller),
    parallax_sigma_mas: numbers.read(columns.get('parallax_error'), 'mas', isPositive),
    pmRa_masPerYear: numbers.read(columns.get('pmra'), 'mas/yr', isNoFiller),
    pmDec_masPerYear: numbers.read(columns.get('pmdec'), 'mas/yr', isNoFiller),
    reddening_EBV: numbers.read(columns.get('ebv'), 'mag', isMagnitude),
    suspect: readSuspect(sheet, columns.flags, problems),
    bands: [],
  };
}

/**
 * Magnitudes by band: from a column each, else from one column whose band stands in a column of its own, or is
 * that of the whole file. Undefined when the file is of no use.
 */
function readBands(
  draft: Draft,
  file: SafeText,
  sheet: Sheet,
  columns: Assignment,
  numbers: NumberReader,
  input: InputSettings,
  problems: ProblemList,
): readonly BandColumn[] | undefined {
  const wide = readBandColumns(columns, numbers);
  if (wide.length > 0) return wide;
  if (columns.has('mag')) {
    const mag = numbers.read(columns.get('mag'), 'mag', isMagnitude);
    const sigma_mag = numbers.read(columns.get('mag_error'), 'mag', isMagnitudeError);
    const names = new BandNames(input);
    const bandColumn = columns.get('band')?.column;
    if (bandColumn?.kind === 'text') return gatherBands(draft, bandColumn, mag, sigma_mag, names, problems);
    const band = names.ofFile(sheet.header, file, problems);
    return band && [{ band, mag, sigma_mag }];
  }
  if (['parallax', 'pmra', 'ebv'].some(meaning => columns.has(meaning as 'parallax'))) return [];
  problems.add('no-data', 0, `no magnitudes and no parallaxes among the columns ${columnList(sheet)}`);
  return undefined;
}

/** A quality column that goes missing without a word would let bad readings through. */
function tellMissingFlags(sheet: Sheet, input: InputSettings, problems: ProblemList): void {
  const wanted = input.columns.flag;
  if (wanted === undefined || sheet.names.some(name => name === wanted.trim())) return;
  problems.add(
    'missing-column',
    0,
    `no '${wanted}' (flag in the profile) among the columns ${columnList(sheet)}`,
  );
}

const NAMES_TOLD = 12;

function columnList(sheet: Sheet): string {
  const names = sheet.names.slice(0, NAMES_TOLD).join(', ');
  return sheet.names.length > NAMES_TOLD ? `${names} and ${sheet.names.length - NAMES_TOLD} more` : names;
}
