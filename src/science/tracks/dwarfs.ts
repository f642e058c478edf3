import dwarfsText from '../../tables/dwarfs.csv';
import { BAND_COUNT } from '../bands.js';
import { subtypeNumber } from '../spectral-subtype.js';
import { parseTable, type Row } from '../table.js';
import {
  type FillMissing,
  fillBand,
  fillFromColours,
  fillFromGr,
  magnitude,
  type Track,
  type TrackPoint,
  unknownMagnitudes,
} from './track.js';

/**
 * Class V from O3 to T9.5: Pecaut & Mamajek 2013, ApJS 208, 9, Table 5, in the authors' extended version of
 * 2024.05.15 (src/tables/dwarfs.csv). Brown dwarfs later than L4 carry no V: only the bands that exist.
 */
export function dwarfTrack(fillMissing: FillMissing): Track {
  const fillSigma_mag = new Float64Array(BAND_COUNT);
  const points = parseTable(dwarfsText).rows.map(row =>
    dwarfPoint(row, absMag => fillMissing(absMag, fillSigma_mag)),
  );
  return { name: 'dwarfs', starClass: 'V', points, fillSigma_mag };
}

function dwarfPoint(row: Row, fillMissing: (absMag: Float64Array) => void): TrackPoint {
  const absMag = unknownMagnitudes();
  const v = row.number('M_V');
  fillFromColours(absMag, v, {
    B_V: row.number('B_V'),
    U_B: row.number('U_B'),
    V_Rc: row.number('V_Rc'),
    V_Ic: row.number('V_Ic'),
  });
  const ks = row.number('M_Ks');
  fillBand(absMag, 'Ks', Number.isNaN(v - row.number('V_Ks')) ? ks : v - row.number('V_Ks'));
  fillBand(absMag, 'H', magnitude(absMag, 'Ks') + row.number('H_Ks'));
  fillBand(absMag, 'J', magnitude(absMag, 'H') + row.number('J_H'));
  fillBand(absMag, 'J', row.number('M_J'));
  // M_V + G-V and M_G differ by up to 0.3 mag at the latest types; the sum keeps every colour consistent.
  fillBand(absMag, 'G', v + row.number('G_V'));
  fillBand(absMag, 'G', row.number('M_G'));
  fillBand(absMag, 'RP', magnitude(absMag, 'G') - row.number('G_RP'));
  fillBand(absMag, 'BP', magnitude(absMag, 'RP') + row.number('BP_RP'));
  fillFromGr(absMag, v, row.number('g_r'));
  fillBand(absMag, 'i', magnitude(absMag, 'r') - row.number('r_i'));
  fillBand(absMag, 'z', magnitude(absMag, 'i') - row.number('i_z'));
  fillMissing(absMag);
  return {
    subtype: subtypeNumber(row.text('SpT')),
    teff_K: row.number('Teff'),
    bolometricCorrection_V: row.number('BC_V'),
    absMag,
  };
}
