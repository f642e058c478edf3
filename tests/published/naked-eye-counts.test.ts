import { describe, expect, it } from 'vitest';
import { BAND_INDEX } from '../../src/science/bands.js';
import { CLASSES, type StarClass } from '../../src/science/classes.js';
import { makeNodes, type Node } from '../../src/science/odds/nodes.js';
import { readTracks } from '../../src/science/tracks/index.js';

/**
 * Stars of the naked-eye catalogue by letter and luminosity class: proportions of the Bright Star Catalogue (Hoffleit &
 * Warren 1991, about 9,100 stars to V 6.5), from memory and rounded, so good to some ten per cent.
 */
const CATALOGUE: Readonly<Record<string, Readonly<Record<string, number>>>> = {
  V: { O: 25, B: 800, A: 1050, F: 560, G: 200, K: 70 },
  IV: { B: 300, A: 260, F: 250, G: 110, K: 90 },
  III: { O: 12, B: 300, A: 230, F: 170, G: 620, K: 1750, M: 460 },
  II: { B: 80, A: 40, F: 70, G: 110, K: 150, M: 30 },
  I: { O: 13, B: 150, A: 80, F: 80, G: 70, K: 50, M: 30 },
};

const LIMIT_MAG = 6.5;

/** Scale height of a kind of star above the plane, pc (common practice: young ones lie flat). */
function scaleHeight_pc(group: string, letter: string): number {
  if (group === 'I' || letter === 'O' || letter === 'B') return 60;
  if (letter === 'A') return 90;
  if (group === 'II') return letter === 'F' ? 80 : 100;
  if (letter === 'F') return group === 'III' ? 110 : 150;
  return 250;
}

/** Volume, weighted by the thinning of the disc, in which a star of this M_V is brighter than the limit. */
function volume_pc3(absMag: number, height_pc: number): number {
  const farthest_pc = 10 ** ((LIMIT_MAG - absMag + 5) / 5);
  const dust_magPerPc = height_pc < 120 ? 0.0008 : 0.0004;
  const steps = 200;
  let volume = 0;
  for (let i = 0; i < steps; i++) {
    const r = (farthest_pc * (i + 0.5)) / steps;
    const seen = absMag + 5 * Math.log10(r) - 5 + Math.min(2, dust_magPerPc * r);
    if (seen > LIMIT_MAG) continue;
    // Mean of exp(-|z|/h) over a sphere of radius r.
    const thinning = (height_pc / r) * (1 - Math.exp(-r / height_pc));
    volume += ((4 * Math.PI * r * r * farthest_pc) / steps) * thinning;
  }
  return volume;
}

const GAUSS = [-2, -1, 0, 1, 2].map(z => ({ z, weight: Math.exp(-0.5 * z * z) / 2.4836 }));

function expectedNumber(node: Node, height_pc: number): number {
  const absMag = node.absMag[BAND_INDEX.V];
  let volume = 0;
  for (const { share, brighter_mag } of node.branches) {
    for (const { z, weight } of GAUSS) {
      volume += share * weight * volume_pc3(absMag - brighter_mag + z * node.scatter_mag, height_pc);
    }
  }
  return node.density_perPc3 * volume;
}

describe('space densities', () => {
  const counts = new Map<string, number>();
  for (const node of makeNodes(readTracks())) {
    if (Number.isNaN(node.subtype + node.absMag[BAND_INDEX.V])) continue;
    const starClass: StarClass = CLASSES[node.classIndex];
    const group = starClass.startsWith('I') && /[ab]/.test(starClass) ? 'I' : starClass;
    const letter = 'OBAFGKMLT'[Math.floor(node.subtype / 10)];
    const key = `${group} ${letter}`;
    counts.set(key, (counts.get(key) ?? 0) + expectedNumber(node, scaleHeight_pc(group, letter)));
  }
  const cases = Object.entries(CATALOGUE).flatMap(([group, letters]) =>
    Object.entries(letters).map(([letter, catalogued]) => [`${group} ${letter}`, catalogued] as const),
  );

  it.each(cases)(
    'class %s: the naked-eye catalogue holds about %i, within a factor of two',
    (key, catalogued) => {
      const ratio = (counts.get(key) ?? 0) / catalogued;
      expect(ratio).toBeGreaterThan(0.5);
      expect(ratio).toBeLessThan(2);
    },
  );
});
