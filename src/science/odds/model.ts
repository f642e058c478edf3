import { BAND_COUNT, BAND_INDEX, type Band, type Colour } from '../bands.js';
import { readTracks } from '../tracks/index.js';
import type { Track } from '../tracks/track.js';
import { type FieldPrior, hasCluster } from './field.js';
import { FlatClass } from './flat-class.js';
import { magnitudeCounts } from './magnitude-counts.js';
import { type Branch, makeNodes, type Node } from './nodes.js';
import { populationDensities } from './populations.js';

/** Axes of the HR diagram: a colour and the band of the absolute magnitude. */
export interface DiagramAxes {
  readonly colour: Colour;
  readonly band: Band;
}

/** Nodes that share their scatter: a run of places in the node columns, sorted by colour. */
export interface NoiseGroup {
  readonly first: number;
  /** Up to here the colour in the axes is not known. */
  readonly silentEnd: number;
  readonly end: number;
  readonly scatterVariance_mag2: number;
  readonly bandVariance_mag2: number;
  readonly scatterGroup: number;
  readonly branches: readonly Branch[];
  /** Largest and smallest brighter_mag of the branches. */
  readonly brightest_mag: number;
  readonly faintest_mag: number;
}

/**
 * Everything about a field that does not depend on the star: the nodes as columns, their densities in the
 * field and in the cluster, and how numerous each population is at each apparent magnitude.
 */
export interface ClassModel {
  readonly axes: DiagramAxes;
  readonly field: FieldPrior;
  readonly tracks: readonly Track[];
  readonly nodes: readonly Node[];
  readonly groups: readonly NoiseGroup[];
  /** Intrinsic colour of each node in the axes; NaN first, then rising, within each group. */
  readonly colours: Float64Array;
  /** One column over the nodes for each band, in the order of BANDS. */
  readonly absMag: readonly Float64Array[];
  readonly extinctionRatio: readonly Float64Array[];
  readonly classIndex: Uint8Array;
  /** Distinct intrinsic scatters, mag^2. */
  readonly scatterVariances_mag2: readonly number[];
  readonly fieldDensity: Float64Array;
  readonly clusterDensity: Float64Array;
  readonly flat: FlatClass;
  /** Stars per magnitude at an apparent magnitude in axes.band, in either population. */
  readonly fieldCounts: (mag: number) => number;
  readonly clusterCounts: (mag: number) => number;
}

/**
 * Builds the model of a field for stars measured in the given bands; stars may lack some of them, and have others at
 * the cost of a coarser fit there.
 */
export function buildModel(field: FieldPrior, axes: DiagramAxes, bands: readonly Band[]): ClassModel {
  const tracks = readTracks();
  const { nodes, groups, colours, scatterVariances_mag2 } = arrange(
    makeNodes(tracks, coloursOf(axes, bands)),
    axes,
  );
  const columns = (of: (node: Node) => Float64Array) =>
    Array.from({ length: BAND_COUNT }, (_, band) => Float64Array.from(nodes, node => of(node)[band]));
  const cluster = hasCluster(field);
  // Around a cluster lies the ordinary field; without one the population is the field's own.
  const fieldDensity = populationDensities(nodes, cluster ? 'field' : field.population, field);
  const clusterDensity = cluster
    ? populationDensities(nodes, field.population, field)
    : new Float64Array(nodes.length);
  const absMag = columns(node => node.absMag);
  const extinctionRatio = columns(node => node.extinctionRatio);
  const flat = new FlatClass(nodes, fieldDensity);
  const counts = magnitudeCounts({ nodes, band: BAND_INDEX[axes.band], field });
  return {
    axes,
    field,
    tracks,
    nodes,
    groups,
    colours,
    absMag,
    extinctionRatio,
    classIndex: Uint8Array.from(nodes, node => node.classIndex),
    scatterVariances_mag2,
    fieldDensity,
    clusterDensity,
    flat,
    fieldCounts: counts.inField(fieldDensity),
    clusterCounts: counts.inCluster(clusterDensity),
  };
}

/** The axes' colour, and every other band against its red one. */
function coloursOf({ colour }: DiagramAxes, bands: readonly Band[]): readonly Colour[] {
  return [
    colour,
    ...bands.filter(band => band !== colour.red).map(band => ({ blue: band, red: colour.red })),
  ];
}

/** Sorted by noise group, then by colour, so that a star meets only the nodes near its colour. */
function arrange(unsorted: readonly Node[], axes: DiagramAxes) {
  const colourOf = (node: Node) =>
    node.absMag[BAND_INDEX[axes.colour.blue]] - node.absMag[BAND_INDEX[axes.colour.red]];
  const scatters = [...new Set(unsorted.map(node => node.scatter_mag))].sort((a, b) => a - b);
  const byKey = new Map<string, Node[]>();
  for (const node of unsorted) {
    const key = `${node.scatter_mag} ${node.bandScatter_mag} ${node.branches.map(branch => branch.brighter_mag)}`;
    const members = byKey.get(key) ?? [];
    members.push(node);
    byKey.set(key, members);
  }
  const nodes: Node[] = [];
  const groups: NoiseGroup[] = [];
  for (const members of byKey.values()) {
    const silent = members.filter(node => Number.isNaN(colourOf(node)));
    const known = members.filter(node => !Number.isNaN(colourOf(node)));
    known.sort((a, b) => colourOf(a) - colourOf(b));
    const [first] = members;
    groups.push({
      first: nodes.length,
      silentEnd: nodes.length + silent.length,
      end: nodes.length + members.length,
      scatterVariance_mag2: first.scatter_mag ** 2,
      bandVariance_mag2: first.bandScatter_mag ** 2,
      scatterGroup: scatters.indexOf(first.scatter_mag),
      branches: first.branches,
      brightest_mag: Math.max(...first.branches.map(branch => branch.brighter_mag)),
      faintest_mag: Math.min(...first.branches.map(branch => branch.brighter_mag)),
    });
    nodes.push(...silent, ...known);
  }
  const colours = Float64Array.from(nodes, colourOf);
  return { nodes, groups, colours, scatterVariances_mag2: scatters.map(scatter => scatter ** 2) };
}
