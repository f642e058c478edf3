import type { Band } from '../../science/bands.js';
import { readPassbands } from '../../science/passbands.js';
import { signalToNoise } from '../../science/photometry/ccd-equation.js';
import type { Profile } from '../settings.js';
import { imagerRates } from './imager.js';
import type { Conditions } from './suggestion.js';

/** The profile's own sky: dark, clear, at the zenith. */
export function darkZenith(profile: Profile): Conditions {
  return {
    airmass: 1,
    parallacticAngle_deg: Number.NaN,
    seeing_arcsec: profile.site.seeing_arcsec,
    siteHeight_m: profile.site.height_m,
    cloud_mag: 0,
    sky_magPerArcsec2: band => band.darkSky_magPerArcsec2,
  };
}

/**
 * Faintest magnitude that reaches a S/N in one exposure of the given length, at the zenith in the profile's seeing,
 * with the profile's first imager; NaN without an imager or without the band. Bisection to 0.001 mag.
 */
export function faintestIn_mag(profile: Profile, band: Band, time_s: number, snr: number): number {
  const setup = profile.setups.find(candidate => candidate.kind === 'imager');
  const settings = profile.bands.find(candidate => candidate.band === band);
  const passband = readPassbands().get(band);
  if (setup?.kind !== 'imager' || settings === undefined || passband === undefined) return Number.NaN;
  const conditions = darkZenith(profile);
  let bright = 0;
  let faint = 35;
  while (faint - bright > 0.001) {
    const middle = (bright + faint) / 2;
    const { signal_ePerS, noise } = imagerRates(
      profile.telescope,
      settings,
      passband,
      setup,
      conditions,
      middle,
    );
    if (signalToNoise(signal_ePerS, noise, time_s, 1) > snr) bright = middle;
    else faint = middle;
  }
  return bright;
}
