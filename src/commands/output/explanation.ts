import type { NightState } from '../../night/night-state.js';
import type { Band } from '../../science/bands.js';
import { CLASS_COUNT, CLASSES } from '../../science/classes.js';
import { colourTemperatures } from '../../science/colour-temperature/second-opinion.js';
import { ExtinctionLaw } from '../../science/extinction.js';
import { stellarRadius } from '../../science/luminosity.js';
import {
  type ClassEvidence,
  oddsText,
  PosteriorReader,
  spectralTypeText,
  temperatureTypeText,
} from '../../science/odds/index.js';

/** The evidence behind one star's class, in lines: what was measured, and what each class makes of it. */
export function explain(night: NightState, star: number): string[] {
  const { catalogue, odds, inputs, flags } = night;
  const type = spectralTypeText(odds.odds, star * CLASS_COUNT, odds.subtype[star], odds.teff_K[star]);
  const evidence = new PosteriorReader(night.model, inputs).evidence(star);
  const entry = flags.of(star);
  return [
    `${catalogue.ids[star]}: ${type}`,
    `measured   ${measured(night, star)}`,
    '',
    `class  odds   best as    Teff K  distance pc   A_V   misfit in sigma: ${inputs.bands.join(' ')}`,
    ...evidence.map(evidenceLine),
    `none   ${oddsText(odds.odds[star * CLASS_COUNT + CLASS_COUNT - 1])}   any colour`,
    ...opinions(night, star),
    ...(entry?.flags ?? []).map(flag => `flag ${flag.code}: ${flag.because}`),
    ...(entry?.cautions ?? []).map(caution => `caution: ${caution}`),
  ];
}

/** Temperature and size along the best class, and what published relations of single colours say beside it. */
function opinions({ odds, inputs }: NightState, star: number): string[] {
  const law = new ExtinctionLaw();
  const starClass = CLASSES[odds.classIndex[star]];
  const intrinsic = (blue: Band, red: Band) => {
    const [b, r] = [inputs.bands.indexOf(blue), inputs.bands.indexOf(red)];
    if (b < 0 || r < 0) return Number.NaN;
    const reddening = law.ratio(blue, Number.NaN) - law.ratio(red, Number.NaN);
    return inputs.mag[b][star] - inputs.mag[r][star] - odds.extinction_AV[star] * reddening;
  };
  const others = colourTemperatures(starClass, { bv: intrinsic('B', 'V'), bpRp: intrinsic('BP', 'RP') });
  const values = {
    logLuminosity: odds.logLuminosity[star],
    logLuminositySigma: odds.logLuminositySigma[star],
    teff_K: odds.teff_K[star],
    teffSigma_K: odds.teffSigma_K[star],
  };
  const { radius_Rsun, sigma_Rsun } = stellarRadius(values);
  const lines = [
    `A_V ${odds.extinction_AV[star].toFixed(2)} ± ${odds.extinctionSigma_AV[star].toFixed(2)} mag`,
  ];
  if (!Number.isNaN(values.logLuminosity)) {
    lines.push(
      `as ${starClass}: Teff ${values.teff_K.toFixed(0)} ± ${values.teffSigma_K.toFixed(0)} K, log L ${values.logLuminosity.toFixed(2)} ± ${values.logLuminositySigma.toFixed(2)}, radius ${radius_Rsun.toPrecision(3)} ± ${sigma_Rsun.toPrecision(2)} solar`,
    );
  }
  return [
    ...lines,
    ...others.map(
      ({ teff_K, colour, source }) => `Teff ${teff_K.toFixed(0)} K from ${colour} alone (${source})`,
    ),
  ];
}

function measured({ inputs }: NightState, star: number): string {
  const mags = inputs.bands.flatMap((band, b) =>
    Number.isNaN(inputs.mag[b][star])
      ? []
      : [`${band} ${inputs.mag[b][star].toFixed(3)} ± ${inputs.sigma_mag[b][star].toFixed(3)}`],
  );
  const parallax = inputs.parallax_mas[star];
  const distance = Number.isNaN(parallax)
    ? 'no parallax'
    : `parallax ${parallax.toFixed(3)} ± ${inputs.parallaxSigma_mas[star].toFixed(3)} mas`;
  return [...mags, distance].join('   ');
}

function evidenceLine(evidence: ClassEvidence): string {
  const { starClass, odds, subtype, teff_K, modulus_mag, extinction_AV, misfits } = evidence;
  const cells = [
    starClass.padEnd(6),
    oddsText(odds).padEnd(6),
    temperatureTypeText(starClass, subtype, teff_K).padEnd(8),
    teff_K.toFixed(0).padStart(8),
    (10 ** ((modulus_mag + 5) / 5)).toFixed(1).padStart(12),
    extinction_AV.toFixed(2).padStart(6),
    `  ${misfits.map(({ sigma }) => (sigma < 0 ? '' : '+') + sigma.toFixed(1)).join(' ')}`,
  ];
  return cells.join(' ');
}
