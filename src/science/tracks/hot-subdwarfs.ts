import { BAND_INDEX } from '../bands.js';
import type { Track, TrackPoint } from './track.js';

/**
 * Hot subdwarfs, from their place in the Gaia diagram (loci.csv: single sdB at M_G 4.0-5.0 and BP-RP -0.5 to
 * -0.3; sdO bluer, M_G 3-6; from memory, approximate; see Culpan et al. 2022, A&A 662, A40 for the
 * catalogue). Colours and temperatures are those of dwarfs of the same BP-RP, M_G runs straight from 4.9 at
 * -0.28 to 4.2 at -0.50 and stays there: a wide scatter goes with it.
 */
export function hotSubdwarfTrack(dwarfs: Track): Track {
  const points = dwarfs.points
    .filter(point => point.subtype >= HOTTEST_SUBTYPE && point.subtype <= COOLEST_SUBTYPE)
    .map(hotSubdwarfPoint);
  return { name: 'hot subdwarfs', starClass: 'sdOB', points, fillSigma_mag: dwarfs.fillSigma_mag };
}

const HOTTEST_SUBTYPE = 3;
const COOLEST_SUBTYPE = 12.5;

function hotSubdwarfPoint(point: TrackPoint): TrackPoint {
  const bpRp = point.absMag[BAND_INDEX.BP] - point.absMag[BAND_INDEX.RP];
  // Types earlier than O9 have no published Gaia colours: they are the sdO end.
  const x = Number.isNaN(bpRp) ? -0.5 : Math.max(-0.5, Math.min(-0.28, bpRp));
  const absG = 4.9 + ((x + 0.28) / -0.22) * (4.2 - 4.9);
  // Without a published G the hot-star value G-V = -0.07 of the giants' table stands in for the shift.
  const g = point.absMag[BAND_INDEX.G];
  const shift = absG - (Number.isNaN(g) ? point.absMag[BAND_INDEX.V] - 0.07 : g);
  return { ...point, absMag: point.absMag.map(value => value + shift) };
}
