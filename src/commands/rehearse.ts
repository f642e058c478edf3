import { basename } from 'node:path';
import type { Profile } from '../follow/settings.js';
import { chooseAxes } from '../night/axes.js';
import { NightEngine } from '../night/engine.js';
import {
  bandsOf,
  errorsOfField,
  errorsToDepth,
  type MeasurementErrors,
} from '../night/rehearsal/measurement-errors.js';
import { type Rehearsal, rehearse } from '../night/rehearsal/rehearse.js';
import { buildModel } from '../science/odds/index.js';
import { EXIT, UsageError } from './exit-codes.js';
import type { CommandIo } from './io.js';
import { profileFor } from './load-profile.js';
import { rehearsalText } from './output/rehearsal-text.js';
import { readFiles } from './read-files.js';

interface RehearseOptions {
  readonly depth: number;
  readonly stars: number;
  readonly seed: number;
  readonly format: 'table' | 'json';
}

/** Shows, before the night, which flags the field's depth allows: completeness and purity by magnitude. */
export async function rehearseCommand(
  name: string,
  files: readonly string[],
  options: RehearseOptions,
  io: CommandIo,
): Promise<number> {
  const profile = profileFor(name, io);
  const ofProfile = profile.bands.map(({ band }) => band);
  const measured = files.length === 0 ? undefined : await readField(profile, files, io);
  const axes = chooseAxes(measured?.inputs.bands ?? ofProfile, ofProfile);
  const errors: MeasurementErrors =
    measured === undefined
      ? errorsToDepth(options.depth)
      : errorsOfField(measured.inputs, axes.band, files.map(file => basename(file)).join(', '));
  const bands = bandsOf(errors, measured?.inputs.bands ?? [axes.colour.blue, axes.colour.red, axes.band]);
  if (!bands.includes(axes.band))
    throw new UsageError('no magnitudes in these files to take the errors from');
  const model = buildModel(profile.field, axes, bands);
  const result = run({ profile, model, bands, errors, starsPerKind: options.stars, seed: options.seed }, io);
  await io.out(
    options.format === 'json'
      ? `${JSON.stringify(result)}\n`
      : `${rehearsalText(result, profile).join('\n')}\n`,
  );
  return EXIT.ok;
}

async function readField(profile: Profile, files: readonly string[], io: CommandIo): Promise<NightEngine> {
  const engine = new NightEngine(profile);
  await engine.absorbAll(readFiles(files, io));
  return engine;
}

const BAR_WIDTH = 24;

/** Runs to the end, with a bar on a terminal that takes itself away. */
function run(plan: Parameters<typeof rehearse>[0], io: CommandIo): Rehearsal {
  const steps = rehearse(plan);
  for (;;) {
    const step = steps.next();
    if (step.done) return step.value;
    if (!io.isErrTerminal) continue;
    const { done, total, kind } = step.value;
    const filled = Math.round((BAR_WIDTH * done) / total);
    const bar = `[${'='.repeat(filled)}${' '.repeat(BAR_WIDTH - filled)}] ${done}/${total} ${kind}`;
    io.err(done === total ? '\r\x1b[K' : `\r\x1b[K${bar}`);
  }
}
