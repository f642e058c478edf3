import { dwarfTrack } from './dwarfs.js';
import { evolvedTracks } from './evolved.js';
import { makeBandFiller } from './fill-bands.js';
import { hotSubdwarfTrack } from './hot-subdwarfs.js';
import { SUBDWARF_FEH, subdwarfTrack } from './subdwarfs.js';
import type { Track } from './track.js';
import { whiteDwarfTracks } from './white-dwarfs.js';

/** Every published mean sequence the odds are built on. */
export function readTracks(): readonly Track[] {
  const fillMissing = makeBandFiller();
  const dwarfs = dwarfTrack(fillMissing);
  return [
    dwarfs,
    ...evolvedTracks(fillMissing),
    ...whiteDwarfTracks(),
    subdwarfTrack(dwarfs, SUBDWARF_FEH),
    hotSubdwarfTrack(dwarfs),
  ];
}
