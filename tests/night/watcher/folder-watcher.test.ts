import { execFileSync } from 'node:child_process';
import {
  appendFileSync,
  mkdirSync,
  mkdtempSync,
  renameSync,
  rmSync,
  symlinkSync,
  unlinkSync,
  utimesSync,
  writeFileSync,
} from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import {
  type EndingKind,
  isComplete,
  PATIENCE_MS,
  QUIET_MS,
} from '../../../src/night/watcher/completeness.js';
import { FolderWatcher } from '../../../src/night/watcher/folder-watcher.js';

let parent: string;
let folder: string;
let watcher: FolderWatcher | undefined;

beforeEach(() => {
  parent = mkdtempSync(join(tmpdir(), 'nightsieve-watch-'));
  folder = join(parent, 'night');
  mkdirSync(folder);
});

afterEach(async () => {
  await watcher?.close();
  watcher = undefined;
  rmSync(parent, { recursive: true, force: true });
});

function start(poll = false) {
  const files: [string, string][] = [];
  const refused: [string, string][] = [];
  const folders: boolean[] = [];
  watcher = new FolderWatcher(folder, poll, {
    onFile: (name, bytes) => {
      files.push([name, Buffer.from(bytes).toString()]);
    },
    onRefused: (name, refusal) => refused.push([name, refusal.code]),
    onFolder: present => folders.push(present),
    onIdle: () => {},
  });
  return { files, refused, folders };
}

const until = (check: () => void) => vi.waitFor(check, { timeout: 8000, interval: 20 });
const path = (name: string) => join(folder, name);

describe('FolderWatcher', () => {
  it('reads what is there before the start, oldest first, hidden and unfinished files left out', async () => {
    for (const [name, age] of [
      ['b.csv', 100],
      ['a.csv', 50],
      ['.hidden.csv', 40],
      ['c.csv.tmp', 30],
      ['d.csv~', 20],
    ] as const) {
      writeFileSync(path(name), `${name}\n`);
      utimesSync(path(name), Date.now() / 1000 - age, Date.now() / 1000 - age);
    }
    const { files } = start();
    await until(() => expect(files.map(([name]) => name)).toEqual(['b.csv', 'a.csv']));
  });

  it('waits for a slow writer, and reads a file renamed into place', async () => {
    const { files } = start();
    writeFileSync(path('slow.csv'), 'ra,dec\n1');
    await new Promise(resolve => setTimeout(resolve, 300));
    expect(files).toEqual([]);
    appendFileSync(path('slow.csv'), ',2\n');
    writeFileSync(path('atomic.csv.tmp'), 'whole\n');
    renameSync(path('atomic.csv.tmp'), path('atomic.csv'));
    await until(() => expect(files).toHaveLength(2));
    expect(new Map(files).get('slow.csv')).toBe('ra,dec\n1,2\n');
    expect(new Map(files).get('atomic.csv')).toBe('whole\n');
  });

  it('reads a file again when it grows, and again when it is rewritten', async () => {
    const { files } = start();
    writeFileSync(path('f.csv'), 'one\n');
    await until(() => expect(files).toHaveLength(1));
    appendFileSync(path('f.csv'), 'two\n');
    await until(() => expect(files).toHaveLength(2));
    writeFileSync(path('f.csv'), 'new\n');
    await until(() => expect(files).toHaveLength(3));
    expect(files.map(([, text]) => text)).toEqual(['one\n', 'one\ntwo\n', 'new\n']);
  });

  it('refuses a pipe in words, and is not held up by it', async () => {
    execFileSync('mkfifo', [path('pipe.csv')]);
    const { files, refused } = start();
    writeFileSync(path('good.csv'), 'good\n');
    await until(() => expect(files.map(([name]) => name)).toEqual(['good.csv']));
    await until(() => expect(refused).toEqual([['pipe.csv', 'not-regular']]));
  });

  it('survives the folder being removed and made again', async () => {
    const { files, folders } = start();
    await until(() => expect(folders).toContain(true));
    rmSync(folder, { recursive: true });
    await until(() => expect(folders.at(-1)).toBe(false));
    mkdirSync(folder);
    writeFileSync(path('back.csv'), 'back\n');
    await until(() => expect(files.map(([name]) => name)).toEqual(['back.csv']));
    expect(folders.at(-1)).toBe(true);
  });

  it('sees at once what comes into a folder that was made again', async () => {
    const { files } = start();
    writeFileSync(path('before.csv'), 'before\n');
    await until(() => expect(files).toHaveLength(1));
    rmSync(folder, { recursive: true });
    mkdirSync(folder);
    for (const name of ['one.csv', 'two.csv']) {
      writeFileSync(path(name), `${name}\n`);
      await until(() => expect(files.at(-1)?.[0]).toBe(name));
    }
  });

  it('takes an old file that is renamed into place', async () => {
    const { files } = start();
    const elsewhere = join(parent, 'old.csv');
    writeFileSync(elsewhere, 'old\n');
    utimesSync(elsewhere, 1000, 1000);
    renameSync(elsewhere, path('old.csv'));
    await until(() => expect(files).toEqual([['old.csv', 'old\n']]));
  });

  it('a file without closing newline is taken in the end, even from a clock an hour ahead', async () => {
    const { files } = start();
    writeFileSync(path('ahead.csv'), 'ra,dec\n1,2');
    utimesSync(path('ahead.csv'), Date.now() / 1000 + 3600, Date.now() / 1000 + 3600);
    await until(() => expect(files).toEqual([['ahead.csv', 'ra,dec\n1,2']]));
  });

  it('a slow writer whose clock is an hour behind is waited for all the same', async () => {
    const { files } = start();
    writeFileSync(path('behind.csv'), 'ra,dec\n1');
    utimesSync(path('behind.csv'), Date.now() / 1000 - 3600, Date.now() / 1000 - 3600);
    await new Promise(resolve => setTimeout(resolve, 300));
    appendFileSync(path('behind.csv'), ',2\n');
    await until(() => expect(files).toEqual([['behind.csv', 'ra,dec\n1,2\n']]));
  });

  it('refuses a link, and passes folders over in silence, whenever they came', async () => {
    mkdirSync(path('early'));
    writeFileSync(join(parent, 'secret.csv'), 'secret\n');
    symlinkSync(join(parent, 'secret.csv'), path('link.csv'));
    const { files, refused } = start();
    mkdirSync(path('late'));
    writeFileSync(path('good.csv'), 'good\n');
    await until(() => expect(files.map(([name]) => name)).toEqual(['good.csv']));
    await until(() => expect(refused).toEqual([['link.csv', 'not-regular']]));
  });

  it('reads again what changed while it was being handled', async () => {
    const texts: string[] = [];
    watcher = new FolderWatcher(folder, false, {
      onFile: async (_, bytes) => {
        texts.push(Buffer.from(bytes).toString());
        if (texts.length > 1) return;
        appendFileSync(path('f.csv'), 'two\n');
        await new Promise(resolve => setTimeout(resolve, 300));
      },
      onRefused: () => {},
      onFolder: () => {},
      onIdle: () => {},
    });
    writeFileSync(path('f.csv'), 'one\n');
    await until(() => expect(texts).toEqual(['one\n', 'one\ntwo\n']));
  });

  it('finds files by polling, and a deleted one costs nothing', async () => {
    const { files } = start(true);
    writeFileSync(path('gone.csv'), 'no newline yet');
    unlinkSync(path('gone.csv'));
    writeFileSync(path('p.csv'), 'polled\n');
    await until(() => expect(files.map(([name]) => name)).toEqual(['p.csv']));
  });
});

