import type { Passband } from '../../science/passbands.js';
import { bestRadius_fwhm } from '../../science/photometry/aperture.js';
import { exposureTime_s } from '../../science/photometry/ccd-equation.js';
import {
  collectingArea_cm2,
  countRate_ePerS,
  skyRate_ePerSPerPixel,
  zeroPoint_mag,
} from '../../science/photometry/count-rate.js';
import {
  enclosedFraction,
  peakPixelFraction,
  SMALL_TELESCOPE_BETA,
} from '../../science/photometry/moffat.js';
import { scintillation_s } from '../../science/photometry/scintillation.js';
import { seeing_arcsec } from '../../science/photometry/seeing.js';
import type { BandSettings, ImagerSetup, Telescope } from '../settings.js';
import { BETTER_SEEING, type Rates } from './plan-exposure.js';
import type { Conditions } from './suggestion.js';

/** Magnitude of 1 e-/s above the atmosphere in a band of this telescope. */
export function bandZeroPoint_mag(telescope: Telescope, band: BandSettings, passband: Passband): number {
  return zeroPoint_mag(
    passband.photonFlux,
    passband.width_nm,
    collectingArea_cm2(telescope.aperture_m, telescope.obstruction),
    band.throughput,
  );
}

/**
 * Rates of a star of the given magnitude, for a Moffat image, in the aperture that reaches the setup's S/N soonest:
 * small against the sky for a faint star, wide for a bright one. The background is taken as well known (many pixels).
 */
export function imagerRates(
  telescope: Telescope,
  band: BandSettings,
  passband: Passband,
  setup: ImagerSetup,
  conditions: Conditions,
  mag: number,
): Rates {
  const zeroPoint = bandZeroPoint_mag(telescope, band, passband);
  const { detector } = setup;
  const fwhm_arcsec = seeing_arcsec(conditions.seeing_arcsec, conditions.airmass, passband.wavelength_nm);
  const pixel_fwhm = detector.pixel_arcsec / fwhm_arcsec;
  const star_ePerS = countRate_ePerS(
    mag + conditions.cloud_mag,
    zeroPoint,
    band.extinction_magPerAirmass,
    conditions.airmass,
  );
  const sky = conditions.sky_magPerArcsec2(band, passband.wavelength_nm);
  const background = skyRate_ePerSPerPixel(sky, zeroPoint, detector.pixel_arcsec ** 2) + detector.dark_ePerS;
  const scintillation = scintillation_s(telescope.aperture_m, conditions.airmass, conditions.siteHeight_m);
  const within = (radius_fwhm: number) => ({
    signal_ePerS: star_ePerS * enclosedFraction(radius_fwhm, SMALL_TELESCOPE_BETA),
    noise: {
      pixels: (Math.PI * radius_fwhm ** 2) / pixel_fwhm ** 2,
      background_ePerSPerPixel: background,
      readNoise_e: detector.readNoise_e,
      gain_ePerAdu: detector.gain_ePerAdu,
      scintillation_s: scintillation,
    },
  });
  const radius_fwhm = bestRadius_fwhm(radius => {
    const { signal_ePerS, noise } = within(radius);
    return -exposureTime_s(setup.targetSnr, signal_ePerS, noise, setup.minCount);
  });
  return {
    ...within(radius_fwhm),
    peak_ePerS: star_ePerS * peakPixelFraction(pixel_fwhm / BETTER_SEEING, SMALL_TELESCOPE_BETA),
  };
}
