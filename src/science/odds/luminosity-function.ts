/**
 * Local space densities. They enter the odds as priors, so a factor of two matters little; the factors of
 * thousands between classes matter much.
 */

/**
 * Stars per 20-pc sphere (33,510 cubic parsec) and V magnitude, M_V -1 to 17: Jahreiss & Wielen 1997 (in
 * Hipparcos - Venice '97, ESA SP-402, 675), from memory. Brighter: falling by 3-4 a magnitude, to meet the
 * roughly 1.5e-7 O stars per cubic parsec of the solar neighbourhood (common figure, from memory).
 * Fainter than 14: nearly flat down to the late M dwarfs (from memory).
 */
const COUNTS: readonly (readonly [number, number])[] = [
  [-6, 0.0004],
  [-5, 0.0015],
  [-4, 0.006],
  [-3, 0.025],
  [-2, 0.15],
  [-1, 1],
  [0, 4],
  [1, 14],
  [2, 24],
  [3, 43],
  [4, 78],
  [5, 108],
  [6, 121],
  [7, 102],
  [8, 132],
  [9, 159],
  [10, 245],
  [11, 341],
  [12, 512],
  [13, 597],
  [14, 427],
  [15, 427],
  [17, 300],
  [20, 100],
];

const SPHERE_PC3 = 33_510;

/** Dwarfs per cubic parsec and V magnitude at absolute magnitude M_V, log-linear between the entries. */
export function dwarfDensity_perPc3PerMag(absMagV: number): number {
  return interpolateLog(COUNTS, absMagV) / SPHERE_PC3;
}

/**
 * White dwarfs per cubic parsec and V magnitude: rising by 0.30 dex a magnitude, the slope of Harris et al.
 * 2006, AJ 131, 571 (from memory), scaled to 4.5e-3 per cubic parsec in all (Gentile Fusillo et al. 2021,
 * MNRAS 508, 3877, from memory) with most of them between M_V 12 and 15.5; steeply down beyond.
 */
export function whiteDwarfDensity_perPc3PerMag(absMagV: number): number {
  const decline = absMagV > 15.5 ? 10 ** (-1.0 * (absMagV - 15.5)) : 1;
  return 1.6e-3 * 10 ** (0.3 * (Math.min(absMagV, 15.5) - 14.5)) * decline;
}

/** Metal-poor subdwarfs as a share of the dwarfs of the same absolute magnitude: inner halo and the metal-weak
 * thick disc together, about 0.3 % locally (common figure, from memory). */
export const SUBDWARF_SHARE = 0.003;

/** Hot subdwarfs per cubic parsec: 6e-7 (Dawson et al. 2024, A&A 686, A25, 500-pc sample, from memory). */
export const HOT_SUBDWARF_PER_PC3 = 6e-7;

/** Brown dwarfs per cubic parsec and subtype: order of Kirkpatrick et al. 2021, ApJS 253, 7 (from memory). */
export const ULTRACOOL_PER_PC3_PER_SUBTYPE = 5e-4;

/**
 * Evolved stars per cubic parsec and spectral subtype, by letter ranges of the running subtype number. From
 * memory: chosen to return the numbers of the naked-eye catalogue within a factor of two (about 2,000 K
 * giants, 250 A giants, 150 Ib supergiants to V 6.5), the clump near G8-K2 carrying most giants.
 */
const EVOLVED: Readonly<Record<string, readonly (readonly [number, number])[]>> = {
  IV: [
    [9, 1e-8],
    [15, 3e-7],
    [20, 2e-6],
    [25, 8e-6],
    [30, 2.5e-5],
    [36, 4e-5],
    [45, 4e-5],
    [50, 5e-5],
    [53, 2e-5],
  ],
  III: [
    [8, 1e-9],
    [12, 4e-8],
    [17, 3e-7],
    [22, 1e-6],
    [30, 2e-6],
    [38, 1.5e-6],
    [44, 6e-6],
    [47, 4e-5],
    [50, 9e-5],
    [52, 6e-5],
    [55, 2e-5],
    [60, 7e-6],
    [64, 2e-6],
    [68, 2e-7],
  ],
  II: [
    [9, 4e-9],
    [15, 1e-8],
    [25, 8e-9],
    [35, 1e-8],
    [45, 6e-8],
    [53, 6e-8],
    [60, 3e-8],
    [65, 2e-8],
  ],
  Ib: [
    [9, 3e-9],
    [15, 3e-9],
    [30, 3e-9],
    [45, 6e-9],
    [53, 6e-9],
    [65, 3e-9],
  ],
  Iab: [
    [9, 1.5e-9],
    [30, 1e-9],
    [50, 1.5e-9],
    [65, 1.5e-9],
  ],
  Ia: [
    [9, 7e-10],
    [30, 4e-10],
    [50, 3e-10],
    [65, 5e-10],
  ],
};

/** Evolved stars of a luminosity class per cubic parsec and subtype. */
export function evolvedDensity_perPc3PerSubtype(starClass: string, subtype: number): number {
  const table = EVOLVED[starClass];
  if (table === undefined) throw new Error(`no density for class ${starClass}`);
  return interpolateLog(table, subtype);
}

/** Straight line in the logarithm of the values; held constant beyond the ends. */
function interpolateLog(table: readonly (readonly [number, number])[], x: number): number {
  const last = table[table.length - 1];
  if (x <= table[0][0]) return table[0][1];
  if (x >= last[0]) return last[1];
  const i = table.findIndex(([position]) => position > x);
  const [x0, y0] = table[i - 1];
  const [x1, y1] = table[i];
  return y0 * (y1 / y0) ** ((x - x0) / (x1 - x0));
}
