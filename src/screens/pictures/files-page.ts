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

interface FrameColumn {
  readonly title: string;
  readonly width: number;
  readonly text: (frame: FrameSummary) => string;
}

/** Most wanted first: on a narrow terminal the last ones are left out. */
const FRAME_COLUMNS: readonly FrameColumn[] = [
  { title: 'mid UT', width: 8, text: frame => clockText(frame.mid_ms) },
  { title: 'bands', width: 10, text: frame => frame.bands.join(' ') },
  { title: 'rows', width: 8, text: frame => String(frame.rows) },
  { title: 'FWHM "', width: 8, text: frame => fixed(frame.fwhm_arcsec, 1) },
  { title: 'zero point', width: 12, text: frame => fixed(frame.zeroPoint_mag, 2) },
  { title: 'airmass', width: 9, text: frame => fixed(frame.airmass, 2) },
  { title: 'sky mag/"2', width: 12, text: frame => fixed(frame.sky_magPerArcsec2, 2) },
];

function frameLines(frames: readonly FrameSummary[], width: number): Line[] {
  if (frames.length === 0) return [[title('Frames')], [dim('None yet.')]];
  const longest = Math.max(LEAST_NAME_WIDTH, ...frames.map(frame => frame.name.length + 2));
  const nameWidth = Math.min(longest, Math.floor(width / 3));
  const shown: FrameColumn[] = [];
  let free = width - nameWidth;
  for (const column of FRAME_COLUMNS) {
    free -= column.width;
    if (free < 0) break;
    shown.push(column);
  }
  const row = (name: string, text: (column: FrameColumn) => string) =>
    toWidth(toWidth(name, nameWidth - 1), nameWidth) +
    shown.map(column => toWidthRight(text(column), column.width)).join('');
  return [
    [title('Frames'), dim('  newest first')],
    [dim(row('frame', column => column.title))],
    ...frames.toReversed().map((frame): Line => [plain(row(frame.name, column => column.text(frame)))]),
  ];
}
