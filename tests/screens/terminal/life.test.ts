import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { ROOT } from '../../support/built.js';
import { type PtyOptions, PtySession } from '../../support/pty.js';

let folder: string;
let script: string;
let session: PtySession | undefined;

beforeAll(async () => {
  const { bundle } = (await import(resolve(ROOT, '.config/bundle.mjs'))) as {
    bundle: (entries: Record<string, string>, outdir: string) => Promise<unknown>;
  };
  folder = mkdtempSync(join(tmpdir(), 'nightsieve-terminal-'));
  await bundle({ counter: resolve(import.meta.dirname, 'fixtures/counter.tsx') }, folder);
  script = join(folder, 'counter.js');
});
afterEach(() => session?.kill('SIGKILL'));
afterAll(() => rmSync(folder, { recursive: true, force: true }));

const DOWN = '\x1b[B';
const CTRL_Z = '\x1a';

async function counter(options: PtyOptions = {}): Promise<PtySession> {
  session = new PtySession('node', [script], options);
  await session.shows('picture 0');
  return session;
}

/** A shell with job control and without line editing (it would hide stray input), in which the counter has been started. */
async function counterInShell(command: string, options: PtyOptions = {}): Promise<PtySession> {
  session = new PtySession('bash', ['--norc', '--noprofile', '--noediting', '-i'], {
    ...options,
    env: { ...options.env, PS1: 'ready> ', HISTFILE: '/dev/null' },
  });
  await session.shows('ready>');
  session.type(`${command}\r`);
  await session.shows('picture 0');
  return session;
}

/** Where the terminal's three switches stand, after everything written so far. */
function switches({ raw }: PtySession) {
  const isOn = (on: string, off: string) => raw.lastIndexOf(on) > raw.lastIndexOf(off);
  return {
    alternateScreen: isOn('\x1b[?1049h', '\x1b[?1049l'),
    cursor: isOn('\x1b[?25h', '\x1b[?25l'),
    paste: isOn('\x1b[?2004h', '\x1b[?2004l'),
  };
}
const WHOLE = { alternateScreen: false, cursor: true, paste: false };

async function expectWhole(ended: PtySession): Promise<void> {
  await ended.settled();
  expect(switches(ended)).toEqual(WHOLE);
  expect(ended.onAlternateScreen).toBe(false);
}

describe('drawing', () => {
  it('keys of one read all count, and the canvas lies between the texts', async () => {
    const screen = await counter();
    expect(screen.screen().trimEnd()).toBe('counter 0\npicture 0\nsize 80x24\nend');
    screen.type(DOWN + DOWN + DOWN);
    await screen.shows('picture 3');
    expect(screen.screen()).toContain('counter 3');
  });

  it('one key costs some bytes, rest costs none', async () => {
    const screen = await counter();
    const first = screen.bytes;
    screen.type(DOWN);
    await screen.shows('picture 1');
    expect(screen.bytes - first).toBeLessThan(40);
    const before = screen.bytes;
    await new Promise(done => setTimeout(done, 1500));
    expect(screen.bytes - before).toBe(0);
  });

  it('after resizes the screen is that of a fresh start', async () => {
    const screen = await counter();
    screen.resize(30, 8);
    screen.resize(100, 30);
    screen.resize(50, 12);
    await screen.shows('size 50x12');
    await screen.settled();
    expect(screen.screen().trimEnd()).toBe('counter 0\npicture 0\nsize 50x12\nend');
  });

  it('what has damaged the screen goes with a redraw', async () => {
    const screen = await counter();
    await new Promise<void>(done => screen.terminal.write('\x1b[2;1Hdamage', done));
    expect(screen.screen()).toContain('damage');
    screen.type('l');
    await screen.shows('picture 0');
    expect(screen.screen()).not.toContain('damage');
  });
});

describe('ways out', () => {
  it.each([
    ['q', 0],
    ['\x03', 130],
    ['x', 3],
  ])('key %j: %i', async (key, code) => {
    const screen = await counter();
    screen.type(key);
    expect(await screen.exit).toMatchObject({ exitCode: code });
    await expectWhole(screen);
  });

  it.each([
    ['SIGTERM', { exitCode: 143 }],
    ['SIGINT', { exitCode: 130 }],
    ['SIGQUIT', { exitCode: 131 }],
    ['SIGHUP', { signal: 1 }],
  ])('%s', async (signal, expected) => {
    const screen = await counter();
    screen.kill(signal);
    expect(await screen.exit).toMatchObject(expected);
    await expectWhole(screen);
  });

  it('a line that drops takes the program with it, by the signal', async () => {
    const screen = await counter();
    screen.hangUp();
    expect(await screen.exit).toMatchObject({ signal: 1 });
  });

  it.each([
    ['t', 'thrown on purpose'],
    ['r', 'rejected on purpose'],
    ['b', 'broken while drawing'],
  ])('failure %s: the terminal first, then the message, then 1', async (key, words) => {
    const screen = await counter();
    screen.type(key);
    expect(await screen.exit).toMatchObject({ exitCode: 1 });
    await expectWhole(screen);
    expect(screen.raw.indexOf(words)).toBeGreaterThan(screen.raw.lastIndexOf('\x1b[?1049l'));
    expect(screen.screen()).toContain(words);
  });
});

