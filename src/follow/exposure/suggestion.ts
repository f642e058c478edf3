import type { BandSettings } from '../settings.js';

/** What a setup would need to reach its S/N on one star. */
export interface ExposureSuggestion {
  readonly setup: string;
  /** Magnitude the exposure was worked out for, in the setup's band (a spectrograph: in the band nearest its wavelength). */
  readonly predicted_mag: number;
  readonly predictedSigma_mag: number;
  readonly count: number;
  readonly each_s: number;
  /** Wall time with acquisition and readouts. */
  readonly total_s: number;
  /** The same if the star is one sigma brighter or fainter than predicted. */
  readonly totalBright_s: number;
  readonly totalFaint_s: number;
  /** S/N reached with the rounded times (per resolution element for a spectrograph). */
  readonly snr: number;
  /** What takes most of the time: star, sky, read noise, scintillation; or why it cannot be done. */
  readonly limitedBy: string;
  readonly possible: boolean;
  /** What to mind in doing it, in words; empty: nothing. */
  readonly caution: string;
}

/** The sky an exposure is worked out for. */
export interface Conditions {
  readonly airmass: number;
  /** At the zenith and 500 nm. */
  readonly seeing_arcsec: number;
  readonly siteHeight_m: number;
  /** Position angle of the zenith at the target, from north through east; NaN: not known. */
  readonly parallacticAngle_deg: number;
  /** Transparency lost to cloud, magnitudes. */
  readonly cloud_mag: number;
  /** Brightness of the sky at the target in a band of the profile, mag/arcsec^2; NaN in daylight (Sun above -5 deg). */
  readonly sky_magPerArcsec2: (band: BandSettings, wavelength_nm: number) => number;
}
