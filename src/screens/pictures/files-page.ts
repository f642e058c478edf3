import type { Problem } from '../../catalogue/problems.js';
import type { FrameSummary, NightView } from '../../night/view.js';
import type { Grid } from '../terminal/grid.js';
import { dim, type Line, pageOf, plain, title } from './parts.js';
import { count } from './status-line.js';
import { clockText, fixed, toWidth, toWidthRight, wrapped } from './text.js';

const COSTS: Readonly<Record<Problem['cost'], string>> = {
  row: 'that row is lost',
  file: 'the whole file is lost',
  nothing: 'nothing is lost',
};
const INDENT = 4;
const LEAST_NAME_WIDTH = 16;
const NUMBERS_WIDTH = 52;

/** What was wrong with files and what it cost, newest last; then the frames, newest first. */
export function filesPage(view: NightView, width: number, height: number): Grid {
  return pageOf([...problemLines(view, width), ...frameLines(view.frames, width)], width, height);
}

function problemLines({ problems, duplicates }: NightView, width: number): Line[] {
  const twice: Line[] =
    duplicates === 0 ? [] : [[dim(`${count(duplicates, 'file')} came twice and counted once.`)]];
  if (problems.length === 0)
    return [[title('Problems')], [plain('None: every file was read whole.')], ...twice, []];
  return [
    [title('Problems'), dim(`  ${costSummary(problems)}`)],
    ...problems.flatMap((problem): Line[] => [
      [
        { text: problem.line > 0 ? `${problem.file}:${problem.line}` : problem.file, style: { bold: true } },
        { text: `  ${problem.code}`, style: { colour: 'warning' } },
        dim(`  ${COSTS[problem.cost]}`),
      ],
      ...wrapped(problem.text, width - INDENT).map((text): Line => [plain(' '.repeat(INDENT) + text)]),
    ]),
    ...twice,
    [],
  ];
}

/** What the problems cost in all: "lost: 1 file, 2 rows". */
export function costSummary(problems: readonly Problem[]): string {
  const rows = problems.filter(problem => problem.cost === 'row').length;
  const files = problems.filter(problem => problem.cost === 'file').length;
  const lost = [files > 0 ? count(files, 'file') : '', rows > 0 ? count(rows, 'row') : ''].filter(
    text => text !== '',
  );
  return lost.length === 0 ? 'nothing lost' : `lost: ${lost.join(', ')}`;
}

function frameLines(frames: readonly FrameSummary[], width: number): Line[] {
  const longest = Math.max(LEAST_NAME_WIDTH, ...frames.map(frame => frame.name.length + 2));
  const nameWidth = Math.min(longest, width - NUMBERS_WIDTH);
  const head = `${'frame'.padEnd(nameWidth)}${'mid UT'.padEnd(8)}${'bands'.padEnd(10)}${'rows'.padStart(7)}${'FWHM'.padStart(7)}${'airmass'.padStart(9)}${'zero pt'.padStart(9)}`;
  if (frames.length === 0) return [[title('Frames')], [dim('None yet.')]];
  return [
    [title('Frames'), dim('  newest first')],
    [dim(head)],
    ...frames.toReversed().map(frame => [plain(frameText(frame, nameWidth))]),
  ];
}

function frameText(frame: FrameSummary, nameWidth: number): string {
  const fwhm = Number.isNaN(frame.fwhm_arcsec) ? '-' : `${frame.fwhm_arcsec.toFixed(1)}"`;
  return [
    toWidth(toWidth(frame.name, nameWidth - 1), nameWidth),
    clockText(frame.mid_ms).padEnd(8),
    toWidth(frame.bands.join(' '), 10),
    toWidthRight(String(frame.rows), 7),
    toWidthRight(fwhm, 7),
    toWidthRight(fixed(frame.airmass, 2), 9),
    toWidthRight(fixed(frame.zeroPoint_mag, 2), 9),
  ].join('');
}
