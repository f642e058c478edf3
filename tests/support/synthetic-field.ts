import { BAND_INDEX, type Band } from '../../src/science/bands.js';
import { CLASS_COUNT, CLASSES } from '../../src/science/classes.js';
import { coneVolume, drawDistance_pc } from '../../src/science/distance/draw-distance.js';
import {
  buildModel,
  classifyStars,
  type DiagramAxes,
  type FieldPrior,
  makeOddsColumns,
  type StarInputs,
} from '../../src/science/odds/index.js';
import { makeNodes, type Node } from '../../src/science/odds/nodes.js';
import { Random } from '../../src/science/random.js';
import { readTracks } from '../../src/science/tracks/index.js';

/** A made-up field: the local mix of stars, with scatter, dust, parallaxes and noise drawn independently. */
export interface SyntheticField {
  readonly inputs: StarInputs;
  /** Index into CLASSES of what each star really is. */
  readonly truth: Uint8Array;
}

export interface FieldPlan {
  readonly stars: number;
  readonly bands: readonly Band[];
  /** Limits of the apparent magnitude in the band that the survey selects by. */
  readonly selectedBy: Band;
  readonly brightest: number;
  readonly faintest: number;
  readonly sigma_mag: number;
  readonly parallaxSigma_mas: number;
  readonly seed: number;
}

/** Draws stars by space density and volume; the prior's class scales apply to the draw as they do to the odds. */
export function drawField(plan: FieldPlan, prior: FieldPrior): SyntheticField {
  const random = new Random(plan.seed);
  const selected = BAND_INDEX[plan.selectedBy];
  const usable = (node: Node) => plan.bands.every(band => !Number.isNaN(node.absMag[BAND_INDEX[band]]));
  const nodes = makeNodes(readTracks()).filter(node => usable(node) && node.density_perPc3 > 0);
  const farthest = nodes.map(node => 10 ** ((plan.faintest - node.absMag[selected] + 6.5) / 5));
  const weights = nodes.map(
    (node, i) =>
      node.density_perPc3 *
      (prior.classScale[CLASSES[node.classIndex]] ?? 1) *
      coneVolume(farthest[i], prior.lengthScale_pc),
  );
  let sum = 0;
  const sums = Float64Array.from(weights, weight => {
    sum += weight;
    return sum;
  });
  const columns = plan.bands.map(() => ({
    mag: new Float64Array(plan.stars),
    sigma: new Float64Array(plan.stars).fill(plan.sigma_mag),
  }));
  const parallax_mas = new Float64Array(plan.stars);
  const truth = new Uint8Array(plan.stars);
  for (let drawn = 0; drawn < plan.stars; ) {
    const i = random.weighted(sums);
    const node = nodes[i];
    const distance_pc = drawDistance_pc(random, farthest[i], prior.lengthScale_pc);
    const av = Math.abs(random.normal(prior.extinction_AV, prior.extinctionSigma_AV));
    const common =
      random.normal(0, node.scatter_mag) - branchOf(node, random) + 5 * Math.log10(distance_pc) - 5;
    const seen = plan.bands.map(band => {
      const b = BAND_INDEX[band];
      const own = random.normal(0, Math.hypot(node.bandScatter_mag[b], plan.sigma_mag, prior.floor_mag));
      return node.absMag[b] + common + av * node.extinctionRatio[b] + own;
    });
    const apparent = seen[plan.bands.indexOf(plan.selectedBy)];
    if (apparent < plan.brightest || apparent > plan.faintest) continue;
    seen.forEach((mag, b) => {
      columns[b].mag[drawn] = mag;
    });
    parallax_mas[drawn] = 1000 / distance_pc + random.normal(0, plan.parallaxSigma_mas);
    truth[drawn++] = node.classIndex;
  }
  return {
    truth,
    inputs: {
      count: plan.stars,
      bands: plan.bands,
      mag: columns.map(({ mag }) => mag),
      sigma_mag: columns.map(({ sigma }) => sigma),
      parallax_mas,
      parallaxSigma_mas: new Float64Array(plan.stars).fill(plan.parallaxSigma_mas),
      pmRa_masPerYear: new Float64Array(plan.stars).fill(Number.NaN),
      pmDec_masPerYear: new Float64Array(plan.stars).fill(Number.NaN),
      reddening_EBV: new Float64Array(plan.stars).fill(Number.NaN),
    },
  };
}

function branchOf(node: Node, random: Random): number {
  let pick = random.uniform();
  for (const branch of node.branches) {
    pick -= branch.share;
    if (pick <= 0) return branch.brighter_mag;
  }
  return 0;
}

/** How well odds agree with the truth. */
export interface Calibration {
  readonly accuracy: number;
  /** Mean squared difference between the odds and the truth, summed over classes. */
  readonly brier: number;
  /** Mean difference between stated odds and frequency, over ten bins of the odds of every class. */
  readonly expectedError: number;
  readonly bins: readonly { readonly stated: number; readonly found: number; readonly count: number }[];
  readonly byClass: readonly { readonly name: string; readonly stars: number; readonly right: number }[];
}

/** Classifies a field and compares. */
export function calibrate(field: SyntheticField, prior: FieldPrior, axes: DiagramAxes): Calibration {
  const { inputs, truth } = field;
  const out = makeOddsColumns(inputs.count);
  classifyStars(buildModel(prior, axes, inputs.bands), inputs, 0, inputs.count, out);
  const bins = Array.from({ length: 10 }, () => ({ stated: 0, found: 0, count: 0 }));
  const byClass = CLASSES.map(name => ({ name, stars: 0, right: 0 }));
  let right = 0;
  let brier = 0;
  for (let i = 0; i < inputs.count; i++) {
    byClass[truth[i]].stars++;
    if (out.classIndex[i] === truth[i]) {
      right++;
      byClass[truth[i]].right++;
    }
    for (let c = 0; c < CLASS_COUNT; c++) {
      const odds = out.odds[i * CLASS_COUNT + c];
      const isIt = truth[i] === c ? 1 : 0;
      brier += (odds - isIt) ** 2;
      // Odds of nearly nothing are right by the thousand and would hide the rest.
      if (odds < 0.01) continue;
      const bin = bins[Math.min(9, Math.floor(odds * 10))];
      bin.stated += odds;
      bin.found += isIt;
      bin.count++;
    }
  }
  const total = bins.reduce((sum, bin) => sum + bin.count, 0);
  const expectedError = bins.reduce((sum, bin) => sum + Math.abs(bin.stated - bin.found), 0) / total;
  return {
    accuracy: right / inputs.count,
    brier: brier / inputs.count,
    expectedError,
    bins: bins.map(({ stated, found, count }) => ({ stated: stated / count, found: found / count, count })),
    byClass,
  };
}
