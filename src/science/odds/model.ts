import { BAND_COUNT, BAND_INDEX, type Band, type Colour } from '../bands.js';
import { readTracks } from '../tracks/index.js';
import type { Track } from '../tracks/track.js';
import { ExtinctionPrior } from './extinction-prior.js';
import { type FieldPrior, hasCluster } from './field.js';
import { FlatClass } from './flat-class.js';
import { magnitudeCounts } from './magnitude-counts.js';
import { type DistanceGroup, groupNodes, type NoiseGroup } from './node-groups.js';
import { makeNodes, type Node } from './nodes.js';
import { populationDensities } from './populations.js';

/** Axes of the HR diagram: a colour and the band of the absolute magnitude. */
export interface DiagramAxes {
  readonly colour: Colour;
  readonly band: Band;
}

/**
 * Everything about a field that does not depend on the star: the nodes as columns, their densities in the
 * field and in the cluster, and how numerous each population is at each apparent magnitude.
 */
export interface ClassModel {
  readonly axes: DiagramAxes;
  readonly field: FieldPrior;
  readonly extinction: ExtinctionPrior;
  readonly tracks: readonly Track[];
  readonly nodes: readonly Node[];
  readonly groups: readonly NoiseGroup[];
  readonly distanceGroups: readonly DistanceGroup[];
  /** Intrinsic colour of each node in the axes; NaN first, then rising, within each group. */
  readonly colours: Float64Array;
  /** Largest reddening of the axes' colour for each magnitude of A_V. */
  readonly largestReddening: number;
  /** One column over the nodes for each band, in the order of BANDS. */
  readonly absMag: readonly Float64Array[];
  readonly extinctionRatio: readonly Float64Array[];
  /** Bolometric magnitude where the table gives a correction. */
  readonly bolometricMag: Float64Array;
  readonly classIndex: Uint8Array;
  readonly subtype: Float64Array;
  readonly teff_K: Float64Array;
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
  const { nodes, groups, distanceGroups, colours } = groupNodes(
    makeNodes(tracks, coloursOf(axes, bands)),
    axes.colour,
  );
  const columns = (of: (node: Node) => Float64Array) =>
    Array.from({ length: BAND_COUNT }, (_, band) => Float64Array.from(nodes, node => of(node)[band]));
  const column = (of: (node: Node) => number) => Float64Array.from(nodes, of);
  const cluster = hasCluster(field);
  // Around a cluster lies the ordinary field; without one the population is the field's own.
  const fieldDensity = populationDensities(nodes, cluster ? 'field' : field.population, field);
  const clusterDensity = cluster
    ? populationDensities(nodes, field.population, field)
    : new Float64Array(nodes.length);
  const extinction = new ExtinctionPrior(field);
  const counts = magnitudeCounts({ nodes, band: BAND_INDEX[axes.band], field, extinction });
  return {
    axes,
    field,
    extinction,
    tracks,
    nodes,
    groups,
    distanceGroups,
    colours,
    largestReddening: Math.max(...nodes.map(node => reddeningOf(node, axes.colour))),
    absMag: columns(node => node.absMag),
    extinctionRatio: columns(node => node.extinctionRatio),
    bolometricMag: column(node => node.absMag[BAND_INDEX.V] + node.bolometricCorrection_V),
    classIndex: Uint8Array.from(nodes, node => node.classIndex),
    subtype: column(node => node.subtype),
    teff_K: column(node => node.teff_K),
    fieldDensity,
    clusterDensity,
    flat: new FlatClass(nodes, fieldDensity),
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

function reddeningOf({ extinctionRatio }: Node, { blue, red }: Colour): number {
  return extinctionRatio[BAND_INDEX[blue]] - extinctionRatio[BAND_INDEX[red]];
}
