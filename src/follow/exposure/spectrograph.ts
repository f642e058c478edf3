import type { Passband } from '../../science/passbands.js';
import { collectingArea_cm2 } from '../../science/photometry/count-rate.js';
import { SMALL_TELESCOPE_BETA, slitFraction } from '../../science/photometry/moffat.js';
import { seeing_arcsec } from '../../science/photometry/seeing.js';
import type { BandSettings, SpectrographSetup, Telescope } from '../settings.js';
import type { Rates } from './plan-exposure.js';
import type { Conditions } from './suggestion.js';

/** Rows extracted along the slit, in units of the seeing (common practice: both wings of the profile). */
const EXTRACTION_FWHM = 2;

/** A profile's bands with their passbands, in order of wavelength. */
export type KnownBands = readonly { readonly settings: BandSettings; readonly passband: Passband }[];

/**
 * Rates per resolution element at the setup's wavelength. `flux` is the star's photon flux there above the
 * atmosphere, photons/s/cm^2/Angstrom. Undefined where the profile describes no band near enough to know the
 * sky and the extinction.
 */
export function spectrographRates(
  telescope: Telescope,
  bands: KnownBands,
  setup: SpectrographSetup,
  conditions: Conditions,
  flux: number,
): Rates | undefined {
  const nearest = [...bands].sort(
    (a, b) =>
      Math.abs(a.passband.wavelength_nm - setup.wavelength_nm) -
      Math.abs(b.passband.wavelength_nm - setup.wavelength_nm),
  )[0];
  if (nearest === undefined || Number.isNaN(flux)) return undefined;
  const { settings, passband } = nearest;
  const { detector } = setup;
  const collected = collectingArea_cm2(telescope.aperture_m, telescope.obstruction) * setup.throughput;
  const dispersion_APerPixel = setup.dispersion_nmPerPixel * 10;
  const fwhm_arcsec = seeing_arcsec(conditions.seeing_arcsec, conditions.airmass, setup.wavelength_nm);
  const absorbed =
    10 ** (-0.4 * (settings.extinction_magPerAirmass * conditions.airmass + conditions.cloud_mag));
  const slit = slitFraction(setup.slit_arcsec / fwhm_arcsec, SMALL_TELESCOPE_BETA);
  const perPixel_ePerS = flux * absorbed * collected * slit * dispersion_APerPixel;
  const sky = conditions.sky_magPerArcsec2(settings, passband.wavelength_nm);
  // The sky fills the slit: no loss, and its brightness is as seen from the ground.
  const skyPerPixel_ePerS =
    passband.photonFlux *
    10 ** (-0.4 * sky) *
    collected *
    dispersion_APerPixel *
    setup.slit_arcsec *
    detector.pixel_arcsec;
  const pixelsPerElement = Math.max(1, setup.resolution_nm / setup.dispersion_nmPerPixel);
  const rows = (EXTRACTION_FWHM * fwhm_arcsec) / detector.pixel_arcsec;
  const background = skyPerPixel_ePerS + detector.dark_ePerS;
  return {
    signal_ePerS: perPixel_ePerS * pixelsPerElement,
    noise: {
      pixels: rows * pixelsPerElement,
      background_ePerSPerPixel: background,
      readNoise_e: detector.readNoise_e,
      gain_ePerAdu: detector.gain_ePerAdu,
      // Slit losses vary far more than the light itself: scintillation does not set the limit of a spectrum.
      scintillation_s: 0,
    },
    // Along the slit the image is a line one pixel wide in wavelength: its brightest row.
    peak_ePerS: perPixel_ePerS * slitFraction(detector.pixel_arcsec / fwhm_arcsec, SMALL_TELESCOPE_BETA),
  };
}
