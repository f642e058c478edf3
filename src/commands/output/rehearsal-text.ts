import type { Profile } from '../../follow/settings.js';
import type { Rehearsal } from '../../night/rehearsal/rehearse.js';
import type { RehearsedFlag } from '../../night/rehearsal/tally.js';

const LABEL_WIDTH = 8;
const CELL_WIDTH = 7;
const IMITATORS_NAMED = 3;
/** Imitators with less than this are not worth a word. */
const LEAST_SHARE = 0.005;

/** A rehearsal as a table of at most 80 columns: for each flag what it finds, how pure it is, and who imitates it. */
export function rehearsalText(rehearsal: Rehearsal, profile: Profile): readonly string[] {
  const { edges_mag, flags, bands, errors } = rehearsal;
  const bins = edges_mag.slice(0, -1).map((from, i) => `${from}-${edges_mag[i + 1]}`.padStart(CELL_WIDTH));
  return [
    `${profile.name}, ${profile.field.name}: ${bands.join(' ')}`,
    errors,
    'found: of the stars of the kind, the share that gets the flag',
    'pure:  of the stars with the flag, the share that deserves it, in the mix of the field',
    '',
    `${'mag'.padEnd(LABEL_WIDTH)}${'all'.padStart(CELL_WIDTH)}${bins.join('')}`,
    ...flags.flatMap(flag => flagLines(flag, profile)),
  ];
}

function flagLines(flag: RehearsedFlag, { flags }: Profile): readonly string[] {
  const row = (label: string, all: number | null, bins: readonly (number | null)[]) =>
    `  ${label.padEnd(LABEL_WIDTH - 2)}${[all, ...bins].map(cell).join('')}`;
  const lines = [
    '',
    `${flag.flag} (threshold ${flags[flag.flag]?.threshold}): ${flag.kind === '' ? 'nothing drawn here deserves it' : flag.kind}`,
  ];
  if (flag.kind !== '') {
    lines.push(
      row(
        'found',
        flag.completeness,
        flag.bins.map(bin => bin.completeness),
      ),
      row(
        'pure',
        flag.purity,
        flag.bins.map(bin => bin.purity),
      ),
    );
  }
  const imitators = flag.imitators
    .filter(({ share }) => share >= LEAST_SHARE)
    .slice(0, IMITATORS_NAMED)
    .map(({ kind, share }) => `${kind} ${Math.round(100 * share)} %`);
  if (imitators.length > 0) lines.push(`  false alarms: ${imitators.join(', ')}`);
  return lines;
}

function cell(value: number | null): string {
  return (value === null ? '-' : value.toFixed(2)).padStart(CELL_WIDTH);
}
