import { formatProblem, type Problem } from '../catalogue/problems.js';
import { NightEngine } from '../night/engine.js';
import { FollowUpDesk } from '../night/follow-up.js';
import { EXIT, UsageError } from './exit-codes.js';
import type { CommandIo } from './io.js';
import { profileFor } from './load-profile.js';
import { explain } from './output/explanation.js';
import { FORMATS } from './output/formats.js';
import { RecordMaker } from './output/star-record.js';
import { readFiles } from './read-files.js';

interface ClassifyOptions {
  readonly profile?: string;
  readonly format: keyof typeof FORMATS;
  readonly flagged?: boolean;
  readonly explain?: string;
  readonly at?: number;
}

/** Lines go out in pieces of this many characters. */
const PIECE = 1 << 16;

/** Reads files as one night, and prints every star (or the flagged ones). */
export async function classifyCommand(
  files: readonly string[],
  options: ClassifyOptions,
  io: CommandIo,
): Promise<number> {
  const engine = new NightEngine(profileFor(options.profile, io));
  const refused: Problem[] = [];
  const outcomes = await engine.absorbAll(readFiles(files, io, refused));
  const problems = outcomes.flatMap(outcome => outcome.problems);
  for (const problem of problems) io.err(`${formatProblem(problem)}\n`);
  if (options.explain === undefined) await printStars(engine, options, io);
  else await io.out(`${explain(engine, starNamed(engine, options.explain)).join('\n')}\n`);
  return [...refused, ...problems].some(problem => problem.cost === 'file') ? EXIT.someUnreadable : EXIT.ok;
}

function starNamed(engine: NightEngine, id: string): number {
  const star = engine.catalogue.ids.indexOf(id);
  if (star < 0) throw new UsageError(`no star called '${id}' in these files`);
  return star;
}

async function printStars(engine: NightEngine, options: ClassifyOptions, io: CommandIo): Promise<void> {
  const { head, line } = FORMATS[options.format];
  const maker = new RecordMaker(engine, new FollowUpDesk(engine), options.at ?? io.now_ms());
  let piece = head === '' ? '' : `${head}\n`;
  const readings = engine.catalogue.readings;
  for (let star = 0; star < engine.catalogue.count; star++) {
    const flagged = (engine.flags.of(star)?.flags.length ?? 0) > 0;
    // A star of an astrometry table that was never seen has nothing to classify.
    if (readings[star] === 0 || (options.flagged === true && !flagged)) continue;
    piece += `${line(maker.of(star))}\n`;
    if (piece.length > PIECE) {
      await io.out(piece);
      piece = '';
    }
  }
  if (piece !== '') await io.out(piece);
}
