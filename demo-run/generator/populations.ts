import { BAND_INDEX } from '../../src/science/bands.js';
import { CLASSES } from '../../src/science/classes.js';
import { coneVolume, drawDistance_pc } from '../../src/science/distance/draw-distance.js';
import { makeNodes, type Node } from '../../src/science/odds/nodes.js';
import type { Random } from '../../src/science/random.js';
import { readTracks } from '../../src/science/tracks/index.js';
import { SCENARIO } from './scenario.js';
import { anywhere, type DemoStar, placed, randomMotion } from './star.js';

const V = BAND_INDEX.V;
const B = BAND_INDEX.B;

/** Kinds of star drawn at random; the rare ones are placed by hand and listed in truth.json. */
const ORDINARY = new Set(['V', 'IV', 'III']);

export function ordinaryNodes(): readonly Node[] {
  return makeNodes(readTracks()).filter(
    node => ORDINARY.has(CLASSES[node.classIndex]) && !Number.isNaN(node.absMag[V] + node.absMag[B]),
  );
}

/** Stars before and behind the cluster: the local mix of kinds, thinned with distance, cut in apparent V. */
export function backgroundStars(nodes: readonly Node[], random: Random): DemoStar[] {
  const { stars, lengthScale_pc, brightest_V, faintest_V, scatter_mag, colourScatter_mag } =
    SCENARIO.background;
  const farthest = nodes.map(node => 10 ** ((faintest_V - node.absMag[V] + 5) / 5));
  const sums = runningSums(
    nodes.map((node, i) => node.density_perPc3 * coneVolume(farthest[i], lengthScale_pc)),
  );
  const drawn: DemoStar[] = [];
  while (drawn.length < stars) {
    const i = random.weighted(sums);
    const distance_pc = drawDistance_pc(random, farthest[i], lengthScale_pc);
    const shift = random.normal(0, scatter_mag) - companionGain(random, 0.2);
    const absV = nodes[i].absMag[V] + shift;
    const absB = nodes[i].absMag[B] + shift + random.normal(0, colourScatter_mag);
    // Most of the dust lies in the first few hundred parsec.
    const dust = 0.25 * (1 - Math.exp(-distance_pc / 150)) * Math.max(0.4, random.normal(1, 0.2));
    const star = placed(
      anywhere(random),
      { V: absV, B: absB },
      distance_pc,
      dust,
      randomMotion(random, distance_pc),
    );
    if (star.V > brightest_V && star.V < faintest_V) drawn.push(star);
  }
  return drawn;
}

/** Main sequence up to the turn-off, with pairs, and a handful of clump giants. */
export function clusterStars(nodes: readonly Node[], random: Random): DemoStar[] {
  const { cluster } = SCENARIO;
  const dwarfs = nodes.filter(
    node =>
      CLASSES[node.classIndex] === 'V' &&
      node.absMag[V] > cluster.turnOff_absMagV &&
      node.absMag[V] < cluster.faintest_absMagV,
  );
  // Slowly rising towards the faint end, as open clusters do.
  const sums = runningSums(dwarfs.map(node => 10 ** (0.09 * node.absMag[V]) * nodeWidth(node, dwarfs)));
  const giants = nodes.filter(
    node => CLASSES[node.classIndex] === 'III' && node.subtype > 48 && node.subtype < 51.5,
  );
  const members: DemoStar[] = [];
  for (let i = 0; i < cluster.members; i++) {
    const node = dwarfs[random.weighted(sums)];
    const shift = random.normal(0, cluster.scatter_mag) - companionGain(random, cluster.binaryShare);
    members.push(member(node.absMag[V] + shift, node.absMag[B] + shift + random.normal(0, 0.01), random));
  }
  for (let i = 0; i < cluster.giants; i++) {
    const node = giants[Math.floor(random.uniform() * giants.length)];
    const shift = random.normal(0, 0.15);
    members.push(member(node.absMag[V] + shift, node.absMag[B] + shift, random));
  }
  return members;
}

/** A star of the cluster of given absolute magnitudes: crowded to the middle, moving with the others. */
export function member(absV: number, absB: number, random: Random): DemoStar {
  const { cluster, field } = SCENARIO;
  const radius = cluster.halfRadius_deg * Math.sqrt(1 / Math.max(0.06, random.uniform()) - 1);
  const angle = 2 * Math.PI * random.uniform();
  const half = field.width_deg / 2;
  const inside = Math.min(radius, half * 0.98);
  const dec_deg = field.dec_deg + inside * Math.sin(angle);
  const ra_deg = field.ra_deg + (inside * Math.cos(angle)) / Math.cos((dec_deg * Math.PI) / 180);
  const distance_pc = 10 ** ((cluster.modulus_mag + 5) / 5) * (1 + random.normal(0, 0.003));
  const motion = { ra: random.normal(7.4, 0.25), dec: random.normal(-9.1, 0.25) };
  return placed({ ra_deg, dec_deg }, { V: absV, B: absB }, distance_pc, cluster.extinction_AV, motion);
}

/** Brightening by an unresolved companion: none for most, up to an equal partner's 0.753 mag. */
function companionGain(random: Random, share: number): number {
  if (random.uniform() > share) return 0;
  const massRatio = random.between(0.3, 1);
  return 2.5 * Math.log10(1 + massRatio ** 4.5);
}

function nodeWidth(node: Node, among: readonly Node[]): number {
  const i = among.indexOf(node);
  const before = among[Math.max(0, i - 1)].absMag[V];
  const after = among[Math.min(among.length - 1, i + 1)].absMag[V];
  return Math.max(0.01, Math.abs(after - before) / 2);
}

function runningSums(weights: readonly number[]): Float64Array {
  let sum = 0;
  return Float64Array.from(weights, weight => {
    sum += weight;
    return sum;
  });
}
