import { BAND_INDEX } from '../bands.js';
import { CLASS_COUNT, CLASS_INDEX } from '../classes.js';
import { logLuminosity } from '../luminosity.js';
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
  const weight = alongClass(model, fit, best, i, out);
  out.subtype[i] = medianSubtype(model, fit, best, weight);
  luminosity(model, fit, best, i, out);
  distances(model, inputs, fit, i, out);
}

/** Temperature along the most probable class and the spread of the subtype; returns the weight of the class. */
function alongClass(model: ClassModel, fit: StarFit, best: number, i: number, out: OddsColumns): number {
  const { classIndex, subtype, teff_K } = model;
  let weight = 0;
  let type = 0;
  let type2 = 0;
  let teff = 0;
  let teff2 = 0;
  for (let slot = 0; slot < fit.survivors; slot++) {
    const node = fit.node[slot];
    if (classIndex[node] !== best) continue;
    const w = fit.weight[slot];
    const s = subtype[node];
    const t = teff_K[node];
    weight += w;
    type += w * s;
    type2 += w * s * s;
    teff += w * t;
    teff2 += w * t * t;
  }
  out.subtypeSigma[i] = spread(type2 / weight, type / weight);
  out.teff_K[i] = teff / weight;
  out.teffSigma_K[i] = spread(teff2 / weight, teff / weight);
  return weight;
}

/**
 * The subtype is the median, which does not care that subtypes are packed closer in colour on one side than on the
 * other. Survivors stand in order of colour within a class, which is the order of subtypes.
 */
function medianSubtype(model: ClassModel, fit: StarFit, best: number, weight: number): number {
  let sum = 0;
  for (let slot = 0; slot < fit.survivors; slot++) {
    const node = fit.node[slot];
    if (model.classIndex[node] !== best) continue;
    sum += fit.weight[slot];
    if (sum >= weight / 2) return model.subtype[node];
  }
  return Number.NaN;
}

/** Share of a class's weight that has to know its bolometric correction. */
const LEAST_KNOWN = 0.5;

/** Luminosity along the most probable class; not known where the tables give no bolometric correction. */
function luminosity(model: ClassModel, fit: StarFit, best: number, i: number, out: OddsColumns): void {
  let weight = 0;
  let known = 0;
  let mean = 0;
  let square = 0;
  for (let slot = 0; slot < fit.survivors; slot++) {
    const node = fit.node[slot];
    if (model.classIndex[node] !== best) continue;
    const w = fit.weight[slot];
    weight += w;
    // The star's own offset from its sequence is common to all bands, so it is that of the luminosity too.
    const bolometric = model.bolometricMag[node] + fit.offset_mag[slot] - fit.modulus_mag[slot];
    if (Number.isNaN(bolometric)) continue;
    known += w;
    mean += w * bolometric;
    const variance = fit.modulusVariance_mag2[slot] + fit.extinctionVariance[slot];
    square += w * (bolometric * bolometric + variance);
  }
  const isKnown = known > LEAST_KNOWN * weight;
  out.logLuminosity[i] = isKnown ? logLuminosity(mean / known) : Number.NaN;
  out.logLuminositySigma[i] = isKnown ? 0.4 * spread(square / known, mean / known) : Number.NaN;
}

/** Distance modulus, extinction and absolute magnitude over all classes. */
function distances(model: ClassModel, inputs: StarInputs, fit: StarFit, i: number, out: OddsColumns): void {
  const band = BAND_INDEX[model.axes.band];
  let weight = 0;
  let modulus = 0;
  let modulus2 = 0;
  let extinction = 0;
  let extinction2 = 0;
  const none = fit.classOdds[CLASS_INDEX.none];
  if (none > 0 && !Number.isNaN(fit.flatModulus_mag)) {
    weight = none;
    modulus = none * fit.flatModulus_mag;
    modulus2 = none * (fit.flatModulusVariance_mag2 + fit.flatModulus_mag ** 2);
    extinction = none * fit.flatExtinction_AV;
    extinction2 = none * (fit.flatExtinction_AV ** 2 + fit.flatExtinctionVariance);
  }
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

function spread(meanOfSquares: number, mean: number): number {
  return Math.sqrt(Math.max(0, meanOfSquares - mean * mean));
}
