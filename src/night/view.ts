import type { Problem } from '../catalogue/problems.js';
import type { ExposureSuggestion } from '../follow/exposure/suggestion.js';
import type { RaisedFlag } from '../follow/flags/index.js';
import type { TargetWindow } from '../follow/sky/window.js';
import type { Band } from '../science/bands.js';
import type { StarClass } from '../science/classes.js';
import type { ClassEvidence, DiagramAxes, TrackLine } from '../science/odds/index.js';

/** What the screens know of the night: made in the worker, sent whole, never changed afterwards. */
export interface NightView {
  readonly revision: number;
  readonly time_ms: number;
  readonly field: string;
  readonly frames: readonly FrameSummary[];
  /** Files whose content had been read before. */
  readonly duplicates: number;
  readonly problems: readonly Problem[];
  readonly axes: DiagramAxes;
  readonly stars: StarColumns;
  /** Flagged stars, best first (merit, then start-by). */
  readonly shortlist: readonly ShortlistEntry[];
  readonly tracks: readonly TrackLine[];
  /** Where the class letters stand on the colour axis. */
  readonly letters: readonly { readonly letter: string; readonly colour: number }[];
  readonly conditions: Conditions;
}

export interface FrameSummary {
  readonly index: number;
  readonly name: string;
  readonly mid_ms: number;
  readonly bands: readonly Band[];
  readonly rows: number;
  readonly fwhm_arcsec: number;
  readonly airmass: number;
  readonly zeroPoint_mag: number;
  readonly sky_magPerArcsec2: number;
}

/** All stars of the night, one array element a star; NaN = not known. */
export interface StarColumns {
  readonly count: number;
  readonly ids: readonly string[];
  readonly ra_deg: Float64Array;
  readonly dec_deg: Float64Array;
  /** Apparent magnitude in axes.band. */
  readonly mag: Float32Array;
  readonly colour: Float32Array;
  readonly absMag: Float32Array;
  readonly absMagSigma: Float32Array;
  /** Index into CLASSES of the most probable class, and its odds. */
  readonly classIndex: Uint8Array;
  readonly classOdds: Float32Array;
  /** Spectral subtype as a number: O0 = 0, B0 = 10, ... M0 = 60, T0 = 80. */
  readonly subtype: Float32Array;
  readonly teff_K: Float32Array;
  /** Bit i set: flag FLAG_CODES[i] is raised. */
  readonly flagBits: Uint32Array;
  /** Number of readings in all bands. */
  readonly readings: Uint32Array;
  /** Index of the newest frame that holds the star. */
  readonly lastFrame: Uint32Array;
}

/** The night as it stands; NaN = not measured or not tonight. */
export interface Conditions {
  /** Seeing at the zenith from the newest frames, else the profile's. */
  readonly seeing_arcsec: number;
  readonly seeingMeasured: boolean;
  /** Transparency lost against the best of the night, as it enters the exposures; 0 when clear or not known. */
  readonly cloud_mag: number;
  readonly sky_magPerArcsec2: number;
  readonly sunAltitude_deg: number;
  readonly moonAltitude_deg: number;
  /** 0 new, 1 full. */
  readonly moonIllumination: number;
  readonly darkFrom_ms: number;
  readonly darkUntil_ms: number;
  /** 'dark 18:42-05:58 UT', or why it is not. */
  readonly darkWords: string;
}

export interface ShortlistEntry {
  /** Place in StarColumns; stable for the whole night. */
  readonly star: number;
  readonly id: string;
  readonly spectralType: string;
  readonly flags: readonly RaisedFlag[];
  readonly cautions: readonly string[];
  readonly merit: number;
  /** First setup's suggestion; the others are in the detail. */
  readonly exposures: readonly ExposureSuggestion[];
  readonly window: TargetWindow;
  /** Index of the frame whose arrival raised the first flag. */
  readonly firstFrame: number;
}

/** Everything about one star, asked for when its screen opens. */
export interface StarDetail {
  readonly star: number;
  readonly id: string;
  readonly ra_deg: number;
  readonly dec_deg: number;
  readonly spectralType: string;
  readonly luminosityClass: string;
  readonly odds: Readonly<Record<StarClass, number>>;
  readonly mags: readonly {
    band: Band;
    mag: number;
    sigma_mag: number;
    readings: number;
    scatter_mag: number;
  }[];
  /** What each class would have the star be, most probable first. */
  readonly evidence: readonly ClassEvidence[];
  readonly absMag: { band: Band; value: number; sigma: number };
  readonly teff_K: number;
  readonly teffSigma_K: number;
  readonly distance_pc: number;
  readonly distanceLow_pc: number;
  readonly distanceHigh_pc: number;
  readonly extinction_AV: number;
  readonly extinctionSigma_AV: number;
  /** Decimal logarithm of the bolometric luminosity, Suns. */
  readonly logLuminosity: number;
  readonly logLuminositySigma: number;
  readonly parallax_mas: number;
  readonly parallaxSigma_mas: number;
  readonly flags: readonly RaisedFlag[];
  readonly cautions: readonly string[];
  readonly exposures: readonly ExposureSuggestion[];
  readonly window: TargetWindow;
  readonly lightCurves: readonly LightCurve[];
}

export interface LightCurve {
  readonly band: Band;
  readonly time_ms: Float64Array;
  readonly mag: Float64Array;
  readonly sigma_mag: Float64Array;
}
