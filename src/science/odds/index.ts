export { classifySome, classifyStars } from './classify.js';
export { absMagOnLine, letterPositions, type TrackLine, tracksInAxes } from './diagram.js';
export type { FieldPrior, Population } from './field.js';
export { buildModel, type ClassModel, type DiagramAxes } from './model.js';
export { growOddsColumns, makeOddsColumns, type OddsColumns } from './odds-columns.js';
export { type ClassEvidence, PosteriorReader, type PredictedMagnitudes } from './posterior.js';
export { bestClassIndex, oddsText, spectralTypeText, temperatureTypeText } from './spectral-type.js';
export type { StarInputs } from './star-inputs.js';
