import { CLASSES, type StarClass } from '../../src/science/classes.js';
import { parseTable, type Row } from '../../src/science/table.js';
import brightStarsText from '../published/data/bright_stars.csv';
import { BV_AXES, type Classified, classifyAll, OPEN_FIELD } from './star-inputs.js';

/** One step on this ladder is one luminosity class; the supergiant subclasses count as one. */
const LADDER: readonly (readonly StarClass[])[] = [['V', 'sd'], ['IV'], ['III'], ['II'], ['Ib', 'Iab', 'Ia']];

export function step(starClass: StarClass): number {
  return LADDER.findIndex(classes => classes.includes(starClass));
}

/** Published luminosity classes of a type such as 'G2Ib-IIa' or 'K3II-III', as steps. */
export function publishedSteps(type: string): number[] {
  const luminosity = type.replace(/^[A-Z][0-9.+-]*(If)?/, '');
  const steps = [
    /(^|[^IV])V/.test(luminosity) ? 0 : -1,
    /IV/.test(luminosity) ? 1 : -1,
    /III/.test(luminosity) ? 2 : -1,
    /(^|[^I])II($|[^I])/.test(luminosity) ? 3 : -1,
    /(^|[^I])I[abf]|If/.test(type) ? 4 : -1,
  ];
  return steps.filter(s => s >= 0);
}

const GROUPS = [
  'dwarf',
  'subgiant',
  'giant',
  'bright giant',
  'supergiant',
  'white dwarf',
  'hot subdwarf',
] as const;

export type LuminosityGroup = (typeof GROUPS)[number];

/** Group a published type belongs to; two for types such as 'B1III-IV'. Metal-poor subdwarfs count as dwarfs. */
function groupsOf(type: string): readonly LuminosityGroup[] {
  if (type.startsWith('D')) return ['white dwarf'];
  if (/^sd[OB]/.test(type)) return ['hot subdwarf'];
  if (type.includes('sd')) return ['dwarf'];
  return publishedSteps(type).map(s => GROUPS[s]);
}

/** Odds of the groups, best first. */
function groupOdds(star: Classified): readonly (readonly [LuminosityGroup | 'none', number])[] {
  const odds = new Map<LuminosityGroup | 'none', number>();
  for (const name of CLASSES) {
    const group =
      name === 'none' ? 'none' : name === 'WD' ? GROUPS[5] : name === 'sdOB' ? GROUPS[6] : GROUPS[step(name)];
    odds.set(group, (odds.get(group) ?? 0) + star.odds[name]);
  }
  return [...odds].sort((a, b) => b[1] - a[1]);
}

/** How the odds do on real bright stars. */
export interface BrightStarScore {
  readonly stars: number;
  readonly right: number;
  /** Mean of the odds stated for the best group: what `right / stars` ought to be. */
  readonly stated: number;
  readonly byGroup: ReadonlyMap<LuminosityGroup, { stars: number; right: number }>;
}

export function scoreBrightStars(): BrightStarScore {
  const rows: readonly Row[] = parseTable(brightStarsText).rows;
  const classified = classifyAll(
    rows.map(row => ({
      mags: { V: row.number('V'), B: row.number('V') + row.number('B_V') },
      sigma_mag: 0.01,
      parallax_mas: row.number('plx_mas'),
      parallaxSigma_mas: row.number('e_plx'),
    })),
    ['B', 'V'],
    BV_AXES,
    { ...OPEN_FIELD, extinctionSigma_AV: 0.05 },
  );
  const byGroup = new Map<LuminosityGroup, { stars: number; right: number }>();
  let right = 0;
  let stated = 0;
  classified.forEach((star, i) => {
    const wanted = groupsOf(rows[i].text('MK_type'));
    const [[best, odds]] = groupOdds(star);
    const isRight = wanted.some(group => group === best);
    const score = byGroup.get(wanted[0]) ?? { stars: 0, right: 0 };
    byGroup.set(wanted[0], { stars: score.stars + 1, right: score.right + (isRight ? 1 : 0) });
    right += isRight ? 1 : 0;
    stated += odds / rows.length;
  });
  return { stars: rows.length, right, stated, byGroup };
}
