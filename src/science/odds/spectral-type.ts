import { CLASS_COUNT, CLASSES, type StarClass } from '../classes.js';
import { subtypeText } from '../spectral-subtype.js';

/** Two classes are named together when the second has at least these odds. */
const SECOND_NAMED = 0.2;

/** Index of the most probable class, of `odds[from] ... odds[from + CLASS_COUNT - 1]`. */
export function bestClassIndex(odds: ArrayLike<number>, from = 0): number {
  let best = 0;
  for (let c = 1; c < CLASS_COUNT; c++) if (odds[from + c] > odds[from + best]) best = c;
  return best;
}

/**
 * Temperature type of a star of a class: 'K2', 'sdK2', 'sdB', 'DA4' (white dwarfs by 50,400 K / Teff, Sion et
 * al. 1983, ApJ 269, 253; whether hydrogen or helium is not for broad-band photometry to say, so plain 'D4').
 * Empty when not known.
 */
export function temperatureTypeText(starClass: StarClass, subtype: number, teff_K: number): string {
  switch (starClass) {
    case 'WD':
      return Number.isNaN(teff_K) ? 'D' : `D${Math.max(1, Math.round(50_400 / teff_K))}`;
    case 'sdOB':
      return teff_K > HOTTEST_SDB_K ? 'sdO' : 'sdB';
    case 'sd':
      return `sd${subtypeText(subtype)}`;
    case 'none':
      return '';
    default:
      return subtypeText(subtype);
  }
}

/** sdB up to about 38,000 K, sdO above (Heber 2016, PASP 128, 082001; from memory). */
const HOTTEST_SDB_K = 38_000;

/**
 * The type with its odds, never with more certainty than they have: 'K2 III 0.93', 'G8 IV/III 0.55/0.41',
 * 'D3 WD 0.99', 'fits no class 0.87'.
 */
export function spectralTypeText(
  odds: ArrayLike<number>,
  from: number,
  subtype: number,
  teff_K: number,
): string {
  const best = bestClassIndex(odds, from);
  if (Number.isNaN(odds[from + best])) return 'not known';
  const starClass = CLASSES[best];
  const bestOdds = odds[from + best];
  if (starClass === 'none') return `fits no class ${oddsText(bestOdds)}`;
  let second = -1;
  for (let c = 0; c < CLASS_COUNT; c++) {
    if (c !== best && odds[from + c] >= SECOND_NAMED && (second < 0 || odds[from + c] > odds[from + second]))
      second = c;
  }
  const type = temperatureTypeText(starClass, subtype, teff_K);
  if (second < 0) return `${type} ${starClass} ${oddsText(bestOdds)}`.trim();
  return `${type} ${starClass}/${CLASSES[second]} ${oddsText(bestOdds)}/${oddsText(odds[from + second])}`.trim();
}

/** Two decimals, but never rounded up to certainty. */
export function oddsText(odds: number): string {
  return odds >= 0.995 && odds < 0.9995 ? '0.99' : odds.toFixed(2);
}
