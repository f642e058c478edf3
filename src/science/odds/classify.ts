import { BAND_INDEX } from '../bands.js';
import { CLASS_COUNT, CLASS_INDEX } from '../classes.js';
import type { ClassModel } from './model.js';
import type { OddsColumns } from './odds-columns.js';
import { bestClassIndex } from './spectral-type.js';
import { StarFit } from './star-fit.js';
import type { StarInputs } from './star-inputs.js';

/** Classifies stars `from` up to but not including `to`, writing their rows of `out`. */
export function classifyStars(
  model: ClassModel,
  inputs: StarInputs,
  from: number,
  to: number,
  out: OddsColumns,
): void {
  const fit = new StarFit(model, inputs);
  for (let i = from; i < to; i++) {
    fit.fit(i);
    summarise(model, inputs, fit, i, out);
  }
}

/** Classifies the listed stars only. */
export function classifySome(
  model: ClassModel,
  inputs: StarInputs,
  stars: Iterable<number>,
  out: OddsColumns,
): void {
  const fit = new StarFit(model, inputs);
  for (const i of stars) {
    fit.fit(i);
    summarise(model, inputs, fit, i, out);
  }
}

function summarise(model: ClassModel, inputs: StarInputs, fit: StarFit, i: number, out: OddsColumns): void {
  out.odds.set(fit.classOdds, i * CLASS_COUNT);
  const best = bestClassIndex(fit.classOdds);
  out.classIndex[i] = best;
  out.memberOdds[i] = fit.memberOdds;
  alongClass(model, fit, best, i, out);
  distances(model, inputs, fit, i, out);
}

/**
 * Subtype and temperature along the most probable class, with their spread. The subtype is the median, which
 * does not care that subtypes are packed closer in colour on one side than on the other.
 */
function alongClass(model: ClassModel, fit: StarFit, best: number, i: number, out: OddsColumns): void {
  let weight = 0;
  let subtype = 0;
  let subtype2 = 0;
  let teff = 0;
  let teff2 = 0;
  for (let slot = 0; slot < fit.survivors; slot++) {
    const node = model.nodes[fit.node[slot]];
    if (node.classIndex !== best) continue;
    const w = fit.weight[slot];
    weight += w;
    subtype += w * node.subtype;
    subtype2 += w * node.subtype * node.subtype;
    teff += w * node.teff_K;
    teff2 += w * node.teff_K * node.teff_K;
  }
  out.subtype[i] = medianSubtype(model, fit, best, weight);
  out.subtypeSigma[i] = spread(subtype2 / weight, subtype / weight);
  out.teff_K[i] = teff / weight;
  out.teffSigma_K[i] = spread(teff2 / weight, teff / weight);
}

/** Survivors stand in order of colour within a class, which is the order of subtypes. */
function medianSubtype(model: ClassModel, fit: StarFit, best: number, weight: number): number {
  let sum = 0;
  for (let slot = 0; slot < fit.survivors; slot++) {
    const node = model.nodes[fit.node[slot]];
    if (node.classIndex !== best) continue;
    sum += fit.weight[slot];
    if (sum >= weight / 2) return node.subtype;
  }
  return Number.NaN;
}

/** Distance modulus, extinction and absolute magnitude over all classes. */
function distances(model: ClassModel, inputs: StarInputs, fit: StarFit, i: number, out: OddsColumns): void {
  const band = BAND_INDEX[model.axes.band];
  const none = fit.classOdds[CLASS_INDEX.none];
  const flatAbsorption = model.field.extinction_AV;
  const flatWeight = Number.isNaN(fit.flatModulus_mag) ? 0 : none;
  let weight = flatWeight;
  let modulus = flatWeight === 0 ? 0 : flatWeight * fit.flatModulus_mag;
  let modulus2 =
    flatWeight === 0 ? 0 : flatWeight * (fit.flatModulusVariance_mag2 + fit.flatModulus_mag ** 2);
  let extinction = flatWeight * flatAbsorption;
  let extinction2 = flatWeight * (flatAbsorption ** 2 + model.field.extinctionSigma_AV ** 2);
  for (let slot = 0; slot < fit.survivors; slot++) {
    const w = fit.weight[slot];
    const mu = fit.modulus_mag[slot];
    const av = fit.extinction_AV[slot];
    weight += w;
    modulus += w * mu;
    modulus2 += w * (mu * mu + fit.modulusVariance_mag2[slot]);
    extinction += w * av;
    extinction2 += w * (av * av + fit.extinctionVariance[slot]);
  }
  if (weight <= 0) {
    clearDistances(i, out);
    return;
  }
  const mean = modulus / weight;
  const sigma = spread(modulus2 / weight, mean);
  const av = extinction / weight;
  const avSigma = spread(extinction2 / weight, av);
  out.modulus_mag[i] = mean;
  out.modulusSigma_mag[i] = sigma;
  out.extinction_AV[i] = av;
  out.extinctionSigma_AV[i] = avSigma;
  const slot = inputs.bands.indexOf(model.axes.band);
  const mag = slot < 0 ? Number.NaN : inputs.mag[slot][i];
  const magSigma = slot < 0 ? Number.NaN : inputs.sigma_mag[slot][i];
  const ratio = extinctionRatioOf(model, fit, band);
  out.absMag[i] = mag - mean - av * ratio;
  out.absMagSigma[i] = Math.hypot(magSigma, sigma, avSigma * ratio);
}

function extinctionRatioOf(model: ClassModel, fit: StarFit, band: number): number {
  let best = 0;
  for (let slot = 1; slot < fit.survivors; slot++) if (fit.weight[slot] > fit.weight[best]) best = slot;
  const node = fit.survivors > 0 ? fit.node[best] : 0;
  return model.extinctionRatio[band][node];
}

function clearDistances(i: number, out: OddsColumns): void {
  for (const column of [
    out.modulus_mag,
    out.modulusSigma_mag,
    out.extinction_AV,
    out.extinctionSigma_AV,
    out.absMag,
    out.absMagSigma,
  ]) {
    column[i] = Number.NaN;
  }
}

function spread(meanOfSquares: number, mean: number): number {
  return Math.sqrt(Math.max(0, meanOfSquares - mean * mean));
}
