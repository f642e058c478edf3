import type { FromWorker } from '../night/messages.js';
import type { NightView } from '../night/view.js';
import type { WorkerClient } from '../night/worker-client.js';
import { PlainNight, summaryLines } from '../screens/plain/plain-night.js';
import { EXIT } from './exit-codes.js';
import type { CommandIo } from './io.js';
import type { NightPlayer } from './night-player.js';
import { type NightSource, startWorker } from './night-source.js';

/** A played night is over when its last file has been quiet for this long. */
const SETTLED_MS = 500;

/** 128 + signal number, as shells report it. */
const SIGNALS = { SIGINT: EXIT.interrupted, SIGTERM: 143, SIGHUP: 129 } as const;

/** Tells the night in plain lines until it is over (a played one) or interrupted. */
export async function runPlain(source: NightSource, io: CommandIo, player?: NightPlayer): Promise<number> {
  const plain = new PlainNight();
  let latest: NightView | undefined;
  let printing: Promise<void> = Promise.resolve();
  const print = (lines: readonly string[]) => {
    if (lines.length > 0) printing = printing.then(() => io.out(`${lines.join('\n')}\n`));
  };
  // Asked when nothing waits to be read: the latest view then holds everything.
  const isOver = (filesRead: number) =>
    player !== undefined &&
    player.finishedFor_ms() >= SETTLED_MS &&
    filesRead >= player.files &&
    latest !== undefined &&
    latest.time_ms >= source.clock.ends_ms;
  let worker: WorkerClient | undefined;
  let asking: NodeJS.Timeout | undefined;
  const off: (() => void)[] = [];
  try {
    return await new Promise<number>((resolve, reject) => {
      const onMessage = (message: FromWorker) => {
        if (message.kind === 'view') {
          latest = message.view;
          print(plain.next(message.view));
          printing.catch(reject);
        }
        if (message.kind === 'idle' && isOver(message.files)) resolve(EXIT.ok);
      };
      worker = startWorker(source, onMessage, reject);
      if (player !== undefined) {
        // The end is asked for: nothing new comes of itself once the last file is read.
        asking = setInterval(() => {
          if (!player.finished) return;
          worker?.post({ kind: 'look' });
          worker?.post({ kind: 'refresh' });
        }, SETTLED_MS);
      }
      for (const [signal, code] of Object.entries(SIGNALS)) {
        const end = () => resolve(code);
        process.on(signal, end);
        off.push(() => process.off(signal, end));
      }
    });
  } finally {
    for (const undo of off) undo();
    clearInterval(asking);
    await worker?.stop();
    if (latest !== undefined) print(summaryLines(latest));
    await printing;
  }
}
