import { spawnSync } from 'node:child_process';
import { BAND_INDEX } from '../../src/science/bands.js';
import type { ClassModel, StarInputs } from '../../src/science/odds/index.js';

const INTERPRETERS = ['/usr/bin/python3', 'python3'];
const STARS = 10_000;

/** Stars per second of the same sums in NumPy, or a word why not. */
export function numpyStarsPerSecond(model: ClassModel, inputs: StarInputs): number | string {
  const python = INTERPRETERS.find(name => spawnSync(name, ['-c', 'import numpy']).status === 0);
  if (python === undefined) return 'no Python with NumPy here';
  const bands = inputs.bands.map(band => BAND_INDEX[band]);
  const floor2 = model.field.floor_mag ** 2;
  const nodes: Record<string, number[]> = {
    density: [...model.fieldDensity],
    class_index: [...model.classIndex],
    scatter_variance: model.nodes.map(node => node.scatter_mag ** 2),
  };
  const stars: Record<string, number[]> = {
    parallax_mas: [...inputs.parallax_mas.subarray(0, STARS)],
    parallax_sigma_mas: [...inputs.parallaxSigma_mas.subarray(0, STARS)],
  };
  bands.forEach((index, b) => {
    // JSON has no NaN: a node that is silent in a band is put where no star comes near.
    nodes[`mag${b}`] = Array.from(model.absMag[index], mag => (Number.isNaN(mag) ? 99 : mag));
    nodes[`ratio${b}`] = [...model.extinctionRatio[index]];
    nodes[`variance${b}`] = model.nodes.map(node => node.bandScatter_mag[index] ** 2 + floor2);
    stars[`mag${b}`] = [...inputs.mag[b].subarray(0, STARS)];
    stars[`sigma${b}`] = [...inputs.sigma_mag[b].subarray(0, STARS)];
  });
  const extinction = { mean: model.field.extinction_AV, variance: model.field.extinctionSigma_AV ** 2 };
  const result = spawnSync(python, ['tests/bench/odds-reference.py'], {
    input: JSON.stringify({ nodes, stars, extinction }),
    encoding: 'utf8',
    maxBuffer: 1 << 28,
  });
  if (result.status !== 0) return `NumPy failed: ${result.stderr.trim().split('\n').at(-1)}`;
  return (JSON.parse(result.stdout) as { starsPerSecond: number }).starsPerSecond;
}
