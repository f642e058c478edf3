import type { Band } from '../../science/bands.js';
import type { StarClass } from '../../science/classes.js';
import type { DiagramAxes } from '../../science/odds/index.js';

/** Where a star's absolute magnitude comes from. */
export type DistanceSource = 'parallax' | 'cluster' | 'none';

/** How one band of a star behaved over the night. */
export interface BandChange {
  readonly band: Band;
  readonly readings: number;
  /** Probability of so large a scatter by chance, and of so smooth an order in time, for a constant star. */
  readonly scatterChance: number;
  readonly orderChance: number;
  readonly reducedChi2: number;
  /** Largest minus smallest magnitude. */
  readonly range_mag: number;
  readonly interquartileRange_mag: number;
  /** Last third of the readings minus first third: positive = faded. */
  readonly change_mag: number;
  readonly changeSigma_mag: number;
  readonly from_ms: number;
  readonly to_ms: number;
}

/** How two bands changed together, pair by pair. */
export interface PairedChange {
  readonly bands: readonly Band[];
  readonly pairs: number;
  readonly stetsonJ: number;
  /** Probability of so large a J by chance, for a constant star. */
  readonly chance: number;
}

/** A star's behaviour over the night; no bands where nothing is worth a look. */
export interface StarChanges {
  readonly bands: readonly BandChange[];
  readonly paired: PairedChange | undefined;
}

/** All that the flags may look at. NaN = not known. */
export interface StarEvidence {
  readonly axes: DiagramAxes;
  readonly odds: Readonly<Record<StarClass, number>>;
  readonly absMag: number;
  readonly absMagSigma: number;
  /** Observed colour of the axes, and the same without reddening. */
  readonly colour: number;
  readonly colourSigma: number;
  readonly intrinsicColour: number;
  /** Absolute magnitude of a dwarf, and of a white dwarf, of the same intrinsic colour. */
  readonly dwarfAbsMag: number;
  readonly whiteDwarfAbsMag: number;
  readonly subtype: number;
  readonly subtypeSigma: number;
  readonly teff_K: number;
  readonly teffSigma_K: number;
  /** Decimal logarithm of the luminosity in Suns. */
  readonly logLuminosity: number;
  /** Total proper motion, and the distance modulus of the fit. */
  readonly properMotion_masPerYr: number;
  readonly fitModulus_mag: number;
  readonly fitModulusSigma_mag: number;
  readonly distance: DistanceSource;
  readonly parallax_mas: number;
  readonly parallaxSigma_mas: number;
  /** Cluster modulus, probability of membership, and where the cluster's main sequence ends (M_V). */
  readonly modulus_mag: number;
  readonly memberOdds: number;
  readonly turnOffAbsMag: number;
  /** Readings in all bands, and how many of them the pipeline itself marks. */
  readonly readings: number;
  readonly suspectReadings: number;
  readonly changes: StarChanges;
  /** Stars among which a chance variation is looked for. */
  readonly starsSearched: number;
}

/** A reason why a star is unusual. */
export interface RaisedFlag {
  readonly code: string;
  readonly odds: number;
  /** Why, in one sentence with the numbers in it. */
  readonly because: string;
}
