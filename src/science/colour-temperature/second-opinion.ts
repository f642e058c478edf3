import type { StarClass } from '../classes.js';
import { teffFromBpRp_K } from './casagrande-2021.js';
import { teffFromBV_K } from './flower-1996.js';
import { teffFromBpRpMucciarelli_K } from './mucciarelli-2021.js';

/** A temperature by a published relation of one intrinsic colour, beside that of the tracks. */
export interface ColourTemperature {
  readonly teff_K: number;
  readonly colour: string;
  readonly source: string;
}

/** Usual surface gravities (common practice); classes without a relation are left out. */
const LOG_G: Readonly<Partial<Record<StarClass, number>>> = { V: 4.4, IV: 3.8, III: 2.5, II: 1.8, sd: 4.6 };
/** Metallicity of the middle subdwarf sequence; all others are taken as solar. */
const SUBDWARF_FEH = -1.5;

/** What the colour relations make of a star of a class; relations outside their range are left out. */
export function colourTemperatures(
  starClass: StarClass,
  intrinsic: { readonly bv: number; readonly bpRp: number },
): readonly ColourTemperature[] {
  const isSupergiant = starClass === 'Ib' || starClass === 'Iab' || starClass === 'Ia';
  const logg = LOG_G[starClass];
  if (logg === undefined && !isSupergiant) return [];
  const metallicity_FeH = starClass === 'sd' ? SUBDWARF_FEH : 0;
  const found: ColourTemperature[] = [
    {
      teff_K: teffFromBV_K(intrinsic.bv, isSupergiant ? 'I' : 'V, IV, III'),
      colour: 'B-V',
      source: 'Flower 1996',
    },
  ];
  if (logg !== undefined) {
    const kind = logg > 3.2 ? 'dwarfs' : 'giants';
    found.push(
      {
        teff_K: teffFromBpRp_K(intrinsic.bpRp, logg, metallicity_FeH),
        colour: 'BP-RP',
        source: 'Casagrande et al. 2021',
      },
      {
        teff_K: teffFromBpRpMucciarelli_K(intrinsic.bpRp, metallicity_FeH, kind),
        colour: 'BP-RP',
        source: 'Mucciarelli et al. 2021',
      },
    );
  }
  return found.filter(({ teff_K }) => !Number.isNaN(teff_K));
}
