import type { Passband } from '../../science/passbands.js';
import { collectingArea_cm2 } from '../../science/photometry/count-rate.js';
import { SMALL_TELESCOPE_BETA, slitFraction } from '../../science/photometry/moffat.js';
import { seeing_arcsec } from '../../science/photometry/seeing.js';
import {
  type SpectralPixel,
  slitSkyRate_ePerSPerPixel,
  spectralRate_ePerSPerPixel,
} from '../../science/photometry/spectrum.js';
import type { BandSettings, SpectrographSetup, Telescope } from '../settings.js';
import { BETTER_SEEING, type Rates } from './plan-exposure.js';
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
  const pixel: SpectralPixel = {
    area_cm2: collectingArea_cm2(telescope.aperture_m, telescope.obstruction),
    throughput: setup.throughput,
    width_Angstrom: setup.dispersion_nmPerPixel * 10,
  };
  const fwhm_arcsec = seeing_arcsec(conditions.seeing_arcsec, conditions.airmass, setup.wavelength_nm);
  const absorbed =
    10 ** (-0.4 * (settings.extinction_magPerAirmass * conditions.airmass + conditions.cloud_mag));
  const through = (share: number) => spectralRate_ePerSPerPixel(flux * absorbed, share, pixel);
  const skyFlux =
    passband.photonFlux * 10 ** (-0.4 * conditions.sky_magPerArcsec2(settings, passband.wavelength_nm));
  const background =
    slitSkyRate_ePerSPerPixel(skyFlux, setup.slit_arcsec, detector.pixel_arcsec, pixel) + detector.dark_ePerS;
  const pixelsPerElement = Math.max(1, setup.resolution_nm / setup.dispersion_nmPerPixel);
  const rows = (EXTRACTION_FWHM * fwhm_arcsec) / detector.pixel_arcsec;
  return {
    signal_ePerS: through(slitShare(setup.slit_arcsec, fwhm_arcsec)) * pixelsPerElement,
    noise: {
      pixels: rows * pixelsPerElement,
      background_ePerSPerPixel: background,
      readNoise_e: detector.readNoise_e,
      gain_ePerAdu: detector.gain_ePerAdu,
      // Slit losses vary far more than the light itself: scintillation does not set the limit of a spectrum.
      scintillation_s: 0,
    },
    // Along the slit the image is a line one pixel wide in wavelength: its brightest row.
    peak_ePerS:
      through(slitShare(setup.slit_arcsec, BETTER_SEEING * fwhm_arcsec)) *
      slitShare(detector.pixel_arcsec, BETTER_SEEING * fwhm_arcsec),
  };
}

/** Share of the light in a strip through the middle of the image. */
function slitShare(width_arcsec: number, fwhm_arcsec: number): number {
  return slitFraction(width_arcsec / fwhm_arcsec, SMALL_TELESCOPE_BETA);
}
