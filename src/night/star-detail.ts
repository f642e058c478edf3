import { BAND_INDEX } from '../science/bands.js';
import { CLASS_COUNT, CLASSES } from '../science/classes.js';
import { distancePosterior } from '../science/distance/distance-posterior.js';
import { spectralTypeText } from '../science/odds/index.js';
import { oddsOf } from './evidence.js';
import type { FollowUpDesk } from './follow-up.js';
import type { NightState } from './night-state.js';
import type { StarDetail } from './view.js';

/** 16 % and 84 %: one sigma either side, for a Gaussian. */
const LOW = 0.1587;
const HIGH = 0.8413;

/** Gathers everything known about one star. */
export function starDetail(night: NightState, desk: FollowUpDesk, star: number, now_ms: number): StarDetail {
  const { catalogue, odds, inputs, model, flags } = night;
  const entry = flags.of(star);
  const index = star * CLASS_COUNT;
  return {
    star,
    id: catalogue.ids[star],
    ra_deg: night.positions.ra_deg[star],
    dec_deg: night.positions.dec_deg[star],
    spectralType: spectralTypeText(odds.odds, index, odds.subtype[star], odds.teff_K[star]),
    luminosityClass: CLASSES[odds.classIndex[star]],
    odds: oddsOf(odds.odds, star),
    evidence: desk.evidenceOf(star),
    mags: inputs.bands
      .map((band, b) => ({
        band,
        mag: inputs.mag[b][star],
        sigma_mag: inputs.sigma_mag[b][star],
        readings: catalogue.readingsIn(band)[star],
        scatter_mag: catalogue.scatter(band)[star],
      }))
      .filter(({ mag }) => !Number.isNaN(mag)),
    absMag: { band: model.axes.band, value: odds.absMag[star], sigma: odds.absMagSigma[star] },
    teff_K: odds.teff_K[star],
    teffSigma_K: odds.teffSigma_K[star],
    ...distances(night, star),
    extinction_AV: odds.extinction_AV[star],
    extinctionSigma_AV: odds.extinctionSigma_AV[star],
    logLuminosity: odds.logLuminosity[star],
    logLuminositySigma: odds.logLuminositySigma[star],
    parallax_mas: inputs.parallax_mas[star],
    parallaxSigma_mas: inputs.parallaxSigma_mas[star],
    flags: entry?.flags ?? [],
    cautions: entry?.cautions ?? [],
    ...desk.of(star, now_ms),
    lightCurves: inputs.bands
      .map(band => ({ band, ...catalogue.lightCurve(star, band) }))
      .filter(curve => curve.mag.length > 0)
      .sort((a, b) => BAND_INDEX[a.band] - BAND_INDEX[b.band]),
  };
}

/**
 * Distance with its 16-84 % range. A field star with a parallax is quoted from the parallax alone, so that the
 * number can be checked; a cluster member or a star without parallax from the fit.
 */
function distances(night: NightState, star: number) {
  const { inputs, odds, profile } = night;
  const parallax = inputs.parallax_mas[star] - profile.field.parallaxZeroPoint_mas;
  const sigma = inputs.parallaxSigma_mas[star];
  if (sigma > 0 && !Number.isNaN(parallax) && !(odds.memberOdds[star] > 0.5)) {
    const posterior = distancePosterior(parallax, sigma, profile.field.lengthScale_pc);
    return {
      distance_pc: posterior.quantile_pc(0.5),
      distanceLow_pc: posterior.quantile_pc(LOW),
      distanceHigh_pc: posterior.quantile_pc(HIGH),
    };
  }
  const modulus = odds.modulus_mag[star];
  const spread = odds.modulusSigma_mag[star];
  const parsec = (value: number) => 10 ** ((value + 5) / 5);
  return {
    distance_pc: parsec(modulus),
    distanceLow_pc: parsec(modulus - spread),
    distanceHigh_pc: parsec(modulus + spread),
  };
}
