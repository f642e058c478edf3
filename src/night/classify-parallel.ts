import { Worker } from 'node:worker_threads';
import { CLASS_COUNT } from '../science/classes.js';
import { type ClassModel, classifyStars, type OddsColumns, type StarInputs } from '../science/odds/index.js';
import type { ClassifyTask } from './classify-worker.js';

/** Below this a second thread costs more than it saves: it has to start and build a model of its own. */
const WORTH_A_THREAD = 20_000;
/** The other thread begins later, and is given a little less. */
const OWN_SHARE = 0.54;

/** Classifies all stars on two threads; few of them on this one alone. */
export async function classifyParallel(
  model: ClassModel,
  inputs: StarInputs,
  out: OddsColumns,
): Promise<void> {
  const { count } = inputs;
  const split = count < WORTH_A_THREAD ? count : Math.floor(count * OWN_SHARE);
  const elsewhere = split < count ? classifyElsewhere(model, inputs, split) : undefined;
  classifyStars(model, inputs, 0, split, out);
  if (elsewhere === undefined) return;
  const columns = await elsewhere;
  for (const name of Object.keys(columns) as (keyof OddsColumns)[]) {
    out[name].set(columns[name], name === 'odds' ? split * CLASS_COUNT : split);
  }
}

function classifyElsewhere(model: ClassModel, inputs: StarInputs, from: number): Promise<OddsColumns> {
  const part = (column: Float64Array) => column.slice(from, inputs.count);
  const task: ClassifyTask = {
    field: model.field,
    axes: model.axes,
    inputs: {
      count: inputs.count - from,
      bands: inputs.bands,
      mag: inputs.mag.map(part),
      sigma_mag: inputs.sigma_mag.map(part),
      parallax_mas: part(inputs.parallax_mas),
      parallaxSigma_mas: part(inputs.parallaxSigma_mas),
      pmRa_masPerYear: part(inputs.pmRa_masPerYear),
      pmDec_masPerYear: part(inputs.pmDec_masPerYear),
      reddening_EBV: part(inputs.reddening_EBV),
    },
  };
  return new Promise((resolve, reject) => {
    const worker = new Worker(new URL('./classify-worker.js', import.meta.url), { workerData: task });
    worker.once('message', resolve);
    worker.once('error', reject);
  });
}