describe('suspending', () => {
  it.each([
    ['alone', (path: string) => `node ${path}`],
    ['with the parent that started it', (path: string) => `sh -c "node ${path}; true"`],
  ])('Ctrl-Z gives the shell a whole terminal and fg brings everything back, %s', async (_, command) => {
    const shell = await counterInShell(command(script));
    shell.type(DOWN);
    await shell.shows('picture 1');
    shell.type(CTRL_Z);
    await shell.shows('Stopped');
    expect(shell.onAlternateScreen).toBe(false);
    expect(switches(shell)).toMatchObject({ alternateScreen: false, cursor: true });
    shell.type('stty -a\r');
    await shell.shows(/[^-]icanon/);
    shell.type('fg\r');
    await shell.shows('picture 1');
    expect(switches(shell)).toEqual({ alternateScreen: true, cursor: false, paste: true });
    shell.type(DOWN);
    await shell.shows('picture 2');
    shell.type('q');
    await shell.until(() => !shell.onAlternateScreen, 'the shell');
    shell.type('stty -a\r');
    await shell.shows(/[^-]icanon/);
  });

  it('SIGTSTP from outside does the same, and in the background it waits for fg', async () => {
    const note = join(folder, 'pid');
    const shell = await counterInShell(`sh -c 'echo $$ > ${note}; exec node ${script}'`);
    process.kill(Number(readFileSync(note, 'utf8')), 'SIGTSTP');
    await shell.shows('Stopped');
    expect(shell.onAlternateScreen).toBe(false);
    shell.type('bg; sleep 0.5; jobs\r');
    await shell.shows(/Stopped.*Stopped/s);
    expect(shell.onAlternateScreen).toBe(false);
    shell.type('fg\r');
    await shell.shows('picture 0');
    shell.type(DOWN);
    await shell.shows('picture 1');
  });

  it('a stop without notice (SIGSTOP): everything is taken and drawn again', async () => {
    const screen = await counter();
    process.kill(screen.pid, 'SIGSTOP');
    await new Promise<void>(done => screen.terminal.write('\x1b[?1049l\x1b[?25hdamage', done));
    process.kill(screen.pid, 'SIGCONT');
    await screen.shows('picture 0');
    expect(screen.onAlternateScreen).toBe(true);
    expect(screen.screen()).not.toContain('damage');
    screen.type(DOWN);
    await screen.shows('picture 1');
  });

  it('where no shell could continue it, Ctrl-Z does not stop it', async () => {
    const screen = await counter();
    screen.type(CTRL_Z);
    screen.type(DOWN);
    await screen.shows('picture 1');
    expect(screen.onAlternateScreen).toBe(true);
  });
});

describe('over a remote link', () => {
  const env = { SSH_CONNECTION: '192.0.2.1 50000 192.0.2.2 22' };

  it('the terminal is asked after each frame, and answers', async () => {
    const screen = await counter({ env });
    for (const count of [1, 2, 3]) {
      screen.type(DOWN);
      await screen.shows(`picture ${count}`);
    }
    expect(screen.raw.split('\x1b[5n').length - 1).toBeGreaterThanOrEqual(3);
    screen.type('q');
    expect(await screen.exit).toMatchObject({ exitCode: 0 });
    await expectWhole(screen);
  });

  it.each([
    ['q', 'q'],
    ['Ctrl-Z', CTRL_Z],
  ])('an answer that is late at the end (%s) does not reach the shell', async (_, key) => {
    const shell = await counterInShell(`node ${script}`, { env, answer_ms: 300 });
    shell.type(DOWN);
    await shell.shows('picture 1');
    shell.type(key);
    await shell.until(() => !shell.onAlternateScreen, 'the shell');
    await new Promise(done => setTimeout(done, 600));
    await shell.settled();
    expect(shell.screen()).not.toMatch(/0n/);
  });

  it('nothing is asked of a local terminal', async () => {
    const screen = await counter();
    expect(screen.raw).not.toContain('\x1b[5n');
  });
});

it('with CI in the environment it still draws and follows resizes', async () => {
  const screen = await counter({ env: { CI: '1' } });
  screen.resize(60, 20);
  await screen.shows('size 60x20');
});
