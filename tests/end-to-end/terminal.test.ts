import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { ensureBuilt, MAIN, ROOT } from '../support/built.js';
import { PtySession } from '../support/pty.js';

const ASTROMETRY = `id,ra,dec,parallax,parallax_error
sun,36.0,33.0,10,0.1
hot,36.1,33.0,20,0.1
giant,36.2,33.0,2,0.05
`;
const table = (filter: string, mags: readonly number[]) =>
  `# FILTER = ${filter}\n# DATE-OBS = 2026-11-08T20:00:00\n# EXPTIME = 60\nra,dec,mag,mag_error\n${mags
    .map((mag, i) => `${(36 + i / 10).toFixed(1)},33.0,${mag},0.010`)
    .join('\n')}\n`;

let folder: string;
let session: PtySession | undefined;

beforeAll(() => {
  ensureBuilt();
  folder = mkdtempSync(join(tmpdir(), 'nightsieve-e2e-'));
  writeFileSync(join(folder, '1.csv'), ASTROMETRY);
  writeFileSync(join(folder, '2.csv'), table('B', [10.45, 15.05, 10.35]));
  writeFileSync(join(folder, '3.csv'), table('V', [9.8, 15.0, 9.3]));
});
afterEach(() => session?.kill('SIGKILL'));
afterAll(() => rmSync(folder, { recursive: true, force: true }));

async function watching(
  columns = 80,
  rows = 24,
  env: Record<string, string> = {},
  options: readonly string[] = [],
): Promise<PtySession> {
  const line = [MAIN, 'watch', folder, '--profile', 'northern-80cm', ...options];
  session = new PtySession('node', line, { columns, rows, env });
  await session.shows('1 flagged');
  return session;
}

/** What every way out must leave behind. */
async function expectWhole(ended: PtySession): Promise<void> {
  await ended.settled();
  expect(ended.onAlternateScreen).toBe(false);
  for (const [on, off] of [
    ['\x1b[?25l', '\x1b[?25h'],
    ['\x1b[?2004h', '\x1b[?2004l'],
    ['\x1b[?1049h', '\x1b[?1049l'],
  ]) {
    expect(ended.raw.lastIndexOf(off), `${JSON.stringify(off)} after ${JSON.stringify(on)}`).toBeGreaterThan(
      ended.raw.lastIndexOf(on),
    );
  }
}

describe('a night on the screen', () => {
  it('shows the white dwarf, says why, how long and until when, and quits whole', async () => {
    const screen = await watching();
    await screen.shows(/white dwarf/);
    expect(screen.onAlternateScreen).toBe(true);
    screen.type('\r');
    await screen.shows(/lies 10\.\d mag below the dwarfs/);
    await screen.shows(/setup +mag +exposure/);
    expect(screen.screen()).toMatch(/V imaging/);
    screen.type('q');
    await screen.shows('Shortlist');
    screen.type('?');
    await screen.shows('Quits from anywhere');
    screen.type('q');
    await screen.shows('Shortlist');
    screen.type('q');
    expect((await screen.exit).exitCode).toBe(0);
    await expectWhole(screen);
  }, 30_000);

  it('a new file shows without a key, and the shortlist keeps its place', async () => {
    const screen = await watching();
    writeFileSync(join(folder, '4.csv'), table('V', [9.81, 15.01, 9.31]));
    await screen.shows('4 frames');
    expect(screen.screen()).toContain('hot');
  }, 30_000);

  it('follows resizes, says what it needs when too small, and recovers', async () => {
    const screen = await watching();
    screen.resize(120, 36);
    await screen.shows(/lies 10\.\d mag below/);
    screen.resize(40, 10);
    await screen.shows(/needs \d+ x \d+ cells, has 40 x 10/);
    screen.resize(80, 24);
    await screen.shows('Shortlist');
  }, 30_000);

  it('writes nothing while nothing happens', async () => {
    const screen = await watching();
    await new Promise(done => setTimeout(done, 1500));
    const before = screen.bytes;
    await new Promise(done => setTimeout(done, 3000));
    // At most the minute of the clock and the minutes left.
    expect(screen.bytes - before).toBeLessThan(120);
  }, 30_000);

  it('without colour, Unicode or a known terminal it is still all there', async () => {
    const screen = await watching(80, 24, { TERM: 'vt100', LANG: 'C', NO_COLOR: '1' });
    expect(screen.raw).not.toMatch(/\x1b\[[0-9;]*(3[0-8]|9[0-7])[;m]/);
    expect(screen.screen()).not.toMatch(/[^\x20-\x7e\n]/);
    expect(screen.screen()).toMatch(/white dwarf/);
  }, 30_000);
});

describe('the red palette', () => {
  it.each([
    ['truecolor', { COLORTERM: 'truecolor' }],
    ['16 colours', { COLORTERM: '', TERM: 'xterm' }],
  ])(
    '%s: no text on any screen has another colour',
    async (_, env) => {
      const screen = await watching(120, 36, env, ['--palette', 'red']);
      expect(screen.textWithoutRed()).toBe('');
      for (const [key, shown] of [
        ['s', 'by merit of the flags'],
        ['q', 'Shortlist'],
        ['f', 'files'],
        ['?', 'Quits from anywhere'],
      ] as const) {
        screen.type(key);
        await screen.shows(shown);
        await screen.settled();
        expect(screen.textWithoutRed()).toBe('');
      }
    },
    30_000,
  );
});

describe('every way out leaves the terminal whole', () => {
  it('Ctrl-C: 130', async () => {
    const screen = await watching();
    screen.type('\x03');
    expect((await screen.exit).exitCode).toBe(130);
    await expectWhole(screen);
  }, 30_000);

  it.each([
    ['SIGTERM', { exitCode: 143 }],
    ['SIGHUP', { signal: 1 }],
    ['SIGINT', { exitCode: 130 }],
  ])(
    '%s',
    async (signal, expected) => {
      const screen = await watching();
      process.kill(screen.pid, signal);
      expect(await screen.exit).toMatchObject(expected);
      await expectWhole(screen);
    },
    30_000,
  );

  describe('a failure of the program', () => {
    let script: string;
    beforeAll(async () => {
      const { bundle } = (await import(resolve(ROOT, '.config/bundle.mjs'))) as {
        bundle: (entries: Record<string, string>, outdir: string) => Promise<unknown>;
      };
      const out = resolve(ROOT, 'dist/fixtures');
      await bundle({ failing: resolve(import.meta.dirname, 'fixtures/failing-app.tsx') }, out);
      script = join(out, 'failing.js');
    });

    it.each([
      ['t', 'thrown on purpose'],
      ['r', 'rejected on purpose'],
    ])(
      '%s: the terminal is given back first, then the message is shown',
      async (key, words) => {
        session = new PtySession('node', [script]);
        await session.shows('ready');
        session.type(key);
        expect((await session.exit).exitCode).toBe(1);
        await expectWhole(session);
        await session.shows(words);
        expect(session.raw.indexOf(words)).toBeGreaterThan(session.raw.lastIndexOf('\x1b[?1049l'));
      },
      30_000,
    );
  });
});
