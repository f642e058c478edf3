import { BANDS, type Band, isBand } from '../../science/bands.js';
import { NameIndex } from '../columns/name-index.js';
import { DOUBTFUL_STEMS } from '../columns/names.js';
import type { InputSettings } from '../input-settings.js';
import type { ProblemList } from '../problems.js';
import type { SafeText } from '../safe-text.js';

/** A known band; or the one it may be (R without Johnson or Cousins); or neither. */
export interface BandReading {
  readonly band: Band | undefined;
  readonly maybe: Band | undefined;
}

const UNKNOWN: BandReading = { band: undefined, maybe: undefined };

/** Words that name a photometric system, with the bands that its letters stand for. */
const SYSTEMS: readonly { readonly words: RegExp; readonly bands: readonly Band[] }[] = [
  { words: /cousins|kron|bessell?|landolt/i, bands: ['U', 'B', 'V', 'Rc', 'Ic'] },
  { words: /johnson/i, bands: ['U', 'B', 'V'] },
  { words: /pan-?starrs|ps1/i, bands: ['gP1', 'rP1', 'iP1', 'zP1', 'yP1'] },
  { words: /sdss|sloan/i, bands: ['u', 'g', 'r', 'i', 'z'] },
  { words: /2mass/i, bands: ['J', 'H', 'Ks'] },
  { words: /gaia/i, bands: ['G', 'BP', 'RP'] },
];

const HEADER_KEYS = ['FILTER', 'BAND', 'FILTNAM', 'FILTER1', 'PASSBAND'];

/** Reads names of bands as headers, file names and band columns write them. */
export class BandNames {
  private readonly names = new NameIndex();
  private readonly settled = new Map<string, Band>();

  constructor(private readonly input: InputSettings) {
    for (const band of BANDS) {
      const own = input.columns[`mag.${band}`];
      if (own !== undefined) this.settled.set(own.trim(), band);
    }
  }

  read(text: string): BandReading {
    const name = text.trim();
    const settled = this.settled.get(name);
    if (settled !== undefined) return { band: settled, maybe: undefined };
    if (isBand(name)) return { band: name, maybe: undefined };
    const system = SYSTEMS.find(candidate => candidate.words.test(name));
    if (system !== undefined) return inSystem(name.replace(system.words, ''), system.bands);
    const { meanings, doubtful } = this.names.read(name);
    const bands = meanings
      .filter(meaning => meaning.startsWith('mag.'))
      .map(meaning => meaning.slice(4) as Band);
    if (bands.length !== 1) return UNKNOWN;
    if (doubtful && bands[0] !== this.input.band) return { band: undefined, maybe: bands[0] };
    return { band: bands[0], maybe: undefined };
  }

  /** Band of a file with one plain magnitude column: its header, else its name, else the profile. */
  ofFile(header: ReadonlyMap<string, SafeText>, file: string, problems: ProblemList): Band | undefined {
    const key = HEADER_KEYS.find(candidate => header.has(candidate));
    if (key !== undefined) {
      const name = header.get(key) ?? '';
      const reading = this.read(name);
      if (reading.band === undefined)
        problems.add('unknown-band', 0, wording(`${key} is '${name}'`, reading));
      return reading.band;
    }
    const tokens = nameTokens(file);
    if (tokens.length === 1) {
      const reading = this.read(tokens[0]);
      if (reading.band === undefined) {
        problems.add('unknown-band', 0, wording(`the file name says '${tokens[0]}'`, reading));
      }
      return reading.band;
    }
    if (this.input.band === undefined) {
      problems.add('no-band', 0, 'there are magnitudes, but neither header nor file name says in which band');
    }
    return this.input.band;
  }
}

/** What to say of a band name that was not understood. */
export function wording(seen: string, reading: BandReading): string {
  return reading.maybe === undefined
    ? `${seen}, expected one of ${BANDS.join(' ')}`
    : `${seen}, which may be Johnson or Cousins`;
}

/** 'R' of a system whose bands include 'Rc'; letters fold where that leaves one band. */
function inSystem(rest: string, bands: readonly Band[]): BandReading {
  const letter = rest.replace(/[^A-Za-z]/g, '').replace(/filter|band/i, '');
  const band =
    bands.find(candidate => candidate === letter) ??
    bands.find(candidate => candidate.toLowerCase() === letter.toLowerCase()) ??
    bands.find(candidate => candidate.length > 1 && candidate[0].toLowerCase() === letter.toLowerCase());
  return { band, maybe: undefined };
}

/** Parts of a file name that are a band's name and nothing else, as V in 'M67_V_003.csv'. */
function nameTokens(file: string): string[] {
  const stem = file.replace(/(\.[A-Za-z]{2,5})+$/, '');
  return stem.split(/[^A-Za-z0-9]+/).filter(token => isBand(token) || Object.hasOwn(DOUBTFUL_STEMS, token));
}