describe('the rule of completeness', () => {
  const at = (
    byFileTime_ms: number,
    seen_ms: number,
    lastByte: number | undefined,
    kind: EndingKind = 'text',
  ) => isComplete({ kind, bytes: 10, modified_ms: 1000, lastByte }, { byFileTime_ms, seen_ms });
  it('a closing newline needs a little quiet', () => {
    expect(at(QUIET_MS - 1, 0, 10)).toBe(false);
    expect(at(QUIET_MS, 0, 10)).toBe(true);
  });
  it('no closing newline needs patience by our own clock', () => {
    expect(at(PATIENCE_MS, PATIENCE_MS - 1, 49)).toBe(false);
    expect(at(PATIENCE_MS, PATIENCE_MS, 49)).toBe(true);
    expect(at(3_600_000, 0, 49)).toBe(false);
  });
  it('a file from a clock ahead of ours is judged by what we saw', () => {
    expect(at(-5000, QUIET_MS - 1, 10)).toBe(false);
    expect(at(-5000, QUIET_MS, 10)).toBe(true);
    expect(at(-5000, PATIENCE_MS, 49)).toBe(true);
  });
  it('a newline at the end of a FITS or gzip file means nothing', () => {
    for (const kind of ['fits', 'gzip'] as const) {
      expect(at(3_600_000, PATIENCE_MS - 1, 10, kind)).toBe(false);
      expect(at(0, PATIENCE_MS, 10, kind)).toBe(true);
    }
  });
  it('an empty file is given the same patience', () => {
    expect(at(0, PATIENCE_MS - 1, undefined)).toBe(false);
    expect(at(0, PATIENCE_MS, undefined)).toBe(true);
  });
});
