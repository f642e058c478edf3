import { parse as parseToml, TomlError } from 'smol-toml';
import type { z } from 'zod';
import { DEFAULT_FLAGS } from '../../follow/flags/index.js';
import type { FlagSetting, Profile, Setup } from '../../follow/settings.js';
import { lineOfKey } from './line-of-key.js';
import { nearestWord } from './nearest-word.js';
import { type ProfileFile, profileSchema } from './schema.js';

/** One thing wrong with a profile, ready to print: 'file:line: key: saw ..., expected ...'. */
export interface ProfileProblem {
  readonly line: number;
  readonly text: string;
}

/** A profile, or everything that is wrong with it. */
export type ParsedProfile =
  | { readonly profile: Profile; readonly problems: readonly [] }
  | { readonly profile: undefined; readonly problems: readonly ProfileProblem[] };

/** Reads a profile from its TOML text; `fileName` is for the messages. */
export function parseProfile(text: string, fileName: string): ParsedProfile {
  let raw: unknown;
  try {
    raw = parseToml(text);
  } catch (error) {
    if (!(error instanceof TomlError)) throw error;
    const reason = error.message.split('\n')[0].replace(/^Invalid TOML document: /, '');
    return failed([{ line: error.line, text: `${fileName}:${error.line}: not TOML: ${reason}` }]);
  }
  const result = profileSchema.safeParse(raw);
  if (result.success) return { profile: toProfile(result.data), problems: [] };
  return failed(result.error.issues.flatMap(issue => describe(issue, raw, text, fileName)));
}

function failed(problems: readonly ProfileProblem[]): ParsedProfile {
  return { profile: undefined, problems };
}

function describe(issue: z.core.$ZodIssue, raw: unknown, text: string, fileName: string): ProfileProblem[] {
  if (issue.code === 'unrecognized_keys') {
    return issue.keys.map(key => {
      const path = [...issue.path, key];
      const known = knownKeys(issue.path);
      const near = nearestWord(key, known);
      const hint = near === undefined ? `known here: ${known.join(', ')}` : `did you mean '${near}'?`;
      return place(path, text, fileName, `unknown key; ${hint}`);
    });
  }
  const seen = valueAt(raw, issue.path);
  const saw = seen === undefined ? 'missing' : `saw ${JSON.stringify(seen)}`;
  return [place(issue.path, text, fileName, `${saw}, expected ${expectation(issue)}`)];
}

function place(path: readonly PropertyKey[], text: string, fileName: string, words: string): ProfileProblem {
  const line = lineOfKey(text, path);
  return { line, text: `${fileName}:${line}: ${keyText(path)}: ${words}` };
}

function expectation(issue: z.core.$ZodIssue): string {
  switch (issue.code) {
    case 'too_small':
      return issue.origin === 'number' || issue.origin === 'int'
        ? `at least ${issue.minimum}${issue.inclusive === false ? ' (exclusive)' : ''}`
        : issue.origin === 'array'
          ? `at least ${issue.minimum} entry`
          : 'some text';
    case 'too_big':
      return issue.origin === 'string' ? `at most ${issue.maximum} characters` : `at most ${issue.maximum}`;
    case 'invalid_type':
      return issue.expected === 'string'
        ? 'text in quotes'
        : issue.expected === 'array'
          ? 'a list ([[...]])'
          : issue.expected === 'tuple'
            ? 'a pair ([azimuth, altitude])'
            : `a ${issue.expected}`;
    case 'invalid_value':
      return `one of ${issue.values.join(', ')}`;
    case 'invalid_union':
      return issue.discriminator === 'kind' ? "kind = 'imager' or 'spectrograph'" : 'another kind of value';
    default:
      return issue.message;
  }
}

/** site.latitude_deg, setup 2 . band */
function keyText(path: readonly PropertyKey[]): string {
  return path.map(part => (typeof part === 'number' ? `#${part + 1}` : String(part))).join('.');
}

function valueAt(raw: unknown, path: readonly PropertyKey[]): unknown {
  let value = raw;
  for (const part of path) {
    if (typeof value !== 'object' || value === null) return undefined;
    value = (value as Record<PropertyKey, unknown>)[part];
  }
  return value;
}

/** The keys the schema knows at a path, for suggestions. */
function knownKeys(path: readonly PropertyKey[]): string[] {
  let schema: unknown = profileSchema;
  for (const part of path) {
    const inner = unwrap(schema);
    if ('element' in inner) schema = inner.element;
    else if ('shape' in inner) schema = (inner.shape as Record<PropertyKey, unknown>)[part];
    else if ('options' in inner)
      schema = {
        shape: Object.assign({}, ...inner.options.map((option: { shape: object }) => option.shape)),
      };
  }
  const last = unwrap(schema);
  if ('options' in last)
    return [
      ...new Set(last.options.flatMap((option: { shape: object }) => Object.keys(option.shape)) as string[]),
    ];
  return 'shape' in last ? Object.keys(last.shape as object) : [];
}

