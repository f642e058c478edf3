import { z } from 'zod';
import { isMeaning } from '../../catalogue/columns/meanings.js';
import { DEFAULT_FLAGS } from '../../follow/flags/index.js';
import { BANDS } from '../../science/bands.js';
import { CLASSES } from '../../science/classes.js';

/** A number within limits, in the words of an observer. */
const between = (low: number, high: number) => z.number().min(low).max(high);
const positive = z.number().gt(0);
const band = z.enum(BANDS);
const text = z.string().min(1).max(80);

const site = z.strictObject({
  name: text,
  latitude_deg: between(-90, 90),
  longitude_deg: between(-180, 180),
  height_m: between(-430, 9000),
  time_zone: z.string().default('UTC').refine(isTimeZone, 'an IANA time zone such as "Europe/Madrid"'),
  min_altitude_deg: between(5, 89).default(25),
  max_airmass: between(1, 10).default(2.3),
  sun_limit_deg: between(-30, -6).default(-15),
  zenith_limit_deg: between(0, 45).default(0),
  horizon: z
    .array(z.tuple([between(0, 360), between(0, 89)]))
    .max(1000)
    .default([])
    .refine(corners => corners.every(([azimuth], i) => i === 0 || azimuth >= corners[i - 1][0]), {
      message: 'corners [azimuth, altitude] in order of azimuth, from north through east',
    }),
  moon_distance_deg: between(0, 180).default(25),
  seeing_arcsec: between(0.2, 10),
});

const telescope = z.strictObject({
  aperture_m: between(0.05, 50),
  obstruction: between(0, 0.9).default(0),
});

const bandSettings = z.strictObject({
  band,
  throughput: between(0.001, 1),
  extinction_mag_per_airmass: between(0, 3),
  dark_sky_mag_per_arcsec2: between(5, 25),
  floor_mag: between(0, 1).optional(),
});

const detector = {
  pixel_arcsec: between(0.01, 10),
  read_noise_e: between(0, 1000),
  gain_e_per_adu: between(0.01, 1000),
  dark_e_per_s: between(0, 1000),
  full_well_e: between(1000, 1e8),
  bits: between(8, 32),
  readout_s: between(0, 600),
};

const setupCommon = {
  name: text,
  ...detector,
  target_snr: between(3, 2000),
  max_single_s: positive,
  min_count: z.int().min(1).max(1000).default(1),
  acquire_s: between(0, 3600),
  max_total_s: positive.default(10_800),
};

const setup = z.discriminatedUnion('kind', [
  z.strictObject({ kind: z.literal('imager'), ...setupCommon, band }),
  z.strictObject({
    kind: z.literal('spectrograph'),
    ...setupCommon,
    wavelength_nm: between(300, 2500),
    slit_arcsec: between(0.1, 30),
    dispersion_nm_per_pixel: between(0.0001, 10),
    resolution_nm: between(0.0001, 50),
    throughput: between(0.0001, 1),
  }),
]);

/** Dust along the line of sight, where one value for the whole field would be wrong for the near stars. */
const dust = z.strictObject({
  latitude_deg: between(-90, 90),
  extinction_AV_per_kpc: between(0, 10).default(0.8),
  scale_height_pc: between(10, 1000).default(120),
  patchiness: between(0, 2).default(0.4),
});

const field = z
  .strictObject({
    name: text.default('field'),
    population: z.enum(['field', 'disc-cluster', 'halo', 'ob-association']).default('field'),
    modulus_mag: between(0, 20).optional(),
    modulus_sigma_mag: between(0.001, 3).default(0.1),
    member_share: between(0, 1).default(0),
    pm_ra_mas_per_year: between(-10_000, 10_000).optional(),
    pm_dec_mas_per_year: between(-10_000, 10_000).optional(),
    pm_sigma_mas_per_year: between(0.01, 100).default(0.5),
    field_pm_sigma_mas_per_year: between(0.1, 1000).default(8),
    age_Gyr: between(0.001, 14).optional(),
    extinction_AV: between(0, 30).optional(),
    extinction_sigma_AV: between(0, 10).default(0.05),
    length_scale_pc: between(10, 100_000).default(1350),
    parallax_zero_point_mas: between(-1, 1).default(0),
    dust: dust.optional(),
    floor_mag: between(0, 1).default(0.02),
    class_scale: z.partialRecord(z.enum(CLASSES), positive).default({}),
  })
  .refine(value => value.member_share === 0 || value.modulus_mag !== undefined, {
    path: ['modulus_mag'],
    message: 'a distance modulus, since member_share says that there is a cluster',
  })
  .refine(value => value.dust === undefined || value.extinction_AV === undefined, {
    path: ['extinction_AV'],
    message: 'no extinction_AV beside [field.dust], which says how it grows with distance',
  });

const flag = z.strictObject({
  on: z.boolean().default(true),
  threshold: between(0, 1).optional(),
  weight: between(0, 100).optional(),
});

const input = z.strictObject({
  band: band.optional(),
  match_radius_arcsec: between(0.05, 60).default(1.5),
  missing: z.array(z.union([z.string(), z.number()])).default([]),
});

/** The whole profile file. Every default is written out in profiles/template.toml. */
export const profileSchema = z
  .strictObject({
    name: text,
    site,
    telescope,
    band: z.array(bandSettings).min(1),
    setup: z.array(setup).default([]),
    field: field.prefault({}),
    flags: z
      .strictObject(Object.fromEntries(Object.keys(DEFAULT_FLAGS).map(code => [code, flag.optional()])))
      .default({}),
    input: input.prefault({}),
    columns: z.record(z.string(), z.string()).default({}),
  })
  .superRefine((profile, context) => {
    for (const meaning of Object.keys(profile.columns)) {
      if (isMeaning(meaning)) continue;
      context.addIssue({
        code: 'custom',
        path: ['columns', meaning],
        message: 'a meaning such as ra, dec, parallax, "mag.V" or "mag_error.V" before the =',
      });
    }
    const known = new Set(profile.band.map(entry => entry.band));
    profile.setup.forEach((entry, i) => {
      if (entry.kind === 'imager' && !known.has(entry.band)) {
        context.addIssue({
          code: 'custom',
          path: ['setup', i, 'band'],
          message: `one of the bands described in [[band]]: ${[...known].join(', ')}`,
        });
      }
    });
  });

export type ProfileFile = z.output<typeof profileSchema>;

function isTimeZone(name: string): boolean {
  try {
    new Intl.DateTimeFormat('en', { timeZone: name });
    return true;
  } catch {
    return false;
  }
}
