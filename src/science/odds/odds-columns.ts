import { CLASS_COUNT } from '../classes.js';

/** What the fit says of each star, as columns; NaN = not known. */
export interface OddsColumns {
  /** Element star * CLASS_COUNT + class index; each star's row sums to 1. */
  readonly odds: Float32Array;
  readonly classIndex: Uint8Array;
  /** Running subtype number along the most probable class, with its spread. */
  readonly subtype: Float32Array;
  readonly subtypeSigma: Float32Array;
  readonly teff_K: Float32Array;
  readonly teffSigma_K: Float32Array;
  /** Bolometric luminosity in the logarithm (decimal, Suns) along the most probable class. */
  readonly logLuminosity: Float32Array;
  readonly logLuminositySigma: Float32Array;
  /** Absolute magnitude in the model's axes.band. */
  readonly absMag: Float32Array;
  readonly absMagSigma: Float32Array;
  readonly modulus_mag: Float32Array;
  readonly modulusSigma_mag: Float32Array;
  readonly extinction_AV: Float32Array;
  readonly extinctionSigma_AV: Float32Array;
  /** Probability of belonging to the field's cluster. */
  readonly memberOdds: Float32Array;
}

export function makeOddsColumns(capacity: number): OddsColumns {
  const column = () => new Float32Array(capacity).fill(Number.NaN);
  return {
    odds: new Float32Array(capacity * CLASS_COUNT).fill(Number.NaN),
    classIndex: new Uint8Array(capacity),
    subtype: column(),
    subtypeSigma: column(),
    teff_K: column(),
    teffSigma_K: column(),
    logLuminosity: column(),
    logLuminositySigma: column(),
    absMag: column(),
    absMagSigma: column(),
    modulus_mag: column(),
    modulusSigma_mag: column(),
    extinction_AV: column(),
    extinctionSigma_AV: column(),
    memberOdds: column(),
  };
}

/** The same columns with room for more stars. */
export function growOddsColumns(columns: OddsColumns, capacity: number): OddsColumns {
  const grown = makeOddsColumns(capacity);
  for (const name of Object.keys(columns) as (keyof OddsColumns)[]) grown[name].set(columns[name]);
  return grown;
}
