import type { Random } from '../../src/science/random.js';
import { SCENARIO } from './scenario.js';
import type { DemoStar } from './star.js';

type DemoBand = 'B' | 'V';

/** One exposure of the night: when, through what, under which sky. */
export interface Exposure {
  readonly number: number;
  readonly band: DemoBand;
  readonly mid_ms: number;
  readonly exposure_s: number;
  readonly fwhm_arcsec: number;
  readonly cloud_mag: number;
  readonly airmass: number;
  readonly sky_magPerArcsec2: number;
}

/** The invented 0.8 m: magnitude of 1 e-/s, sky, read noise, pixel. */
const ZERO_POINT = { B: 22.4, V: 22.7 };
const DARK_SKY = { B: 22.1, V: 21.2 };
const EXTINCTION = { B: 0.25, V: 0.14 };
const READ_NOISE_E = 7;
const PIXEL_ARCSEC = 0.6;
const FULL_WELL_E = 250_000;
/** Flat field and colour terms: no reading is better than this. */
const FLOOR_MAG = 0.004;

/** The timetable of the night: seeing that wanders, an hour of cloud, the field rising and setting. */
export function exposures(random: Random): Exposure[] {
  const { night } = SCENARIO;
  const first = Date.parse(night.firstMid);
  let seeing = 1.5;
  return Array.from({ length: night.frames }, (_, i) => {
    const band: DemoBand = i % 2 === 0 ? 'B' : 'V';
    const mid_ms = first + i * night.interval_min * 60_000;
    seeing = Math.max(1.1, Math.min(2.4, seeing + random.normal(0, 0.12)));
    return {
      number: i + 1,
      band,
      mid_ms,
      exposure_s: night.exposure_s[band],
      fwhm_arcsec: seeing,
      cloud_mag: cloudAt(mid_ms) * random.between(0.8, 1.1),
      airmass: airmassAt(mid_ms),
      sky_magPerArcsec2: DARK_SKY[band] + random.normal(0, 0.05),
    };
  });
}

function cloudAt(time_ms: number): number {
  const from = Date.parse(SCENARIO.clouds.from);
  const to = Date.parse(SCENARIO.clouds.to);
  return time_ms >= from && time_ms <= to ? SCENARIO.clouds.deepest_mag : 0;
}

/** Secant of the zenith distance for the demo site (latitude 40.6, the field passing near its zenith). */
function airmassAt(time_ms: number): number {
  const latitude = (40.6 * Math.PI) / 180;
  const dec = (SCENARIO.field.dec_deg * Math.PI) / 180;
  const siderealHours =
    18.697374558 + (24.06570982441908 * (time_ms - Date.UTC(2000, 0, 1, 12))) / 86_400_000;
  const hourAngle = ((siderealHours * 15 - 2.4 - SCENARIO.field.ra_deg) * Math.PI) / 180;
  const sine = Math.sin(latitude) * Math.sin(dec) + Math.cos(latitude) * Math.cos(dec) * Math.cos(hourAngle);
  return 1 / Math.max(0.2, sine);
}

/** The table of one exposure, as the invented pipeline writes it. */
export function frameTable(exposure: Exposure, stars: readonly DemoStar[], random: Random): string {
  const { band } = exposure;
  const zeroPoint = ZERO_POINT[band] - exposure.cloud_mag;
  const lines = [
    '# invented data, see demo-run/README.md',
    '# OBJECT = Invented Cluster 1',
    `# FILTER = ${band}`,
    `# DATE-OBS = ${new Date(exposure.mid_ms - exposure.exposure_s * 500).toISOString().slice(0, 19)}`,
    `# EXPTIME = ${exposure.exposure_s}`,
    `# FWHM = ${exposure.fwhm_arcsec.toFixed(2)}`,
    `# AIRMASS = ${exposure.airmass.toFixed(3)}`,
    `# ZP = ${(zeroPoint - EXTINCTION[band] * exposure.airmass + random.normal(0, 0.006)).toFixed(3)}`,
    `# SKYMAG = ${exposure.sky_magPerArcsec2.toFixed(2)}`,
    'ra,dec,mag,mag_error,flag',
  ];
  for (const star of stars) {
    const row = reading(exposure, zeroPoint, star, random);
    if (row !== undefined) lines.push(row);
  }
  return `${lines.join('\n')}\n`;
}

/** One star's row; undefined where it is lost in the noise. */
function reading(exposure: Exposure, zeroPoint: number, star: DemoStar, random: Random): string | undefined {
  const { band, exposure_s, fwhm_arcsec } = exposure;
  const truth = star[band] + (star.change?.(exposure.mid_ms) ?? 0);
  const absorbed = truth + EXTINCTION[band] * exposure.airmass;
  const electrons = exposure_s * 10 ** (-0.4 * (absorbed - zeroPoint));
  const pixels = (Math.PI * (0.8 * fwhm_arcsec) ** 2) / PIXEL_ARCSEC ** 2;
  const sky = exposure_s * 10 ** (-0.4 * (exposure.sky_magPerArcsec2 - ZERO_POINT[band])) * PIXEL_ARCSEC ** 2;
  const signalToNoise = electrons / Math.sqrt(electrons + pixels * (sky + READ_NOISE_E ** 2));
  if (signalToNoise < 6) return undefined;
  const sigma = Math.hypot(1.0857 / signalToNoise, FLOOR_MAG);
  const peak = (electrons * 0.5 * PIXEL_ARCSEC ** 2) / fwhm_arcsec ** 2;
  const mag = truth + random.normal(0, sigma);
  const jitter = 0.08 / 3600;
  const cells = [
    (star.ra_deg + random.normal(0, jitter)).toFixed(5),
    (star.dec_deg + random.normal(0, jitter)).toFixed(5),
    mag.toFixed(3),
    Math.max(0.001, sigma).toFixed(3),
    peak > FULL_WELL_E ? '1' : '0',
  ];
  return cells.join(',');
}
