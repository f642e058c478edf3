import type { InputSettings } from '../catalogue/input-settings.js';
import type { Band } from '../science/bands.js';
import type { FieldPrior } from '../science/odds/field.js';

/** Where the telescope stands and how low it may look. */
export interface Site {
  readonly name: string;
  readonly latitude_deg: number;
  /** East positive. */
  readonly longitude_deg: number;
  readonly height_m: number;
  /** IANA name for local times on the screen, e.g. 'UTC'. */
  readonly timeZone: string;
  readonly minAltitude_deg: number;
  readonly maxAirmass: number;
  /** Sun's altitude below which follow-up exposures may run. */
  readonly sunLimit_deg: number;
  /** Dead zone of the mount round the zenith, radius in degrees; 0: none. */
  readonly zenithLimit_deg: number;
  /** What stands round the telescope: corners of azimuth (from north through east) and altitude as seen; [] none. */
  readonly horizon: readonly (readonly [azimuth_deg: number, altitude_deg: number])[];
  /** Never suggest a target nearer the Moon than this. */
  readonly moonDistance_deg: number;
  /** Zenith seeing in the absence of a measured one. */
  readonly seeing_arcsec: number;
}

export interface Telescope {
  readonly aperture_m: number;
  /** Linear central obstruction, 0 to 1. */
  readonly obstruction: number;
}

/** How a band looks from this site: throughput of everything from the mirror to the electron. */
export interface BandSettings {
  readonly band: Band;
  /** Optics x filter peak x detector QE, 0 to 1. */
  readonly throughput: number;
  readonly extinction_magPerAirmass: number;
  readonly darkSky_magPerArcsec2: number;
}

export interface Detector {
  readonly pixel_arcsec: number;
  readonly readNoise_e: number;
  readonly gain_ePerAdu: number;
  readonly dark_ePerS: number;
  readonly fullWell_e: number;
  readonly bits: number;
  readonly readout_s: number;
}

interface SetupCommon {
  readonly name: string;
  readonly detector: Detector;
  readonly targetSnr: number;
  readonly maxSingle_s: number;
  readonly minCount: number;
  /** Pointing, acquisition and guiding before the first exposure. */
  readonly acquire_s: number;
  /** Longest total worth suggesting. */
  readonly maxTotal_s: number;
}

export interface ImagerSetup extends SetupCommon {
  readonly kind: 'imager';
  readonly band: Band;
}

export interface SpectrographSetup extends SetupCommon {
  readonly kind: 'spectrograph';
  /** Wavelength at which targetSnr per resolution element is wanted. */
  readonly wavelength_nm: number;
  readonly slit_arcsec: number;
  readonly dispersion_nmPerPixel: number;
  readonly resolution_nm: number;
  /** Telescope to electron without slit losses, 0 to 1. */
  readonly throughput: number;
}

export type Setup = ImagerSetup | SpectrographSetup;

/** How far away and how reddened the field is. */
export interface FieldSettings extends FieldPrior {
  readonly name: string;
}

/** One flag's setting: off, or the odds (or significance) it needs and the weight it carries in the merit. */
export interface FlagSetting {
  readonly on: boolean;
  readonly threshold: number;
  readonly weight: number;
}

/** A whole profile, as every part of the program sees it. */
export interface Profile {
  readonly name: string;
  readonly site: Site;
  readonly telescope: Telescope;
  readonly bands: readonly BandSettings[];
  readonly setups: readonly Setup[];
  readonly field: FieldSettings;
  readonly flags: Readonly<Record<string, FlagSetting>>;
  readonly input: InputSettings;
}
