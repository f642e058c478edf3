import { BAND_INDEX, type Band } from '../../science/bands.js';
import type { PredictedMagnitudes } from '../../science/odds/index.js';
import { type Passband, photonFluxAt, readPassbands } from '../../science/passbands.js';
import type { Profile, Setup } from '../settings.js';
import { imagerRates } from './imager.js';
import { type PlannedExposure, planExposure, type Rates } from './plan-exposure.js';
import { slitCaution } from './slit-caution.js';
import { type KnownBands, spectrographRates } from './spectrograph.js';
import type { Conditions, ExposureSuggestion } from './suggestion.js';

/** Works out exposures for the setups of one profile. */
export class ExposureAdviser {
  readonly passbands: ReadonlyMap<Band, Passband> = readPassbands();
  private readonly known: KnownBands;

  constructor(private readonly profile: Profile) {
    this.known = profile.bands.flatMap(settings => {
      const passband = this.passbands.get(settings.band);
      return passband === undefined ? [] : [{ settings, passband }];
    });
  }

  /** One suggestion for each setup, in the profile's order. */
  suggest(predicted: PredictedMagnitudes, conditions: Conditions): readonly ExposureSuggestion[] {
    return this.profile.setups.map(setup => this.suggestFor(setup, predicted, conditions));
  }

  /** Exposure for the predicted brightness, and for one sigma either way. */
  suggestFor(setup: Setup, predicted: PredictedMagnitudes, conditions: Conditions): ExposureSuggestion {
    const index = BAND_INDEX[setup.kind === 'imager' ? setup.band : this.bandNear(setup.wavelength_nm)];
    const sigma = predicted.sigma_mag[index];
    const shifted = (fainter_mag: number): PlannedExposure => {
      const rates = this.rates(setup, predicted.mag, fainter_mag, conditions);
      return rates === undefined ? UNKNOWN : planExposure(setup, rates);
    };
    const middle = shifted(0);
    return {
      setup: setup.name,
      predicted_mag: predicted.mag[index],
      predictedSigma_mag: sigma,
      count: middle.count,
      each_s: middle.each_s,
      total_s: middle.total_s,
      totalBright_s: Number.isNaN(sigma) ? Number.NaN : shifted(-sigma).total_s,
      totalFaint_s: Number.isNaN(sigma) ? Number.NaN : shifted(sigma).total_s,
      snr: middle.snr,
      limitedBy: middle.limitedBy,
      possible: middle.possible,
      caution: setup.kind === 'spectrograph' && middle.possible ? slitCaution(setup, conditions) : '',
    };
  }

  /** For a star that is some magnitudes fainter than predicted; undefined where its brightness is not known. */
  private rates(
    setup: Setup,
    mags: Float64Array,
    fainter_mag: number,
    conditions: Conditions,
  ): Rates | undefined {
    const { telescope } = this.profile;
    if (setup.kind === 'spectrograph') {
      const flux = photonFluxAt(this.passbands, mags, setup.wavelength_nm);
      return spectrographRates(telescope, this.known, setup, conditions, flux * 10 ** (-0.4 * fainter_mag));
    }
    const band = this.known.find(entry => entry.settings.band === setup.band);
    const mag = mags[BAND_INDEX[setup.band]] + fainter_mag;
    if (band === undefined || Number.isNaN(mag)) return undefined;
    return imagerRates(telescope, band.settings, band.passband, setup, conditions, mag);
  }

  /** The profile's band nearest to a wavelength, whose magnitude is quoted for a spectrum. */
  private bandNear(wavelength_nm: number): Band {
    const [first, ...rest] = this.known;
    return rest.reduce(
      (best, entry) =>
        Math.abs(entry.passband.wavelength_nm - wavelength_nm) <
        Math.abs(best.passband.wavelength_nm - wavelength_nm)
          ? entry
          : best,
      first,
    ).settings.band;
  }
}

const UNKNOWN: PlannedExposure = {
  possible: false,
  count: 0,
  each_s: Number.NaN,
  total_s: Number.NaN,
  snr: Number.NaN,
  limitedBy: 'not known: the brightness in this band',
};
