import { spawn } from 'node:child_process';
import { mkdirSync, mkdtempSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { ensureBuilt, MAIN, run } from '../support/built.js';
import { PtySession } from '../support/pty.js';

let folder: string;
/** Where the replay makes its own folder: empty again afterwards. */
let temporary: string;

const ASTROMETRY = `id,ra,dec,parallax,parallax_error
sun,36.0,33.0,10,0.1
hot,36.1,33.0,20,0.1
`;
const table = (filter: string, mags: readonly number[]) =>
  `# FILTER = ${filter}\n# DATE-OBS = 2026-11-08T20:00:00\n# EXPTIME = 60\nra,dec,mag,mag_error\n${mags
    .map((mag, i) => `${(36 + i / 10).toFixed(1)},33.0,${mag},0.010`)
    .join('\n')}\n`;
const at = (minute: number) => `2026-11-08T20:${String(minute).padStart(2, '0')}:00Z`;

const V = table('V', [9.8, 15.0]);
const NIGHT = {
  profile: 'northern-80cm',
  begins: at(0),
  ends: at(40),
  files: [
    { file: 'night/a.csv', arrives: at(1) },
    { file: 'night/b.csv', arrives: at(5) },
    {
      file: 'night/v.csv',
      arrives: at(10),
      pieces: [
        { bytes: 90, arrives: at(10) },
        { bytes: V.length, arrives: at(11) },
      ],
    },
    // The same frame reduced again.
    { file: 'again/v.csv', arrives: at(20) },
  ],
};

const timetable = (content: unknown) =>
  writeFileSync(
    join(folder, 'timetable.json'),
    typeof content === 'string' ? content : JSON.stringify(content),
  );

beforeEach(() => {
  ensureBuilt();
  folder = mkdtempSync(join(tmpdir(), 'nightsieve-recorded-'));
  temporary = mkdtempSync(join(tmpdir(), 'nightsieve-temporary-'));
  for (const name of ['night', 'again']) mkdirSync(join(folder, name));
  writeFileSync(join(folder, 'night/a.csv'), ASTROMETRY);
  writeFileSync(join(folder, 'night/b.csv'), table('B', [10.45, 15.05]));
  writeFileSync(join(folder, 'night/v.csv'), V);
  writeFileSync(join(folder, 'again/v.csv'), table('V', [9.8, 14.9]));
  timetable(NIGHT);
});
afterEach(() => {
  vi.unstubAllEnvs();
  for (const path of [folder, temporary]) rmSync(path, { recursive: true, force: true });
});

const replay = (speed: number) => {
  vi.stubEnv('TMPDIR', temporary);
  return run(['replay', folder, '--speed', String(speed)]);
};

describe('replay in plain lines', () => {
  it('tells the night, waits for every file, ends by itself with the same summary at any speed', async () => {
    const [quick, slow] = [await replay(100_000), await replay(1200)];
    expect([quick.code, quick.err, slow.code, slow.err]).toEqual([0, '', 0, '']);
    for (const { out } of [quick, slow]) {
      expect(out).toMatch(/^\d\d:\d\d UT {2}flagged {2}hot .*white dwarf/m);
      expect(out).toMatch(/3 frames read, 2 stars, 1 flagged, no problems/);
    }
    const end = (out: string) => out.slice(out.lastIndexOf('\n', out.indexOf('frames read')));
    expect(end(quick.out)).toBe(end(slow.out));
    // The last word is the re-reduced frame's: 15.05 - 14.90, not 15.05 - 15.00.
    expect(end(quick.out)).toContain('at B-V 0.15');
    expect(readdirSync(temporary)).toEqual([]);
  }, 60_000);

  it.each([
    ['SIGINT', 130],
    ['SIGTERM', 143],
    ['SIGHUP', 129],
  ] as const)(
    '%s ends it with %i, and its folder is gone',
    async (signal, code) => {
      const child = spawn('node', [MAIN, 'replay', folder, '--speed', '1'], {
        env: { ...process.env, TMPDIR: temporary },
        stdio: 'ignore',
      });
      const ended = new Promise<number | null>(resolve => child.on('exit', resolve));
      await vi.waitFor(() => expect(readdirSync(temporary)).toHaveLength(1), { timeout: 10_000 });
      // The folder is made a moment before the night is listened for.
      await new Promise(resolve => setTimeout(resolve, 1000));
      child.kill(signal);
      expect(await ended).toBe(code);
      expect(readdirSync(temporary)).toEqual([]);
    },
    30_000,
  );
});

describe('replay on a terminal', () => {
  it.each(['q', 'hang-up', 'line drop'])(
    '%s: its folder is gone',
    async way => {
      const session = new PtySession('node', [MAIN, 'replay', folder, '--speed', '100000'], {
        env: { TMPDIR: temporary },
      });
      await session.shows('1 flagged');
      // A played night stays on the screen at its end.
      expect(readdirSync(temporary)).toHaveLength(1);
      if (way === 'q') session.type('q');
      else if (way === 'hang-up') session.kill('SIGHUP');
      else session.hangUp();
      await session.exit;
      expect(readdirSync(temporary)).toEqual([]);
    },
    30_000,
  );
});

describe('a timetable that cannot be played', () => {
  const file = (name: string) => ({ ...NIGHT, files: [{ file: name, arrives: at(1) }] });
  it.each([
    ['no JSON', '{', /not JSON/],
    ['a file that is not there', file('night/none.csv'), /names night\/none\.csv, which is not in/],
    ['a folder', file('night'), /names night, which is not in/],
    [
      'a way out of the folder',
      file('night/../../x.csv'),
      /files\.0\.file: expected a path below the folder/,
    ],
    ['a hidden file', file('night/.x.csv'), /files\.0\.file: expected a path below the folder/],
    ['an end before the beginning', { ...NIGHT, ends: at(0) }, /ends: expected a time after begins/],
    ['no time', { ...NIGHT, begins: 'dusk' }, /begins: /],
  ])('%s', async (_, content, words) => {
    timetable(content);
    const { code, out, err } = await replay(100_000);
    expect([code, out]).toEqual([2, '']);
    expect(err).toMatch(/^nightsieve: .*timetable\.json: .*\n$/);
    expect(err).toMatch(words);
    expect(readdirSync(temporary)).toEqual([]);
  });
});
