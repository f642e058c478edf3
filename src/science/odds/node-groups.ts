import { BAND_INDEX, type Colour } from '../bands.js';
import type { Kinematics } from '../tangential-velocity.js';
import type { Branch, Node } from './nodes.js';

/** Nodes that share their scatter in every band: a run of places in the node columns, sorted by colour. */
export interface NoiseGroup {
  readonly first: number;
  /** Up to here the colour in the axes is not known. */
  readonly silentEnd: number;
  readonly end: number;
  /** Variance of each band on its own, laid out as BANDS. */
  readonly bandVariance_mag2: readonly number[];
  readonly branches: readonly Branch[];
  /** Largest and smallest brighter_mag of the branches. */
  readonly brightest_mag: number;
  readonly faintest_mag: number;
  /** Place in the list of distance groups. */
  readonly distanceGroup: number;
}

/** Nodes whose distances are weighed alike: by the width of their sequence, and by how fast such stars move. */
export interface DistanceGroup {
  readonly scatterVariance_mag2: number;
  readonly kinematics: Kinematics;
}

interface GroupedNodes {
  readonly nodes: readonly Node[];
  readonly groups: readonly NoiseGroup[];
  readonly distanceGroups: readonly DistanceGroup[];
  readonly colours: Float64Array;
}

/** Sorts nodes by noise group, then by colour, so that a star meets only the nodes near its colour. */
export function groupNodes(unsorted: readonly Node[], colour: Colour): GroupedNodes {
  const colourOf = (node: Node) => node.absMag[BAND_INDEX[colour.blue]] - node.absMag[BAND_INDEX[colour.red]];
  const byDistance = gather(unsorted, node => `${node.scatter_mag} ${node.kinematics}`);
  const distanceKeys = [...byDistance.keys()];
  const nodes: Node[] = [];
  const groups: NoiseGroup[] = [];
  for (const members of gather(unsorted, noiseKey).values()) {
    const silent = members.filter(node => Number.isNaN(colourOf(node)));
    const known = members.filter(node => !Number.isNaN(colourOf(node)));
    known.sort((a, b) => colourOf(a) - colourOf(b));
    const [first] = members;
    const gains = first.branches.map(branch => branch.brighter_mag);
    groups.push({
      first: nodes.length,
      silentEnd: nodes.length + silent.length,
      end: nodes.length + members.length,
      bandVariance_mag2: first.bandScatter_mag.map(sigma => sigma * sigma),
      branches: first.branches,
      brightest_mag: Math.max(...gains),
      faintest_mag: Math.min(...gains),
      distanceGroup: distanceKeys.indexOf(`${first.scatter_mag} ${first.kinematics}`),
    });
    nodes.push(...silent, ...known);
  }
  return {
    nodes,
    groups,
    distanceGroups: [...byDistance.values()].map(([{ scatter_mag, kinematics }]) => ({
      scatterVariance_mag2: scatter_mag ** 2,
      kinematics,
    })),
    colours: Float64Array.from(nodes, colourOf),
  };
}

function noiseKey(node: Node): string {
  const gains = node.branches.map(branch => branch.brighter_mag);
  return [node.scatter_mag, node.kinematics, ...gains, ...node.bandScatter_mag].join(' ');
}

function gather(nodes: readonly Node[], keyOf: (node: Node) => string): Map<string, Node[]> {
  const gathered = new Map<string, Node[]>();
  for (const node of nodes) {
    const key = keyOf(node);
    const members = gathered.get(key);
    if (members === undefined) gathered.set(key, [node]);
    else members.push(node);
  }
  return gathered;
}