// biome-ignore lint/suspicious/noExplicitAny: walks the schema library's own objects, whose inner types differ by kind.
function unwrap(schema: any): any {
  let inner = schema;
  while (inner?.def?.innerType !== undefined) inner = inner.def.innerType;
  return inner ?? {};
}

function toProfile(file: ProfileFile): Profile {
  return {
    name: file.name,
    site: {
      name: file.site.name,
      latitude_deg: file.site.latitude_deg,
      longitude_deg: file.site.longitude_deg,
      height_m: file.site.height_m,
      timeZone: file.site.time_zone,
      minAltitude_deg: file.site.min_altitude_deg,
      maxAirmass: file.site.max_airmass,
      sunLimit_deg: file.site.sun_limit_deg,
      zenithLimit_deg: file.site.zenith_limit_deg,
      horizon: file.site.horizon,
      moonDistance_deg: file.site.moon_distance_deg,
      seeing_arcsec: file.site.seeing_arcsec,
    },
    telescope: file.telescope,
    bands: file.band.map(entry => ({
      band: entry.band,
      throughput: entry.throughput,
      extinction_magPerAirmass: entry.extinction_mag_per_airmass,
      darkSky_magPerArcsec2: entry.dark_sky_mag_per_arcsec2,
    })),
    setups: file.setup.map(toSetup),
    field: {
      name: file.field.name,
      population: file.field.population,
      modulus_mag: file.field.modulus_mag ?? Number.NaN,
      modulusSigma_mag: file.field.modulus_sigma_mag,
      memberShare: file.field.member_share,
      pmRa_masPerYear: file.field.pm_ra_mas_per_year ?? Number.NaN,
      pmDec_masPerYear: file.field.pm_dec_mas_per_year ?? Number.NaN,
      pmSigma_masPerYear: file.field.pm_sigma_mas_per_year,
      fieldPmSigma_masPerYear: file.field.field_pm_sigma_mas_per_year,
      age_Gyr: file.field.age_Gyr ?? Number.NaN,
      extinction_AV: file.field.extinction_AV ?? 0,
      extinctionSigma_AV: file.field.extinction_sigma_AV,
      lengthScale_pc: file.field.length_scale_pc,
      parallaxZeroPoint_mas: file.field.parallax_zero_point_mas,
      dust: file.field.dust && {
        extinction_AVPerKpc: file.field.dust.extinction_AV_per_kpc,
        scaleHeight_pc: file.field.dust.scale_height_pc,
        latitude_deg: file.field.dust.latitude_deg,
        patchiness: file.field.dust.patchiness,
      },
      floor_mag: file.field.floor_mag,
      bandFloor_mag: Object.fromEntries(
        file.band.flatMap(entry => (entry.floor_mag === undefined ? [] : [[entry.band, entry.floor_mag]])),
      ),
      classScale: file.field.class_scale,
    },
    flags: Object.fromEntries(
      Object.entries(DEFAULT_FLAGS).map(([code, setting]) => [code, merged(setting, file.flags[code])]),
    ),
    input: {
      columns: file.columns,
      band: file.input.band,
      matchRadius_arcsec: file.input.match_radius_arcsec,
      missing: file.input.missing.map(String),
    },
  };
}

function merged(
  setting: FlagSetting,
  given: { on: boolean; threshold?: number | undefined; weight?: number | undefined } | undefined,
): FlagSetting {
  if (given === undefined) return setting;
  return {
    on: given.on,
    threshold: given.threshold ?? setting.threshold,
    weight: given.weight ?? setting.weight,
  };
}

function toSetup(file: ProfileFile['setup'][number]): Setup {
  const common = {
    name: file.name,
    detector: {
      pixel_arcsec: file.pixel_arcsec,
      readNoise_e: file.read_noise_e,
      gain_ePerAdu: file.gain_e_per_adu,
      dark_ePerS: file.dark_e_per_s,
      fullWell_e: file.full_well_e,
      bits: file.bits,
      readout_s: file.readout_s,
    },
    targetSnr: file.target_snr,
    maxSingle_s: file.max_single_s,
    minCount: file.min_count,
    acquire_s: file.acquire_s,
    maxTotal_s: file.max_total_s,
  };
  if (file.kind === 'imager') return { kind: 'imager', ...common, band: file.band };
  return {
    kind: 'spectrograph',
    ...common,
    wavelength_nm: file.wavelength_nm,
    slit_arcsec: file.slit_arcsec,
    dispersion_nmPerPixel: file.dispersion_nm_per_pixel,
    resolution_nm: file.resolution_nm,
    throughput: file.throughput,
  };
}
