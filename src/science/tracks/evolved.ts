import brightGiantsText from '../../tables/bright_giants.csv';
import giantsText from '../../tables/giants.csv';
import subgiantsText from '../../tables/subgiants.csv';
import supergiantsText from '../../tables/supergiants.csv';
import { BAND_COUNT, BAND_INDEX } from '../bands.js';
import type { StarClass } from '../classes.js';
import { subtypeNumber } from '../spectral-subtype.js';
import { parseTable, type Row, type Table } from '../table.js';
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
 * Subgiants, giants, bright giants and supergiants: adopted M_V, B-V and Teff of src/tables, whose headers
 * name the sources (Schmidt-Kaler 1982, Cox 2000, Pickles 1998, de Jager & Nieuwenhuijzen 1987, ...).
 * Johnson V-R and R-I in those tables are not Cousins colours and are left alone.
 */
export function evolvedTracks(fillMissing: FillMissing): readonly Track[] {
  const supergiants = parseTable(supergiantsText);
  const tracks: Track[] = [
    evolvedTrack('subgiants', 'IV', parseTable(subgiantsText), fillMissing),
    evolvedTrack('giants', 'III', parseTable(giantsText), fillMissing),
    evolvedTrack('bright giants', 'II', parseTable(brightGiantsText), fillMissing),
  ];
  for (const lumclass of ['Ib', 'Iab', 'Ia'] as const) {
    const rows = supergiants.rows.filter(row => row.text('lumclass') === lumclass);
    tracks.push(evolvedTrack(`supergiants ${lumclass}`, lumclass, { ...supergiants, rows }, fillMissing));
  }
  return tracks;
}

function evolvedTrack(name: string, starClass: StarClass, table: Table, fillMissing: FillMissing): Track {
  const optional = (row: Row, column: string) =>
    table.columns.includes(column) ? row.number(column) : Number.NaN;
  const fillSigma_mag = new Float64Array(BAND_COUNT);
  const point = (row: Row): TrackPoint => {
    const absMag = unknownMagnitudes();
    const v = row.number('M_V');
    fillFromColours(absMag, v, {
      B_V: row.number('B_V'),
      U_B: firstKnown(optional(row, 'U_B_Pickles'), optional(row, 'U_B_Allen')),
      V_Rc: optional(row, 'V_Rc'),
      V_Ic: optional(row, 'V_Ic'),
    });
    fillBand(absMag, 'Ks', v - optional(row, 'V_Ks_Mamajek'));
    fillBand(absMag, 'Ks', v - optional(row, 'V_K_bb') - BESSELL_BRETT_TO_2MASS_MAG);
    fillBand(absMag, 'H', magnitude(absMag, 'Ks') + optional(row, 'H_Ks'));
    fillBand(absMag, 'J', magnitude(absMag, 'H') + optional(row, 'J_H'));
    fillBand(absMag, 'G', v + optional(row, 'G_V'));
    fillFromGr(absMag, v, optional(row, 'g_r'));
    fillMissing(absMag, fillSigma_mag);
    // BP and RP of the general relation, moved so that their difference is the table's own BP-RP.
    shiftPair(absMag, optional(row, 'BP_RP'));
    return {
      subtype: subtypeNumber(row.text('SpT')),
      teff_K: row.number('Teff'),
      bolometricCorrection_V: firstKnown(
        optional(row, 'BC_V_Allen'),
        optional(row, 'BC_V_Lev'),
        optional(row, 'BC_V_Pickles'),
      ),
      absMag,
    };
  };
  return { name, starClass, points: table.rows.map(point), fillSigma_mag };
}

/** K of Bessell & Brett 1988 minus Ks of 2MASS (Carpenter 2001, AJ 121, 2851; from memory, to 0.01 mag). */
const BESSELL_BRETT_TO_2MASS_MAG = 0.04;

function shiftPair(absMag: Float64Array, bpRp: number): void {
  const bp = magnitude(absMag, 'BP');
  const rp = magnitude(absMag, 'RP');
  const excess = bpRp - (bp - rp);
  if (Number.isNaN(excess)) return;
  setBand(absMag, 'BP', bp + excess / 2);
  setBand(absMag, 'RP', rp - excess / 2);
}

function setBand(absMag: Float64Array, band: 'BP' | 'RP', value: number): void {
  absMag[BAND_INDEX[band]] = value;
}

function firstKnown(...values: number[]): number {
  return values.find(value => !Number.isNaN(value)) ?? Number.NaN;
}
