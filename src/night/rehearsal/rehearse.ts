import type { FrameReadings } from '../../catalogue/frame.js';
import { safeText } from '../../catalogue/safe-text.js';
import type { Profile } from '../../follow/settings.js';
import type { Band } from '../../science/bands.js';
import type { ClassModel } from '../../science/odds/index.js';
import { Random } from '../../science/random.js';
import { NightEngine } from '../engine.js';
import { type Kind, kindsOf } from './kinds.js';
import type { MeasurementErrors } from './measurement-errors.js';
import { type DrawnStar, StarDrawer } from './star-drawer.js';
import { FlagTally, type RehearsedFlag } from './tally.js';

/** What is to be rehearsed. */
export interface RehearsalPlan {
  readonly profile: Profile;
  readonly model: ClassModel;
  readonly bands: readonly Band[];
  readonly errors: MeasurementErrors;
  readonly starsPerKind: number;
  readonly seed: number;
}

/** What a rehearsal found, for people and for programs. */
export interface Rehearsal {
  readonly bands: readonly Band[];
  readonly errors: string;
  /** Lower edges of the magnitude bins in the diagram's band, and the upper edge of the last. */
  readonly edges_mag: readonly number[];
  readonly flags: readonly RehearsedFlag[];
}

/** How far it is: kinds done, kinds in all, and the one being drawn. */
export interface RehearsalProgress {
  readonly done: number;
  readonly total: number;
  readonly kind: string;
}

/** Magnitudes that are looked at, from so much brighter than the depth to half a magnitude beyond it. */
const RANGE_MAG = 6;

/**
 * Draws so many stars of every kind as the field shows them, lets the night's own code classify and flag them, and
 * counts which flags were deserved. Kind by kind, so that a caller can show how far it is.
 */
export function* rehearse(plan: RehearsalPlan): Generator<RehearsalProgress, Rehearsal> {
  const { model, bands, errors } = plan;
  const kinds = kindsOf(model);
  const faintest = Math.floor(errors.depth_mag) + 1;
  const edges_mag = Array.from({ length: RANGE_MAG + 1 }, (_, i) => faintest - RANGE_MAG + i);
  const limits = { brightest: edges_mag[0], faintest };
  const random = new Random(plan.seed);
  const tally = new FlagTally(edges_mag, kinds);
  for (const [done, kind] of kinds.entries()) {
    yield { done, total: kinds.length, kind: kind.name };
    const drawer = new StarDrawer(model, bands, errors, kind, limits, clusterScale(plan));
    const stars = drawStars(drawer, plan.starsPerKind, random);
    if (stars.length === 0) continue;
    const raised = flagsOf(plan, kind, stars);
    stars.forEach((star, i) => {
      tally.add(kind, star.mag, raised[i], drawer.number / stars.length);
    });
  }
  yield { done: kinds.length, total: kinds.length, kind: '' };
  return { bands, errors: errors.words, edges_mag, flags: tally.flags() };
}

function drawStars(drawer: StarDrawer, count: number, random: Random): readonly DrawnStar[] {
  const stars: DrawnStar[] = [];
  if (!(drawer.number > 0)) return stars;
  while (stars.length < count) {
    const star = drawer.draw(random);
    if (star === undefined) break;
    stars.push(star);
  }
  return stars;
}

/** Codes of the flags that the night would raise, star by star. */
function flagsOf(
  { profile, bands }: RehearsalPlan,
  kind: Kind,
  stars: readonly DrawnStar[],
): readonly string[][] {
  const engine = new NightEngine(profile);
  engine.absorbReadings(readingsOf(kind.name, bands, stars));
  return stars.map((_, star) => (engine.flags.of(star)?.flags ?? []).map(flag => flag.code));
}

/** One frame with one reading of each star, each at a place of its own. */
function readingsOf(name: string, bands: readonly Band[], stars: readonly DrawnStar[]): FrameReadings {
  const column = (value: (star: DrawnStar, i: number) => number) => Float64Array.from(stars, value);
  return {
    facts: {
      name: safeText(name),
      mid_ms: Number.NaN,
      exposure_s: Number.NaN,
      fwhm_arcsec: Number.NaN,
      zeroPoint_mag: Number.NaN,
      sky_magPerArcsec2: Number.NaN,
      airmass: Number.NaN,
      object: safeText(''),
    },
    rows: stars.length,
    ids: stars.map((_, i) => safeText(`${name} ${i}`)),
    hasIds: true,
    ra_deg: column((_, i) => (i % 300) * 0.01),
    dec_deg: column((_, i) => Math.floor(i / 300) * 0.01),
    parallax_mas: column(star => star.parallax_mas),
    parallax_sigma_mas: column(star => star.parallaxSigma_mas),
    pmRa_masPerYear: column(star => star.pmRa_masPerYr),
    pmDec_masPerYear: column(star => star.pmDec_masPerYr),
    reddening_EBV: column(() => Number.NaN),
    suspect: new Uint8Array(stars.length),
    bands: bands.map((band, b) => ({
      band,
      mag: column(star => star.mags[b]),
      sigma_mag: column(star => star.sigmas_mag[b]),
    })),
  };
}

/** Turns cluster densities into the unit of the field's, so that members have their share two magnitudes above the limit. */
function clusterScale({ model, errors }: RehearsalPlan): number {
  const { memberShare, lengthScale_pc } = model.field;
  const mag = errors.depth_mag - 2;
  const inCluster = model.clusterCounts(mag);
  if (!(memberShare > 0) || !(inCluster > 0)) return 0;
  return (memberShare / (1 - memberShare)) * (model.fieldCounts(mag) / inCluster) * 2 * lengthScale_pc ** 3;
}
