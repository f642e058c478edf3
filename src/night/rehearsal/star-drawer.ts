import { BAND_INDEX, type Band } from '../../science/bands.js';
import { coneVolume, drawDistance_pc } from '../../science/distance/draw-distance.js';
import type { ClassModel } from '../../science/odds/index.js';
import type { Random } from '../../science/random.js';
import { drawProperMotion_masPerYr } from '../../science/tangential-velocity.js';
import type { Kind, Source } from './kinds.js';
import type { MeasurementErrors } from './measurement-errors.js';

/** A made-up star as a survey would measure it. */
export interface DrawnStar {
  /** Apparent magnitude in the diagram's band without noise. */
  readonly mag: number;
  readonly mags: readonly number[];
  readonly sigmas_mag: readonly number[];
  readonly parallax_mas: number;
  readonly parallaxSigma_mas: number;
  readonly pmRa_masPerYr: number;
  readonly pmDec_masPerYr: number;
}

/** Nothing is drawn from further than this many sigma of its sequence beyond the limit. */
const SCATTER_ROOM_MAG = 2;
/** Absolute V of cool companions, from early to late M. */
const COMPANION_ABSMAG_V = [9, 13] as const;
/** Draws given up for one star whose magnitude keeps falling outside the limits. */
const MOST_TRIES = 2000;

/** Draws stars of a kind as the sky mixes them, between two apparent magnitudes in the diagram's band. */
export class StarDrawer {
  private readonly sources: readonly Source[];
  private readonly runningSums: Float64Array;
  private readonly farthest_pc: Float64Array;
  private readonly clusterShare: Float64Array;
  private readonly selected: number;
  private readonly companions: readonly number[];

  constructor(
    private readonly model: ClassModel,
    private readonly bands: readonly Band[],
    private readonly errors: MeasurementErrors,
    private readonly kind: Kind,
    private readonly limits: { readonly brightest: number; readonly faintest: number },
    clusterScale: number,
  ) {
    this.selected = BAND_INDEX[model.axes.band];
    this.sources = kind.sources.filter(({ node }) =>
      bands.every(band => !Number.isNaN(model.absMag[BAND_INDEX[band]][node])),
    );
    this.farthest_pc = Float64Array.from(this.sources, source => this.farthestOf(source));
    const field = this.sources.map((source, i) => source.fieldDensity * this.cone(this.farthest_pc[i]));
    const cluster = this.sources.map(source =>
      this.isVisibleInCluster(source) ? source.clusterDensity * clusterScale : 0,
    );
    this.clusterShare = Float64Array.from(field, (number, i) =>
      number + cluster[i] > 0 ? cluster[i] / (number + cluster[i]) : 0,
    );
    let sum = 0;
    this.runningSums = Float64Array.from(field, (number, i) => {
      sum += number + cluster[i];
      return sum;
    });
    this.companions = coolDwarfs(model);
  }

  /** How many such stars there are, in the unit of the field's densities times a cone of one steradian. */
  get number(): number {
    return this.runningSums.at(-1) ?? 0;
  }

  /** One star; undefined where hardly any of this kind is within the limits. */
  draw(random: Random): DrawnStar | undefined {
    const own = this.bands.indexOf(this.model.axes.band);
    for (let tries = 0; tries < MOST_TRIES; tries++) {
      const star = this.drawStar(random);
      // By what it is, not by what noise makes of it: else the faintest would scatter in by the thousand.
      if (star.mags[own] < this.limits.brightest || star.mags[own] > this.limits.faintest) continue;
      return this.measured(star, star.mags[own], random);
    }
    return undefined;
  }

  /** A star as it is, seen from above the atmosphere. */
  private drawStar(random: Random) {
    const { model, bands } = this;
    const { field } = model;
    const i = random.weighted(this.runningSums);
    const source = this.sources[i];
    const node = model.nodes[source.node];
    const isMember = random.uniform() < this.clusterShare[i];
    const modulus_mag = isMember
      ? random.normal(field.modulus_mag, field.modulusSigma_mag)
      : 5 * Math.log10(drawDistance_pc(random, this.farthest_pc[i], field.lengthScale_pc)) - 5;
    const mean_AV = model.extinction.atModulus(modulus_mag);
    const av = Math.abs(random.normal(mean_AV, Math.sqrt(model.extinction.variance(mean_AV))));
    const common_mag = random.normal(0, node.scatter_mag) - source.brighter_mag + modulus_mag;
    const companion = this.kind.hasCoolCompanion
      ? this.companions[Math.floor(random.uniform() * this.companions.length)]
      : undefined;
    const mags = bands.map(band => {
      const b = BAND_INDEX[band];
      const alone = node.absMag[b] + common_mag;
      const light =
        companion === undefined ? alone : together(alone, model.absMag[b][companion] + modulus_mag);
      return light + av * node.extinctionRatio[b] + random.normal(0, node.bandScatter_mag[b]);
    });
    return { mags, isMember, distance_pc: 10 ** (modulus_mag / 5 + 1), kinematics: node.kinematics };
  }

  private measured(star: ReturnType<StarDrawer['drawStar']>, mag: number, random: Random): DrawnStar {
    const { errors, bands } = this;
    const { field } = this.model;
    const sigmas_mag = star.mags.map((value, b) => errors.sigma_mag(bands[b], value));
    const parallaxSigma_mas = errors.parallaxSigma_mas(mag);
    const [pmRa_masPerYr, pmDec_masPerYr] = star.isMember
      ? [
          random.normal(field.pmRa_masPerYear, field.pmSigma_masPerYear),
          random.normal(field.pmDec_masPerYear, field.pmSigma_masPerYear),
        ]
      : drawProperMotion_masPerYr(random, star.distance_pc, star.kinematics);
    return {
      mag,
      mags: star.mags.map((value, b) => value + random.normal(0, sigmas_mag[b])),
      sigmas_mag,
      parallax_mas: 1000 / star.distance_pc + random.normal(0, parallaxSigma_mas),
      parallaxSigma_mas,
      pmRa_masPerYr,
      pmDec_masPerYr,
    };
  }

  private cone(farthest_pc: number): number {
    return coneVolume(farthest_pc, this.model.field.lengthScale_pc);
  }

  private farthestOf({ node, brighter_mag }: Source): number {
    const absMag = this.model.absMag[this.selected][node] - brighter_mag - SCATTER_ROOM_MAG;
    return 10 ** ((this.limits.faintest - absMag + 5) / 5);
  }

  private isVisibleInCluster({ node, brighter_mag }: Source): boolean {
    const { field, extinction } = this.model;
    const mag =
      this.model.absMag[this.selected][node] -
      brighter_mag +
      field.modulus_mag +
      extinction.atModulus(field.modulus_mag);
    return mag > this.limits.brightest && mag < this.limits.faintest;
  }
}

/** Nodes of M dwarfs, any of them as likely. */
function coolDwarfs(model: ClassModel): readonly number[] {
  const v = model.absMag[BAND_INDEX.V];
  return model.nodes.flatMap((node, k) =>
    node.track === 'dwarfs' && v[k] > COMPANION_ABSMAG_V[0] && v[k] < COMPANION_ABSMAG_V[1] ? [k] : [],
  );
}

/** Magnitude of two lights together. */
function together(a: number, b: number): number {
  return -2.5 * Math.log10(10 ** (-0.4 * a) + 10 ** (-0.4 * b));
}
