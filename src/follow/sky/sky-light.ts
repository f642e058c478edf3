import {
  brighteningInBand_mag,
  type MoonGeometry,
  moonBrightening_mag,
} from '../../science/sky/moonlight.js';
import { darkSky_magPerArcsec2 } from '../../science/sky/night-sky.js';
import { together_magPerArcsec2 } from '../../science/sky/surface-brightness.js';
import { twilightAlone_magPerArcsec2 } from '../../science/sky/twilight.js';
import type { BandSettings } from '../settings.js';

/** Dark V sky and V extinction of a good site (Krisciunas & Schaefer 1991), where the profile has no V. */
const USUAL_V = { darkSky_magPerArcsec2: 21.587, extinction_magPerAirmass: 0.172 };

/** Where target, Moon and Sun stand. */
export interface SkyGeometry extends MoonGeometry {
  readonly sunAltitude_deg: number;
}

/**
 * Brightness of the sky at a target, mag/arcsec^2: the band's dark sky at its zenith distance, moonlight scaled from V
 * to the band, and what is left of twilight. NaN in twilight too bright for any exposure.
 */
export function skyBrightness_magPerArcsec2(
  geometry: SkyGeometry,
  band: BandSettings,
  wavelength_nm: number,
  bandV: BandSettings | undefined,
): number {
  const zenithDistance = geometry.targetZenithDistance_deg;
  const v = bandV ?? USUAL_V;
  const darkV = darkSky_magPerArcsec2(v.darkSky_magPerArcsec2, v.extinction_magPerAirmass, zenithDistance);
  const brighteningV = moonBrightening_mag(darkV, geometry, v.extinction_magPerAirmass);
  const dark = darkSky_magPerArcsec2(
    band.darkSky_magPerArcsec2,
    band.extinction_magPerAirmass,
    zenithDistance,
  );
  const moonlit = dark - brighteningInBand_mag(brighteningV, wavelength_nm);
  return together_magPerArcsec2(
    moonlit,
    twilightAlone_magPerArcsec2(-geometry.sunAltitude_deg, wavelength_nm),
  );
}
