import { LIMITS } from '../../limits.js';
import { asciiText } from '../parse-number.js';
import { BLOCK_BYTES, type FitsHeader, readHeader } from './header.js';

/** A header with its data. */
export interface FitsUnit {
  readonly kind: 'image' | 'binary-table' | 'ascii-table';
  readonly header: FitsHeader;
  readonly dataStart: number;
  /** Bytes of data that the header declares, without the filling of the last block. */
  readonly dataBytes: number;
}

/** Why the file could not be walked to its end. */
export interface FitsFault {
  readonly code: 'cut-short' | 'damaged' | 'too-large';
  readonly seen: string;
}

export interface FitsUnits {
  readonly units: readonly FitsUnit[];
  readonly fault: FitsFault | undefined;
}

/** Walks the headers of a file; data are stepped over by their declared sizes, never touched. */
export function readUnits(bytes: Uint8Array): FitsUnits {
  const units: FitsUnit[] = [];
  let position = 0;
  while (position < bytes.length && (position === 0 || isExtension(bytes, position))) {
    if (units.length === LIMITS.fitsUnits) {
      const seen = `parts beyond the first ${LIMITS.fitsUnits} are not read`;
      return { units, fault: { code: 'too-large', seen } };
    }
    const reading = readHeader(bytes, position);
    if (reading.kind === 'cut-short') {
      return {
        units,
        fault: { code: 'cut-short', seen: `the header of part ${units.length + 1} has no END` },
      };
    }
    if (reading.kind === 'endless') {
      const seen = `the header of part ${units.length + 1} has no END in ${LIMITS.headerLines} cards`;
      return { units, fault: { code: 'damaged', seen } };
    }
    const unit = unitOf(reading.header, reading.end);
    if (unit === undefined) {
      const seen = `the header of part ${units.length + 1} does not say how long its data are (NAXIS, BITPIX)`;
      return { units, fault: { code: 'damaged', seen } };
    }
    units.push(unit);
    position = endOf(unit);
  }
  return { units, fault: missingData(units, bytes.length) };
}

/** First byte after a unit, its last block filled up. */
export function endOf({ dataStart, dataBytes }: FitsUnit): number {
  return dataStart + Math.ceil(dataBytes / BLOCK_BYTES) * BLOCK_BYTES;
}

/** Undefined where the header does not give the length of its data. */
export function unitOf(header: FitsHeader, dataStart: number): FitsUnit | undefined {
  const dataBytes = dataLength(header);
  if (Number.isNaN(dataBytes)) return undefined;
  return { kind: kindOf(header), header, dataStart, dataBytes };
}

function kindOf(header: FitsHeader): FitsUnit['kind'] {
  const kind = header.text('XTENSION');
  // A compressed image is stored as a table (FITS Standard 4.0, 10.1), and is none.
  if (kind === 'BINTABLE' && header.text('ZIMAGE') !== 'T') return 'binary-table';
  return kind === 'TABLE' ? 'ascii-table' : 'image';
}

/** FITS Standard 4.0, equations 1, 2 and 4; NaN where a size is missing or cannot be counted with. */
function dataLength(header: FitsHeader): number {
  const axes = header.count('NAXIS');
  if (axes === 0) return 0;
  if (!(axes <= 999)) return Number.NaN;
  const isGroups = header.text('GROUPS') === 'T' && header.count('NAXIS1') === 0;
  let elements = 1;
  for (let axis = isGroups ? 2 : 1; axis <= axes; axis++) elements *= header.count(`NAXIS${axis}`);
  const groups = header.count('GCOUNT', 1) * (header.count('PCOUNT', 0) + elements);
  const length = (Math.abs(header.number('BITPIX')) / 8) * groups;
  return Number.isSafeInteger(length) ? length : Number.NaN;
}

function isExtension(bytes: Uint8Array, position: number): boolean {
  // What is shorter than the word may become it: the rest of the file has not come yet.
  const word = asciiText(bytes, position, Math.min(bytes.length, position + 8));
  return 'XTENSION'.startsWith(word);
}

function missingData(units: readonly FitsUnit[], fileBytes: number): FitsFault | undefined {
  const last = units.at(-1);
  if (last === undefined || last.dataStart + last.dataBytes <= fileBytes) return undefined;
  const there = Math.max(0, fileBytes - last.dataStart);
  const seen = `part ${units.length} declares ${last.dataBytes} bytes of data, the file has ${there} of them`;
  return { code: 'cut-short', seen };
}
