import { BANDS, type Band } from '../../science/bands.js';
import { COLOURS, type Meaning, PLAIN_MEANINGS } from './meanings.js';
import {
  ARCHIVE_COLOURS,
  ARCHIVE_MAG_ERRORS,
  ARCHIVE_MAGS,
  BAND_STEMS,
  COLOUR_ERROR_PATTERNS,
  COLOUR_PATTERNS,
  DOUBTFUL_STEMS,
  FLUX_OVER_ERROR_PATTERNS,
  MAG_ERROR_PATTERNS,
  MAG_PATTERNS,
  PLAIN_NAMES,
} from './names.js';

/** What a column name can mean. */
export interface NameReading {
  /** None: not recognised. Several: it could be any of them. */
  readonly meanings: readonly Meaning[];
  /** The name leaves the system open, such as R without Johnson or Cousins. */
  readonly doubtful: boolean;
  /** The unit that the name ends with, such as 'deg' in 'ra_deg'; '' when it has none. */
  readonly unit: string;
}

/** Bare stems that usually are something else: y is a place on the detector. */
const NEVER_BARE: readonly string[] = ['y'];

const UNIT_ENDINGS: Readonly<Record<string, string>> = {
  _deg: 'deg',
  _degrees: 'deg',
  _rad: 'rad',
  _hours: 'hourangle',
  _hourangle: 'hourangle',
  _mas: 'mas',
  _arcsec: 'arcsec',
  _masyr: 'mas/yr',
  _mas_yr: 'mas/yr',
  _masperyear: 'mas/yr',
  _mag: 'mag',
  _mmag: 'mmag',
};

/** Looks column names up: spelled exactly, else without regard to capitals, else without a unit at the end. */
export class NameIndex {
  private readonly exact = new Map<string, Set<Meaning>>();
  private readonly folded = new Map<string, Set<Meaning>>();
  private readonly doubtful = new Map<string, Meaning>();

  constructor() {
    for (const meaning of PLAIN_MEANINGS) for (const name of PLAIN_NAMES[meaning]) this.add(name, meaning);
    for (const band of BANDS) this.addBand(band);
    for (const [blue, red] of COLOURS) this.addColour(blue, red);
    for (const [name, [blue, red]] of Object.entries(ARCHIVE_COLOURS)) {
      addTo(this.exact, name, `colour.${blue}-${red}`);
    }
    for (const [stem, band] of Object.entries(DOUBTFUL_STEMS)) {
      for (const pattern of MAG_PATTERNS) this.doubtful.set(unify(fill(pattern, stem)), `mag.${band}`);
    }
    for (const name of ['V-R', 'V_R']) this.doubtful.set(unify(name), 'colour.V-Rc');
    for (const name of ['V-I', 'V_I']) this.doubtful.set(unify(name), 'colour.V-Ic');
    for (const name of ['R-I', 'R_I']) this.doubtful.set(unify(name), 'colour.Rc-Ic');
  }

  read(name: string): NameReading {
    const whole = this.lookUp(name);
    if (whole.meanings.length > 0) return { ...whole, unit: '' };
    for (const [ending, unit] of Object.entries(UNIT_ENDINGS)) {
      if (!unify(name).toLowerCase().endsWith(ending)) continue;
      const short = this.lookUp(name.slice(0, -ending.length));
      if (short.meanings.length > 0) return { ...short, unit };
    }
    return { meanings: [], doubtful: false, unit: '' };
  }

  private lookUp(name: string): { readonly meanings: readonly Meaning[]; readonly doubtful: boolean } {
    const unified = unify(name);
    const doubt = this.doubtful.get(unified);
    if (doubt !== undefined) return { meanings: [doubt], doubtful: true };
    const found = [...(this.exact.get(unified) ?? this.folded.get(unified.toLowerCase()) ?? [])];
    // G-RP is a colour, G_RP may be the band: only the dash is a minus sign.
    const colours = name.includes('-') ? found.filter(meaning => meaning.startsWith('colour')) : [];
    return { meanings: colours.length > 0 ? colours : found, doubtful: false };
  }

  private addBand(band: Band): void {
    for (const stem of BAND_STEMS[band]) {
      for (const pattern of MAG_PATTERNS) {
        if (pattern !== '{}' || !NEVER_BARE.includes(stem)) this.add(fill(pattern, stem), `mag.${band}`);
      }
      for (const pattern of MAG_ERROR_PATTERNS) this.add(fill(pattern, stem), `mag_error.${band}`);
      for (const pattern of FLUX_OVER_ERROR_PATTERNS)
        this.add(fill(pattern, stem), `flux_over_error.${band}`);
    }
    for (const name of ARCHIVE_MAGS[band] ?? []) this.add(name, `mag.${band}`);
    for (const name of ARCHIVE_MAG_ERRORS[band] ?? []) this.add(name, `mag_error.${band}`);
  }

  private addColour(blue: Band, red: Band): void {
    for (const a of BAND_STEMS[blue]) {
      for (const b of BAND_STEMS[red]) {
        const name = (pattern: string) => pattern.replace('{a}', a).replace('{b}', b);
        for (const pattern of COLOUR_PATTERNS) this.add(name(pattern), `colour.${blue}-${red}`);
        for (const pattern of COLOUR_ERROR_PATTERNS) this.add(name(pattern), `colour_error.${blue}-${red}`);
      }
    }
  }

  private add(name: string, meaning: Meaning): void {
    const unified = unify(name);
    addTo(this.exact, unified, meaning);
    addTo(this.folded, unified.toLowerCase(), meaning);
  }
}

function addTo(index: Map<string, Set<Meaning>>, name: string, meaning: Meaning): void {
  const meanings = index.get(name);
  if (meanings === undefined) index.set(name, new Set([meaning]));
  else meanings.add(meaning);
}

function fill(pattern: string, stem: string): string {
  return pattern.replace('{}', stem);
}

function unify(name: string): string {
  return name.trim().replace(/[-. ]/g, '_');
}
