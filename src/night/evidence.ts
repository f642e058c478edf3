import type { DistanceSource, StarEvidence } from '../follow/flags/index.js';
import { BAND_INDEX } from '../science/bands.js';
import { CLASS_COUNT, CLASSES, type StarClass } from '../science/classes.js';
import { ExtinctionLaw } from '../science/extinction.js';
import { MainSequenceLifetime } from '../science/main-sequence-lifetime.js';
import { absMagOnLine, type TrackLine, tracksInAxes } from '../science/odds/index.js';
import type { ChangeSearch } from './change-search.js';
import type { NightState } from './night-state.js';

/** A member of the cluster by at least these odds takes its distance from the cluster. */
const MEMBER_ODDS = 0.5;

/** Puts together what the flags may look at, star by star, after a frame. */
export class EvidenceMaker {
  private readonly dwarfs: TrackLine | undefined;
  private readonly whiteDwarfs: TrackLine | undefined;
  private readonly blue: number;
  private readonly red: number;
  private readonly reddening: number;
  private readonly turnOffAbsMag: number;
  private readonly readings: Uint32Array;
  private readonly suspect: Uint8Array;

  constructor(
    private readonly night: NightState,
    private readonly changes: ChangeSearch,
  ) {
    const { model, inputs, catalogue, profile } = night;
    const lines = tracksInAxes(model.tracks, model.axes);
    this.dwarfs = lines.find(line => line.name === 'dwarfs');
    this.whiteDwarfs = lines.find(line => line.name === 'white dwarfs DA');
    this.blue = inputs.bands.indexOf(model.axes.colour.blue);
    this.red = inputs.bands.indexOf(model.axes.colour.red);
    const law = new ExtinctionLaw();
    this.reddening =
      law.ratio(model.axes.colour.blue, Number.NaN) - law.ratio(model.axes.colour.red, Number.NaN);
    this.turnOffAbsMag = turnOffIn(night, profile.field.age_Gyr);
    this.readings = catalogue.readings;
    this.suspect = catalogue.suspect;
  }

  of(star: number): StarEvidence {
    const { model, inputs, odds, profile } = this.night;
    const colour = this.colourOf(star);
    const intrinsicColour = colour - odds.extinction_AV[star] * this.reddening;
    return {
      axes: model.axes,
      odds: oddsOf(odds.odds, star),
      absMag: odds.absMag[star],
      absMagSigma: odds.absMagSigma[star],
      colour,
      colourSigma: this.colourSigmaOf(star),
      intrinsicColour,
      dwarfAbsMag: absMagOnLine(this.dwarfs, intrinsicColour),
      whiteDwarfAbsMag: absMagOnLine(this.whiteDwarfs, intrinsicColour),
      subtype: odds.subtype[star],
      subtypeSigma: odds.subtypeSigma[star],
      teff_K: odds.teff_K[star],
      teffSigma_K: odds.teffSigma_K[star],
      logLuminosity: odds.logLuminosity[star],
      properMotion_masPerYr: Math.hypot(inputs.pmRa_masPerYear[star], inputs.pmDec_masPerYear[star]),
      fitModulus_mag: odds.modulus_mag[star],
      fitModulusSigma_mag: odds.modulusSigma_mag[star],
      distance: this.distanceOf(star),
      parallax_mas: inputs.parallax_mas[star],
      parallaxSigma_mas: inputs.parallaxSigma_mas[star],
      modulus_mag: profile.field.modulus_mag,
      memberOdds: odds.memberOdds[star],
      turnOffAbsMag: this.turnOffAbsMag,
      readings: this.readings[star],
      suspectReadings: this.suspect[star] === 1 ? this.readings[star] : 0,
      changes: this.changes.of(star),
      starsSearched: this.changes.starsSearched,
    };
  }

  private colourOf(star: number): number {
    if (this.blue < 0 || this.red < 0) return Number.NaN;
    return this.night.inputs.mag[this.blue][star] - this.night.inputs.mag[this.red][star];
  }

  private colourSigmaOf(star: number): number {
    if (this.blue < 0 || this.red < 0) return Number.NaN;
    const { sigma_mag } = this.night.inputs;
    return Math.hypot(sigma_mag[this.blue][star], sigma_mag[this.red][star]);
  }

  private distanceOf(star: number): DistanceSource {
    const { odds, inputs } = this.night;
    if (odds.memberOdds[star] >= MEMBER_ODDS) return 'cluster';
    return Number.isNaN(inputs.parallax_mas[star] + inputs.parallaxSigma_mas[star]) ? 'none' : 'parallax';
  }
}

/** A star's odds by name, each passed through `shape` (rounding, for output). */
export function oddsOf<T = number>(
  odds: Float32Array,
  star: number,
  shape: (value: number) => T = value => value as T,
): Record<StarClass, T> {
  const named = {} as Record<StarClass, T>;
  for (let c = 0; c < CLASS_COUNT; c++) named[CLASSES[c]] = shape(odds[star * CLASS_COUNT + c]);
  return named;
}

/** Turn-off of the cluster in the band of the diagram; NaN without an age. */
function turnOffIn(night: NightState, age_Gyr: number): number {
  const turnOffV = new MainSequenceLifetime().turnOff_absMagV(age_Gyr);
  if (Number.isNaN(turnOffV)) return turnOffV;
  const dwarfs = night.model.tracks.find(track => track.name === 'dwarfs');
  const nearest = dwarfs?.points.reduce((best, point) =>
    Math.abs(point.absMag[BAND_INDEX.V] - turnOffV) < Math.abs(best.absMag[BAND_INDEX.V] - turnOffV)
      ? point
      : best,
  );
  if (nearest === undefined) return turnOffV;
  return turnOffV + nearest.absMag[BAND_INDEX[night.model.axes.band]] - nearest.absMag[BAND_INDEX.V];
}
