import { existsSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { Command, CommanderError, InvalidArgumentError, Option } from 'commander';
import manifest from '../../package.json' with { type: 'json' };
import { EXIT, UsageError } from './exit-codes.js';
import { type CommandIo, standardIo } from './io.js';

/** Runs one command line; the commands themselves are loaded only when called. */
export async function runCommand(
  argv: readonly string[],
  io: CommandIo = standardIo(profilesFolder()),
): Promise<number> {
  let code: number = EXIT.ok;
  const finish = (result: number) => {
    code = result;
  };
  try {
    await commandTable(io, finish).parseAsync([...argv], { from: 'user' });
  } catch (error) {
    if (error instanceof CommanderError) return error.exitCode === 0 ? EXIT.ok : EXIT.usage;
    if (error instanceof UsageError) {
      io.err(`nightsieve: ${error.message}\n`);
      return EXIT.usage;
    }
    if (isOfTheSystem(error)) {
      io.err(`nightsieve: the system refused: ${error.message}\n`);
      return EXIT.failed;
    }
    io.err(
      `nightsieve: this is a fault of the program: ${error instanceof Error ? error.stack : String(error)}\n`,
    );
    return EXIT.failed;
  }
  return code;
}

/** A full disk, a missing permission: told by the system's own words, which name the file. No fault of the program. */
function isOfTheSystem(error: unknown): error is NodeJS.ErrnoException {
  return error instanceof Error && 'syscall' in error;
}

/** The command line: one place for parsing, help and usage errors. */
function commandTable(io: CommandIo, finish: (code: number) => void): Command {
  const program = new Command('nightsieve')
    .description(manifest.description)
    .version(manifest.version)
    .exitOverride()
    .configureOutput({ writeOut: text => void io.out(text), writeErr: io.err })
    .showHelpAfterError("('nightsieve --help' lists the commands)");
  const profile = () => new Option('-p, --profile <name-or-file>', 'a ready profile by name, or a TOML file');

  program
    .command('watch')
    .description('watch a folder of photometry and show the night live')
    .argument('<folder>', 'where the pipeline drops its tables')
    .addOption(profile())
    .option('--poll', 'look every two seconds instead of waiting for notices (network file systems)')
    .addOption(paletteOption())
    .addOption(glyphsOption())
    .option('--plain', 'plain lines instead of the screen, also on a terminal')
    .action(async (folder: string, options) => {
      const { watchCommand } = await import('./watch.js');
      finish(await watchCommand(folder, options, io));
    });

  program
    .command('replay')
    .description('play a recorded night into a temporary folder and watch it')
    .argument('<folder>', 'holds timetable.json and the files it names')
    .addOption(profile())
    .option(
      '--speed <factor>',
      'how much faster than the world (default: a night in about 90 seconds)',
      positiveNumber,
    )
    .addOption(paletteOption())
    .addOption(glyphsOption())
    .option('--plain', 'plain lines instead of the screen, also on a terminal')
    .action(async (folder: string, options) => {
      const { replayCommand } = await import('./replay.js');
      finish(await replayCommand(folder, options, io));
    });

  program
    .command('classify')
    .description('classify the stars of one or more files and print them')
    .argument('<files...>', 'photometry tables; several are merged into one night')
    .addOption(profile())
    .addOption(
      new Option('-f, --format <format>', 'how to print').choices(['table', 'jsonl', 'csv']).default('table'),
    )
    .option('--flagged', 'only the flagged stars')
    .option('--explain <id>', 'the evidence behind the class of one star')
    .option('--at <time>', 'UTC time for windows and airmass, e.g. 2026-11-08T22:00Z (default: now)', utcTime)
    .action(async (files: string[], options) => {
      const { classifyCommand } = await import('./classify.js');
      finish(await classifyCommand(files, options, io));
    });

  program
    .command('profile')
    .description('check a profile and print what follows from it')
    .argument('<name-or-file>', 'a ready profile by name, or a TOML file')
    .option('--at <time>', 'UTC time whose night is shown (default: now)', utcTime)
    .action(async (name: string, options) => {
      const { profileCommand } = await import('./profile.js');
      finish(await profileCommand(name, options, io));
    });

  program
    .command('rehearse')
    .description(
      'draw made-up stars as the field would show them and print how well each flag finds its kind',
    )
    .argument('<name-or-file>', 'a ready profile by name, or a TOML file')
    .argument('[files...]', 'tables of the field, whose errors are taken; without any, --depth sets them')
    .option(
      '--depth <mag>',
      'magnitude at which the survey reaches a signal-to-noise ratio of 10',
      positiveNumber,
      18,
    )
    .option('--stars <number>', 'stars drawn of each kind', wholeNumber, 1000)
    .option('--seed <number>', 'another draw', wholeNumber, 1)
    .addOption(
      new Option('-f, --format <format>', 'how to print').choices(['table', 'json']).default('table'),
    )
    .action(async (name: string, files: string[], options) => {
      const { rehearseCommand } = await import('./rehearse.js');
      finish(await rehearseCommand(name, files, options, io));
    });

  return program;
}

function paletteOption(): Option {
  return new Option('--palette <name>', 'colours of the screen').choices(['dark', 'light', 'red', 'mono']);
}

function glyphsOption(): Option {
  return new Option('--glyphs <set>', 'signs the diagram is drawn with').choices([
    'braille',
    'block',
    'ascii',
  ]);
}

function positiveNumber(text: string): number {
  const value = Number(text);
  if (!(value > 0 && Number.isFinite(value))) throw new InvalidArgumentError('a number above 0 is needed');
  return value;
}

const MOST = 1_000_000;

function wholeNumber(text: string): number {
  const value = Number(text);
  if (!Number.isInteger(value) || value < 1 || value > MOST) {
    throw new InvalidArgumentError(`a whole number from 1 to ${MOST} is needed`);
  }
  return value;
}

/** Dates and times as ISO 8601 writes them; without an offset they are UTC. */
function utcTime(text: string): number {
  const parts = /^(\d{4}-\d\d-\d\d)(?:[T ](\d\d:\d\d(?::\d\d(?:\.\d+)?)?)(Z|[+-]\d\d:\d\d)?)?$/.exec(text);
  const [, date, time = '00:00', offset = 'Z'] = parts ?? [];
  const time_ms = Date.parse(`${date}T${time}${offset}`);
  if (Number.isNaN(time_ms)) throw new InvalidArgumentError('a time such as 2026-11-08T22:00Z is needed');
  return time_ms;
}

/** profiles/ beside the program: next to dist/ in an installation, next to src/ when run from sources. */
function profilesFolder(): string {
  let folder = dirname(fileURLToPath(import.meta.url));
  while (!existsSync(join(folder, 'profiles')) && dirname(folder) !== folder) folder = dirname(folder);
  return join(folder, 'profiles');
}
