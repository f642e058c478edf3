import { spawnSync } from 'node:child_process';
import { mkdirSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { CLASSES } from '../../src/science/classes.js';
import { MAIN, ROOT, run } from '../support/built.js';

let folder: string;
const file = (name: string, content: string | Uint8Array) => {
  writeFileSync(join(folder, name), content);
  return join(folder, name);
};

const TABLE = `id,ra,dec,Vmag,e_Vmag,Bmag,e_Bmag,parallax,parallax_error
sun,30.0,45.0,9.8,0.01,10.45,0.01,10,0.1
dwarf,30.1,45.0,15.0,0.01,15.05,0.01,20,0.1
=cmd,30.2,45.0,9.3,0.01,10.35,0.01,2,0.05
`;

beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), 'nightsieve-cli-'));
});
afterAll(() => rmSync(folder, { recursive: true, force: true }));

const classify = (...args: string[]) =>
  run(['classify', ...args, '--profile', 'northern-80cm', '--at', '2026-11-08T22:00Z']);

describe('the command line', () => {
  it('--version and --help answer', async () => {
    const { version } = JSON.parse(readFileSync(resolve(ROOT, 'package.json'), 'utf8')) as {
      version: string;
    };
    expect(await run(['--version'])).toEqual({ code: 0, out: `${version}\n`, err: '' });
    const help = await run(['--help']);
    expect(help.code).toBe(0);
    for (const command of ['watch', 'replay', 'classify', 'profile', 'rehearse'])
      expect(help.out).toContain(command);
  });

  it.each([
    [['observe'], /unknown command 'observe'/],
    [['classify'], /missing required argument 'files'/],
    [['classify', 'x.csv', '--format', 'xml'], /Allowed choices are table, jsonl, csv/],
    [['classify', 'x.csv', '--at', 'soon'], /a time such as 2026-11-08T22:00Z/],
    [['classify', 'x.csv', '--at', 'monday 3'], /a time such as 2026-11-08T22:00Z/],
    [['classify', 'x.csv', '--at', '2026-13-08'], /a time such as 2026-11-08T22:00Z/],
    [['replay', 'demo-run', '--speed', '-3'], /a number above 0/],
    [['rehearse', 'demo', '--stars', '1.5'], /a whole number from 1 to 1000000/],
    [['rehearse', 'nowhere'], /no such profile/],
    [['rehearse', 'demo', 'x.csv'], /x\.csv: no such file/],
    [['replay', 'demo-run', '--speed', 'Infinity'], /a number above 0/],
    [
      ['classify', 'x.csv'],
      /a profile is needed: --profile NAME with one of demo, northern-80cm, southern-2m/,
    ],
    [['classify', 'x.csv', '--profile', 'nowhere'], /no such profile/],
    [['classify', 'x.csv', '--profile', 'demo'], /x\.csv: no such file/],
    [['watch', 'nowhere', '--profile', 'demo'], /nowhere: no such folder/],
    [['replay', 'src'], /timetable\.json: cannot be read/],
  ])('%j is a usage error with words', async (args, words) => {
    const { code, out, err } = await run(args);
    expect(code).toBe(2);
    expect(err).toMatch(words);
    expect(err).not.toMatch(/^ +at /m);
    expect(out).toBe('');
  });

  it('a profile with mistakes is told line by line', async () => {
    const text = readFileSync(resolve(ROOT, 'profiles/demo.toml'), 'utf8').replace(
      'latitude_deg = 40.6',
      'latitude_deg = 406',
    );
    const { code, err } = await run(['profile', file('mine.toml', text)]);
    expect(code).toBe(2);
    expect(err).toMatch(/mine\.toml:\d+: site\.latitude_deg: saw 406, expected at most 90/);
  });

  it('profile prints what follows from it', async () => {
    const { code, out } = await run(['profile', 'southern-2m', '--at', '2026-11-08T03:00Z']);
    expect(code).toBe(0);
    expect(out).toMatch(/the profile is in order/);
    expect(out).toMatch(/^r +\d\d\.\d\d +\d+ +\d\d\.\d$/m);
    expect(out).toMatch(/sunset to sunrise +\d\d:\d\d to \d\d:\d\d UT/);
  });
});

