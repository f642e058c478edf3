import type { FromWorker } from '../night/messages.js';
import type { NightView } from '../night/view.js';
import type { WorkerClient } from '../night/worker-client.js';
import { PlainNight } from '../screens/plain/plain-night.js';
import { EXIT } from './exit-codes.js';
import type { CommandIo } from './io.js';
import type { NightPlayer } from './night-player.js';
import { type NightSource, startWorker } from './night-source.js';

/** A played night is over when its last file has been quiet for this long. */
const SETTLED_MS = 500;

/** Tells the night in plain lines until it is over (a played one) or interrupted. */
export async function runPlain(source: NightSource, io: CommandIo, player?: NightPlayer): Promise<number> {
  const plain = new PlainNight();
  let latest: NightView | undefined;
  let printing: Promise<void> = Promise.resolve();
  const print = (lines: readonly string[]) => {
    if (lines.length > 0) printing = printing.then(() => io.out(`${lines.join('\n')}\n`));
  };
  let worker: WorkerClient | undefined;
  let ending: NodeJS.Timeout | undefined;
  try {
    return await new Promise<number>((resolve, reject) => {
      const onMessage = (message: FromWorker) => {
        if (message.kind === 'view') {
          latest = message.view;
          print(plain.next(message.view));
        }
        if (message.kind !== 'idle' || player === undefined || !player.finished) return;
        if (message.files < player.files) return;
        if (player.finishedFor_ms() >= SETTLED_MS) resolve(EXIT.ok);
        else ending ??= setTimeout(() => worker?.post({ kind: 'look' }), SETTLED_MS);
      };
      worker = startWorker(source, onMessage, reject);
      process.once('SIGINT', () => resolve(EXIT.interrupted));
      process.once('SIGTERM', () => resolve(EXIT.interrupted));
    });
  } finally {
    clearTimeout(ending);
    await worker?.stop();
    if (latest !== undefined) print(plain.summary(latest));
    await printing;
  }
}
