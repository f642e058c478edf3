import { dwarfTrack } from './dwarfs.js';
import { evolvedTracks } from './evolved.js';
import { makeBandFiller } from './fill-bands.js';
import { hotSubdwarfTrack } from './hot-subdwarfs.js';
import { subdwarfTrack } from './subdwarfs.js';
import type { Track } from './track.js';
import { whiteDwarfTracks } from './white-dwarfs.js';

/** Metallicities of the subdwarf sequences: old thick disc and inner halo to halo. */
const SUBDWARF_FEH = [-1.0, -1.5, -2.0];

/** Every published mean sequence the odds are built on. */
export function readTracks(): readonly Track[] {
  const fillMissing = makeBandFiller();
  const dwarfs = dwarfTrack(fillMissing);
  return [
    dwarfs,
    ...evolvedTracks(fillMissing),
    ...whiteDwarfTracks(),
    ...SUBDWARF_FEH.map(feh => subdwarfTrack(dwarfs, feh)),
    hotSubdwarfTrack(dwarfs),
  ];
}
