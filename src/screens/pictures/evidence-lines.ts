import type { StarDetail } from '../../night/view.js';
import { type ClassEvidence, oddsText, temperatureTypeText } from '../../science/odds/index.js';
import { dim, type Line, plain } from './parts.js';
import { toWidth } from './text.js';

const MOST_CLASSES = 4;
const CLASS_WIDTH = 5;
const TYPE_WIDTH = 6;
const DISTANCE_WIDTH = 8;
const EXTINCTION_WIDTH = 6;
const ODDS_WIDTH = 5;

/** Why these odds: what each class would have the star be, and how far off each band then is, in sigma. */
export function evidenceLines(evidence: StarDetail['evidence'], width: number): readonly Line[] {
  if (evidence.length === 0) return [];
  const head = `${'as'.padEnd(CLASS_WIDTH)}${'type'.padEnd(TYPE_WIDTH)}${'pc'.padEnd(DISTANCE_WIDTH)}${'A_V'.padEnd(EXTINCTION_WIDTH)}${'odds'.padEnd(ODDS_WIDTH)}misfit, sigma`;
  return [
    [dim(toWidth(head, width))],
    ...evidence.slice(0, MOST_CLASSES).map((entry): Line => [plain(toWidth(evidenceText(entry), width))]),
  ];
}

function evidenceText(evidence: ClassEvidence): string {
  const { starClass, odds, subtype, teff_K, modulus_mag, extinction_AV, misfits } = evidence;
  const distance_pc = 10 ** (modulus_mag / 5 + 1);
  const worst = [...misfits].sort((a, b) => Math.abs(b.sigma) - Math.abs(a.sigma));
  return [
    starClass.padEnd(CLASS_WIDTH),
    temperatureTypeText(starClass, subtype, teff_K).padEnd(TYPE_WIDTH),
    String(Number(distance_pc.toPrecision(3))).padEnd(DISTANCE_WIDTH),
    extinction_AV.toFixed(2).padEnd(EXTINCTION_WIDTH),
    oddsText(odds).padEnd(ODDS_WIDTH),
    worst.map(({ band, sigma }) => `${band}${sigma < 0 ? '-' : '+'}${Math.abs(sigma).toFixed(1)}`).join(' '),
  ].join('');
}
