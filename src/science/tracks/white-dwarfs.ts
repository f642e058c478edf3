import whiteDwarfsText from '../../tables/white_dwarfs.csv';
import { BAND_COUNT, type Band } from '../bands.js';
import { parseTable, type Row } from '../table.js';
import { fillBand, fillFromColours, type Track, type TrackPoint, unknownMagnitudes } from './track.js';

/**
 * White-dwarf cooling sequences at log g 8.0: Montreal models of 2021 (Holberg & Bergeron 2006, AJ 132, 1221;
 * Bergeron et al. 2011, ApJ 737, 28; Bedard et al. 2020, ApJ 901, 93). DA from 2500 K, DB from 4000 K.
 * Cooler DA rows turn back to the blue; they are kept, faint as they are.
 */
export function whiteDwarfTracks(): readonly Track[] {
  const rows = parseTable(whiteDwarfsText).rows;
  return (['DA', 'DB'] as const).map(type => ({
    name: `white dwarfs ${type}`,
    starClass: 'WD' as const,
    points: rows.filter(row => row.text('type') === type).map(whiteDwarfPoint),
    fillSigma_mag: new Float64Array(BAND_COUNT),
  }));
}

const DIRECT: readonly (readonly [Band, string])[] = [
  ['G', 'M_G'],
  ['u', 'M_u'],
  ['g', 'M_g'],
  ['r', 'M_r'],
  ['i', 'M_i'],
  ['z', 'M_z'],
  ['gP1', 'M_gP1'],
  ['rP1', 'M_rP1'],
  ['iP1', 'M_iP1'],
  ['zP1', 'M_zP1'],
  ['yP1', 'M_yP1'],
];

function whiteDwarfPoint(row: Row): TrackPoint {
  const absMag = unknownMagnitudes();
  const v = row.number('M_V');
  fillFromColours(absMag, v, {
    B_V: row.number('B_V'),
    U_B: row.number('U_B'),
    V_Rc: row.number('V_Rc'),
    V_Ic: row.number('V_Ic'),
  });
  fillBand(absMag, 'Ks', v - row.number('V_Ks'));
  for (const [band, column] of DIRECT) fillBand(absMag, band, row.number(column));
  const rp = row.number('M_G') - row.number('G_RP');
  fillBand(absMag, 'RP', rp);
  fillBand(absMag, 'BP', rp + row.number('BP_RP'));
  return {
    subtype: Number.NaN,
    teff_K: row.number('Teff'),
    bolometricCorrection_V: row.number('BC_V'),
    absMag,
  };
}
