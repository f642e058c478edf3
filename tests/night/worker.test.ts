import { execFileSync } from 'node:child_process';
import { mkdirSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';
import { Worker } from 'node:worker_threads';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { REAL_TIME } from '../../src/night/clock.js';
import type { FromWorker, ToWorker, WorkerStart } from '../../src/night/messages.js';
import { parseProfile } from '../../src/night/profile/parse.js';
import { WorkerClient } from '../../src/night/worker-client.js';
import { ensureBuilt, ROOT } from '../support/built.js';

const { profile } = parseProfile(
  readFileSync(resolve(ROOT, 'profiles/northern-80cm.toml'), 'utf8'),
  'northern-80cm.toml',
);

let parent: string;
let start: WorkerStart;
let worker: Worker | undefined;

beforeEach(() => {
  ensureBuilt();
  parent = mkdtempSync(join(tmpdir(), 'nightsieve-worker-'));
  const folder = join(parent, 'night');
  mkdirSync(folder);
  start = { folder, profile: profile!, poll: false, clock: REAL_TIME };
});
afterEach(async () => {
  await worker?.terminate();
  rmSync(parent, { recursive: true, force: true });
});

/** The worker as it is built, and everything it has said. */
function running(workerData: unknown = start) {
  const said: FromWorker[] = [];
  const failures: unknown[] = [];
  const started = new Worker(resolve(ROOT, 'dist/worker.js'), { workerData });
  worker = started;
  started.on('error', error => failures.push(error));
  const onMessage: ((message: FromWorker) => void)[] = [message => said.push(message)];
  started.on('message', (message: FromWorker) => {
    for (const listener of onMessage) listener(message);
  });
  const ask = (message: ToWorker) => started.postMessage(message);
  const of = <K extends FromWorker['kind']>(kind: K) =>
    said.filter((message): message is Extract<FromWorker, { kind: K }> => message.kind === kind);
  return { said, failures, ask, of, onMessage };
}

const until = (check: () => void) => vi.waitFor(check, { timeout: 15_000, interval: 20 });
const write = (name: string, text: string) => writeFileSync(join(start.folder, name), text);

/** Several hundred stars in two bands, a little different in each frame. */
const frame = (number: number, stars: number) =>
  `id,ra,dec,Bmag,e_Bmag,Vmag,e_Vmag,parallax,parallax_error\n${Array.from({ length: stars }, (_, i) => {
    const v = 12 + i / 200 + number / 1e4;
    return `s${i},${(30 + i / 1000).toFixed(4)},45,${(v + 0.3 + i / 1000).toFixed(4)},0.01,${v.toFixed(4)},0.01,2,0.05`;
  }).join('\n')}\n`;

describe('the worker', () => {
  it('sends views of what it reads, and one star on request', async () => {
    write('1.csv', frame(1, 10));
    const { of, ask } = running();
    await until(() => expect(of('view').at(-1)?.view.stars.count).toBe(10));
    write('2.csv', frame(2, 12));
    await until(() => expect(of('view').at(-1)?.view.stars.count).toBe(12));
    const { view } = of('view').at(-1)!;
    expect(view.stars.readings[0]).toBe(4);
    expect(view.stars.absMag).toBeInstanceOf(Float32Array);
    ask({ kind: 'detail', star: 11 });
    // There is no such star: no answer, and no harm.
    ask({ kind: 'detail', star: 12 });
    ask({ kind: 'refresh' });
    await until(() => expect(of('view').at(-1)!.view.revision).toBeGreaterThan(view.revision));
    expect(of('detail').map(({ detail }) => detail.id)).toEqual(['s11']);
  }, 30_000);

  it('answers while many files wait', async () => {
    for (let number = 0; number < 60; number++) write(`${number}.csv`, frame(number, 400));
    const { said, ask, onMessage, of } = running();
    let asked = false;
    onMessage.push(message => {
      if (asked || message.kind !== 'view' || message.view.stars.count === 0) return;
      asked = true;
      ask({ kind: 'detail', star: 0 });
    });
    await until(() => expect(of('idle').at(-1)?.files).toBe(60));
    await until(() => expect(of('detail')).toHaveLength(1));
    const kinds = said.map(({ kind }) => kind);
    const allRead = said.findIndex(message => message.kind === 'view' && message.view.frames.length === 60);
    expect(kinds.indexOf('detail')).toBeLessThan(allRead);
    // Views are put together: far fewer than files.
    expect(of('view').length).toBeLessThan(30);
  }, 30_000);

  it('tells of files that cannot be read, until they can', async () => {
    execFileSync('mkfifo', [join(start.folder, 'pipe.csv')]);
    write('bad.csv', 'zork\n');
    const { of } = running();
    const codes = () =>
      of('view')
        .at(-1)
        ?.view.problems.map(({ code, file }) => `${file} ${code}`);
    await until(() => expect(codes()?.sort()).toEqual(['bad.csv not-a-table', 'pipe.csv not-regular']));
    write('bad.csv', frame(1, 3));
    await until(() => expect(codes()).toEqual(['pipe.csv not-regular']));
  }, 30_000);

  it('tells when the folder goes and comes back, and keeps what it has read', async () => {
    write('1.csv', frame(1, 5));
    const { of } = running();
    await until(() => expect(of('view').at(-1)?.view.stars.count).toBe(5));
    rmSync(start.folder, { recursive: true });
    await until(() => expect(of('folder').map(({ present }) => present)).toEqual([true, false]));
    mkdirSync(start.folder);
    await until(() => expect(of('folder').map(({ present }) => present)).toEqual([true, false, true]));
    write('2.csv', frame(2, 5));
    await until(() => expect(of('view').at(-1)?.view.frames).toHaveLength(2));
  }, 30_000);

  it('a failure in it reaches the main thread', async () => {
    const { failures } = running({ ...start, profile: {} });
    await until(() => expect(failures).toHaveLength(1));
    expect(failures[0]).toBeInstanceOf(Error);
  });
});

describe('the main thread', () => {
  // From the sources there is no worker beside the client: it cannot start.
  it('is told once, with the cause, of a worker that fails', async () => {
    const failures: unknown[] = [];
    const client = new WorkerClient(
      start,
      () => {},
      error => failures.push(error),
    );
    await until(() => expect(failures).toHaveLength(1));
    await client.stop();
    expect(failures.map(String)).toEqual([expect.stringMatching(/Cannot find module .*worker\.js/)]);
  });
});
