/**
 * Local space densities. They enter the odds as priors, so a factor of two matters little; the factors of
 * thousands between classes matter much.
 */

/**
 * Dwarfs per 20-pc sphere (33,510 cubic parsec) and V magnitude. M_V 4 to 17: Jahreiss & Wielen 1997 (in
 * Hipparcos - Venice '97, ESA SP-402, 675), from memory. Brighter, where 20 pc hold too few: the general luminosity
 * function of handbooks (Allen's Astrophysical Quantities, from memory) less the evolved stars. Both ends are chosen so
 * that the numbers of the naked-eye catalogue come out, see EVOLVED. Fainter than 14: nearly flat down to the late M
 * dwarfs (from memory).
 */
const COUNTS: readonly (readonly [number, number])[] = [
  [-6, 0.00016],
  [-5, 0.0006],
  [-4, 0.0022],
  [-3, 0.008],
  [-2, 0.03],
  [-1, 0.18],
  [0, 1.1],
  [1, 6],
  [2, 13],
  [3, 29],
  [4, 70],
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
 * Evolved stars per cubic parsec and spectral subtype, by the running subtype number. Chosen so that a disc of the
 * usual thickness (scale heights 60 pc for O, B and supergiants to 250 pc for K giants), with 0.4-0.8 mag of extinction a
 * kiloparsec, shows the numbers of the naked-eye catalogue (V < 6.5) by letter and class, from memory and rounded:
 * tests/published/naked-eye-counts.test.ts holds them.
 */
const EVOLVED: Readonly<Record<string, readonly (readonly [number, number])[]>> = {
  IV: [
    [9, 2.5e-8],
    [15, 7e-7],
    [20, 2.2e-6],
    [25, 7e-6],
    [30, 1.6e-5],
    [36, 2.2e-5],
    [45, 1.8e-5],
    [50, 5e-5],
    [53, 3e-5],
  ],
  III: [
    [8, 3e-9],
    [12, 1.1e-7],
    [17, 8e-7],
    [22, 1.3e-6],
    [30, 2.8e-6],
    [38, 2e-6],
    [44, 3e-6],
    [47, 1e-5],
    [50, 2.1e-5],
    [52, 1.4e-5],
    [55, 5e-6],
    [60, 2.5e-6],
    [64, 9e-7],
    [68, 1e-7],
  ],
  II: [
    [9, 1e-8],
    [15, 2.6e-8],
    [25, 2.2e-8],
    [35, 4.5e-8],
    [45, 8.5e-8],
    [53, 1.2e-7],
    [60, 6e-8],
    [65, 4e-8],
  ],
  Ib: [
    [9, 7e-9],
    [15, 7e-9],
    [30, 9e-9],
    [45, 1.6e-8],
    [53, 1.4e-8],
    [65, 8e-9],
  ],
  Iab: [
    [9, 3.5e-9],
    [30, 1.6e-9],
    [50, 1.7e-9],
    [65, 2.5e-9],
  ],
  Ia: [
    [9, 1.7e-9],
    [30, 6.5e-10],
    [50, 4e-10],
    [65, 9e-10],
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
