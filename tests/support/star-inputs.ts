import type { Band } from '../../src/science/bands.js';
import { CLASS_COUNT, CLASSES, type StarClass } from '../../src/science/classes.js';
import {
  buildModel,
  classifyStars,
  type DiagramAxes,
  type FieldPrior,
  makeOddsColumns,
  type OddsColumns,
  type StarInputs,
  spectralTypeText,
} from '../../src/science/odds/index.js';

/** An unreddened patch of the solar neighbourhood. */
export const OPEN_FIELD: FieldPrior = {
  population: 'field',
  modulus_mag: Number.NaN,
  modulusSigma_mag: Number.NaN,
  memberShare: 0,
  pmRa_masPerYear: Number.NaN,
  pmDec_masPerYear: Number.NaN,
  pmSigma_masPerYear: Number.NaN,
  fieldPmSigma_masPerYear: 8,
  age_Gyr: Number.NaN,
  extinction_AV: 0,
  extinctionSigma_AV: 0.02,
  dust: undefined,
  lengthScale_pc: 1350,
  parallaxZeroPoint_mas: 0,
  floor_mag: 0.02,
  bandFloor_mag: {},
  classScale: {},
};

export const BV_AXES: DiagramAxes = { colour: { blue: 'B', red: 'V' }, band: 'V' };
export const GAIA_AXES: DiagramAxes = { colour: { blue: 'BP', red: 'RP' }, band: 'G' };

export interface TestStar {
  readonly mags: Readonly<Partial<Record<Band, number>>>;
  readonly sigma_mag?: number;
  readonly parallax_mas?: number;
  readonly parallaxSigma_mas?: number;
  readonly pmRa_masPerYear?: number;
  readonly pmDec_masPerYear?: number;
  readonly reddening_EBV?: number;
}

export function starInputs(stars: readonly TestStar[], bands: readonly Band[]): StarInputs {
  return {
    count: stars.length,
    bands,
    mag: bands.map(band => Float64Array.from(stars, star => star.mags[band] ?? Number.NaN)),
    sigma_mag: bands.map(() => Float64Array.from(stars, star => star.sigma_mag ?? 0.015)),
    parallax_mas: Float64Array.from(stars, star => star.parallax_mas ?? Number.NaN),
    parallaxSigma_mas: Float64Array.from(stars, star => star.parallaxSigma_mas ?? Number.NaN),
    pmRa_masPerYear: Float64Array.from(stars, star => star.pmRa_masPerYear ?? Number.NaN),
    pmDec_masPerYear: Float64Array.from(stars, star => star.pmDec_masPerYear ?? Number.NaN),
    reddening_EBV: Float64Array.from(stars, star => star.reddening_EBV ?? Number.NaN),
  };
}

/** One classified star, read back from the columns. */
export interface Classified {
  readonly odds: Readonly<Record<StarClass, number>>;
  readonly best: StarClass;
  readonly text: string;
  readonly subtype: number;
  readonly teff_K: number;
  readonly absMag: number;
  readonly columns: OddsColumns;
}

export function classifyAll(
  stars: readonly TestStar[],
  bands: readonly Band[],
  axes: DiagramAxes,
  field: FieldPrior = OPEN_FIELD,
): readonly Classified[] {
  const inputs = starInputs(stars, bands);
  const columns = makeOddsColumns(stars.length);
  classifyStars(buildModel(field, axes, bands), inputs, 0, stars.length, columns);
  return stars.map((_, i) => {
    const row = columns.odds.subarray(i * CLASS_COUNT, (i + 1) * CLASS_COUNT);
    return {
      odds: Object.fromEntries(CLASSES.map((name, c) => [name, row[c]])) as Record<StarClass, number>,
      best: CLASSES[columns.classIndex[i]],
      text: spectralTypeText(row, 0, columns.subtype[i], columns.teff_K[i]),
      subtype: columns.subtype[i],
      teff_K: columns.teff_K[i],
      absMag: columns.absMag[i],
      columns,
    };
  });
}
