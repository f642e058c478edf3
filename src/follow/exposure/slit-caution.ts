import { standardAir } from '../../science/sky/air.js';
import { altitudeOfAirmass_deg } from '../../science/sky/airmass.js';
import { dispersion_arcsec } from '../../science/sky/dispersion.js';
import type { SpectrographSetup } from '../settings.js';
import type { Conditions } from './suggestion.js';

/** Above this the air spreads a star's light noticeably (Filippenko 1982, PASP 94, 715). */
const LEAST_AIRMASS = 1.3;
/** The blue end of a spectrum, in terms of the wavelength it is exposed for; a profile does not say where it ends. */
const BLUE_END = 0.8;
/** Less than this share of the slit costs no light worth a word. */
const LEAST_SHARE = 0.1;

/**
 * What the slit has to be turned to, and how far the blue end moves out of it otherwise; empty where that does not
 * matter or the place of the star is not known.
 */
export function slitCaution(setup: SpectrographSetup, conditions: Conditions): string {
  const { airmass, parallacticAngle_deg, siteHeight_m } = conditions;
  if (!(airmass > LEAST_AIRMASS) || Number.isNaN(parallacticAngle_deg)) return '';
  const blue_nm = BLUE_END * setup.wavelength_nm;
  const shift_arcsec = dispersion_arcsec(
    blue_nm,
    setup.wavelength_nm,
    90 - altitudeOfAirmass_deg(airmass),
    standardAir(siteHeight_m),
  );
  if (shift_arcsec < LEAST_SHARE * setup.slit_arcsec) return '';
  // A slit has no head: half a turn is the same.
  const angle_deg = Math.round((parallacticAngle_deg + 360) % 180) % 180;
  return `slit off the parallactic angle: at airmass ${airmass.toFixed(2)} set it to ${angle_deg} deg, or ${blue_nm.toFixed(0)} nm falls ${shift_arcsec.toFixed(1)} arcsec beside ${setup.wavelength_nm.toFixed(0)} nm`;
}
