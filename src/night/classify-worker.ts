import { parentPort, workerData } from 'node:worker_threads';
import {
  buildModel,
  classifyStars,
  type DiagramAxes,
  type FieldPrior,
  makeOddsColumns,
  type StarInputs,
} from '../science/odds/index.js';

/** What the second thread is given. */
export interface ClassifyTask {
  readonly field: FieldPrior;
  readonly axes: DiagramAxes;
  readonly inputs: StarInputs;
}

/** Classifies its share of the stars and hands the columns back. */
const { field, axes, inputs } = workerData as ClassifyTask;
const out = makeOddsColumns(inputs.count);
classifyStars(buildModel(field, axes, inputs.bands), inputs, 0, inputs.count, out);
parentPort?.postMessage(
  out,
  Object.values(out).map(column => column.buffer as ArrayBuffer),
);