describe('classify', () => {
  it('prints the jsonl contract, keys in order', async () => {
    const { code, out, err } = await classify(file('t.csv', TABLE), '--format', 'jsonl');
    expect([code, err]).toEqual([0, '']);
    const records = out
      .trim()
      .split('\n')
      .map(line => JSON.parse(line));
    expect(records).toHaveLength(3);
    expect(Object.keys(records[0])).toEqual([
      'id',
      'ra_deg',
      'dec_deg',
      'mags',
      'abs_mag',
      'colour',
      'spectral_type',
      'luminosity_class',
      'class',
      'odds',
      'teff_K',
      'teff_sigma_K',
      'distance_pc',
      'extinction_AV',
      'extinction_AV_sigma',
      'log_luminosity',
      'log_luminosity_sigma',
      'radius_Rsun',
      'radius_sigma_Rsun',
      'flags',
      'cautions',
      'exposures',
      'window',
    ]);
    expect(Object.keys(records[0].odds)).toEqual([...CLASSES]);
    const [sun, dwarf] = records;
    expect([sun.luminosity_class, sun.spectral_type[0], sun.flags]).toEqual(['V', 'G', []]);
    expect(sun.exposures).toEqual([]);
    expect(dwarf.flags[0]).toMatchObject({ code: 'white-dwarf' });
    expect(Object.keys(dwarf.exposures[0])).toEqual([
      'setup',
      'predicted_mag',
      'sigma_mag',
      'count',
      'each_s',
      'total_s',
      'snr',
      'limited_by',
    ]);
    expect(dwarf.window.start_by).toMatch(/^2026-11-09T0\d:\d\d:\d\dZ$/);
  });

  it('csv: one line a star, formulas disarmed; --flagged: only those', async () => {
    const path = file('t.csv', TABLE);
    const { out } = await classify(path, '--format', 'csv');
    expect(out.split('\n')[3]).toMatch(/^'=cmd,/);
    const flagged = await classify(path, '--flagged');
    expect(flagged.out.trim().split('\n')).toHaveLength(2);
    expect(flagged.out).toMatch(/^dwarf .*white-dwarf: M_V/m);
  });

  it.each([
    ['garbage', Buffer.from('\u0007\u0001\u0000 zork'), /^bad: not-a-table/],
    ['empty', '', /^bad: empty-file/],
    ['binary', Buffer.from([0x7f, 0x45, 0x4c, 0x46, 2, 1, 1, 0, 0, 0]), /^bad: not-a-table/],
  ])(
    'a %s file gives exactly one clear line and exit code 3, and the others are still done',
    async (_, content, words) => {
      const { code, out, err } = await classify(
        file('bad', content),
        file('good.csv', TABLE),
        '--format',
        'jsonl',
      );
      expect(code).toBe(3);
      expect(err.trim().split('\n')).toHaveLength(1);
      expect(err).toMatch(words);
      expect(out.trim().split('\n')).toHaveLength(3);
    },
  );

  it('--explain shows what each class makes of a star', async () => {
    const path = file('t.csv', TABLE);
    const { code, out } = await classify(path, '--explain', 'dwarf');
    expect(code).toBe(0);
    expect(out).toMatch(
      /^dwarf: D\d WD 0\.9\d\nmeasured +B 15\.050 ± 0\.010 +V 15\.000 ± 0\.010 +parallax 20\.000 ± 0\.100 mas$/m,
    );
    expect(out).toMatch(/^WD +0\.99 +D\d +1\d{4} +50\.0 +0\.\d\d +[+-]\d\.\d [+-]\d\.\d$/m);
    expect(out).toMatch(/^flag white-dwarf: M_V/m);
    const missing = await classify(path, '--explain', 'nobody');
    expect([missing.code, missing.err]).toEqual([2, "nightsieve: no star called 'nobody' in these files\n"]);
  });

  it('files of one name in two folders are two files', async () => {
    for (const name of ['one', 'two']) mkdirSync(join(folder, name));
    const [head, sun, dwarf] = TABLE.split('\n');
    const one = file('one/t.csv', `${head}\n${sun}\n`);
    const two = file('two/t.csv', `${head}\n${dwarf}\n`);
    const { out } = await classify(one, two, '--format', 'csv');
    expect(
      out
        .trim()
        .split('\n')
        .map(line => line.split(',')[0]),
    ).toEqual(['id', 'sun', 'dwarf']);
  });

  it.each(['2026-11-08T22:00Z', '2026-11-08T22:00', '2026-11-08 22:00:00', '2026-11-09T00:00+02:00'])(
    '--at %s is the same time',
    async at => {
      const path = file('t.csv', TABLE);
      const args = ['classify', path, '--profile', 'northern-80cm', '--format', 'jsonl', '--flagged', '--at'];
      expect((await run([...args, at])).out).toBe((await run([...args, '2026-11-08T22:00:00Z'])).out);
    },
  );

  it('a bad row costs itself', async () => {
    const { code, out, err } = await classify(file('row.csv', `${TABLE}half,a\n`), '--format', 'jsonl');
    expect(code).toBe(0);
    expect(err).toMatch(/^row\.csv:5: row-width/);
    expect(out.trim().split('\n')).toHaveLength(3);
  });
});

describe('what the program cannot help', () => {
  const shell = (command: string) =>
    spawnSync('bash', ['-c', command], {
      encoding: 'utf8',
      env: { ...process.env, NIGHT: `node ${MAIN}`, FOLDER: folder },
    });

  it.skipIf(process.platform !== 'linux')('a full disk is told without a stack', () => {
    file('t.csv', TABLE);
    const { status, stderr } = shell('$NIGHT classify $FOLDER/t.csv --profile demo > /dev/full');
    expect(status).toBe(1);
    expect(stderr).toMatch(/^nightsieve: the system refused: ENOSPC.*\n$/);
  });

  it('a reader that goes away ends it quietly', () => {
    const rows = Array.from({ length: 3000 }, (_, i) => `${i},${30 + i / 1000},45,15,0.01,15.6,0.01,2,0.1`);
    file('long.csv', `${TABLE.split('\n')[0]}\n${rows.join('\n')}\n`);
    const { stdout, stderr } = shell(
      '$NIGHT classify $FOLDER/long.csv --profile demo --format jsonl | head -1 | cut -c1-8; echo $PIPESTATUS',
    );
    expect([stdout, stderr]).toEqual(['{"id":"0\n0\n', '']);
  });

  it('with no one to read the problems the work is done all the same', () => {
    file('bad', 'zork');
    const { stdout } = shell(
      '$NIGHT classify $FOLDER/bad --profile demo 2>&1 >/dev/null | true; echo $PIPESTATUS',
    );
    expect(stdout).toBe('3\n');
  });
});

describe('rehearse', () => {
  it('prints what the flags would find, at most 80 columns wide', async () => {
    const { code, out, err } = await run(['rehearse', 'northern-80cm', '--stars', '40', '--depth', '17']);
    expect([code, err]).toEqual([0, '']);
    expect(out).toMatch(/S\/N 10 at 17\.0 mag in every band/);
    expect(out).toMatch(/white-dwarf \(threshold 0\.7\): white dwarf\n {2}found +\d\.\d\d/);
    for (const line of out.split('\n').slice(2)) expect(line.length).toBeLessThanOrEqual(90);
  });

  it('as json, with the errors of real tables', async () => {
    const table = file('field.csv', TABLE);
    const { code, out } = await run([
      'rehearse',
      'northern-80cm',
      table,
      '--stars',
      '40',
      '--format',
      'json',
    ]);
    expect(code).toBe(0);
    const result = JSON.parse(out) as { bands: string[]; errors: string; flags: { flag: string }[] };
    expect(result.bands).toEqual(['B', 'V']);
    expect(result.errors).toBe('errors of 3 stars of field.csv');
    expect(result.flags.map(({ flag }) => flag)).toContain('white-dwarf');
  });
});
