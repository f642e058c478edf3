import type { Track, TrackPoint } from './track.js';

/**
 * Metal-poor subdwarfs: the dwarf sequence from F2 to M6, made fainter at fixed colour by the metallicity
 * term of Ivezic et al. 2008, ApJ 684, 287, eq. A2, taken relative to solar (the term alone, not the
 * sequence, which is 0.3 mag too bright at the turn-off): +0.93 mag at [Fe/H] -1, +1.26 at -1.5, +1.50 at -2.
 * Published for -2.5 < [Fe/H] < 0.2. The M types are an extension of ours: sdM lie 1-2 mag below in red
 * colours, though in B-V they may not (Kapteyn's star), so that B-V alone does not find them.
 */
export function subdwarfTrack(dwarfs: Track, metallicity_FeH: number): Track {
  const offset_mag = subdwarfOffset_mag(metallicity_FeH);
  const points = dwarfs.points
    .filter(point => point.subtype >= FIRST_SUBTYPE && point.subtype <= LAST_SUBTYPE)
    .map(point => subdwarfPoint(point, offset_mag));
  return { name: 'subdwarfs', starClass: 'sd', points, fillSigma_mag: dwarfs.fillSigma_mag };
}

/** Metallicity of the middle subdwarf sequence: the inner halo's. */
export const SUBDWARF_FEH = -1.5;

const FIRST_SUBTYPE = 32;
const LAST_SUBTYPE = 66;

/** How much fainter than a solar-metallicity dwarf of the same colour; NaN outside the published range. */
export function subdwarfOffset_mag(metallicity_FeH: number): number {
  if (!(metallicity_FeH > -2.5 && metallicity_FeH < 0.2)) return Number.NaN;
  return -1.11 * metallicity_FeH - 0.18 * metallicity_FeH ** 2;
}

function subdwarfPoint(point: TrackPoint, offset_mag: number): TrackPoint {
  return { ...point, absMag: point.absMag.map(value => value + offset_mag) };
}
