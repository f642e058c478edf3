import type { Passband } from '../../science/passbands.js';
import {
  collectingArea_cm2,
  countRate_ePerS,
  skyRate_ePerSPerPixel,
  zeroPoint_mag,
} from '../../science/photometry/count-rate.js';
import {
  bestRadius_fwhm,
  enclosedFraction,
  peakPixelFraction,
  SMALL_TELESCOPE_BETA,
} from '../../science/photometry/moffat.js';
import { scintillation_s } from '../../science/photometry/scintillation.js';
import { seeing_arcsec } from '../../science/photometry/seeing.js';
import type { BandSettings, ImagerSetup, Telescope } from '../settings.js';
import type { Rates } from './plan-exposure.js';
import type { Conditions } from './suggestion.js';

/** Peak pixels are worked out for seeing that gets this much better meanwhile. */
const BETTER_SEEING = 0.8;

const RADIUS_FWHM = bestRadius_fwhm(SMALL_TELESCOPE_BETA);
const IN_APERTURE = enclosedFraction(RADIUS_FWHM, SMALL_TELESCOPE_BETA);

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
 * Rates in the aperture that is best against the sky, for a Moffat image. The
 * background is taken as well known (many pixels).
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
  const star_ePerS = countRate_ePerS(
    mag + conditions.cloud_mag,
    zeroPoint,
    band.extinction_magPerAirmass,
    conditions.airmass,
  );
  const sky = conditions.sky_magPerArcsec2(band, passband.wavelength_nm);
  const background = skyRate_ePerSPerPixel(sky, zeroPoint, detector.pixel_arcsec ** 2) + detector.dark_ePerS;
  const pixel_fwhm = detector.pixel_arcsec / fwhm_arcsec;
  return {
    signal_ePerS: star_ePerS * IN_APERTURE,
    noise: {
      pixels: (Math.PI * RADIUS_FWHM ** 2) / pixel_fwhm ** 2,
      background_ePerSPerPixel: background,
      readNoise_e: detector.readNoise_e,
      gain_ePerAdu: detector.gain_ePerAdu,
      scintillation_s: scintillation_s(telescope.aperture_m, conditions.airmass, conditions.siteHeight_m),
    },
    peak_ePerS: star_ePerS * peakPixelFraction(pixel_fwhm / BETTER_SEEING, SMALL_TELESCOPE_BETA),
  };
}
