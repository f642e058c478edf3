import { parentPort, workerData } from 'node:worker_threads';
import { makeProblem } from '../catalogue/problems.js';
import { safeText } from '../catalogue/safe-text.js';
import { makeClock } from './clock.js';
import { NightEngine } from './engine.js';
import { FollowUpDesk } from './follow-up.js';
import type { FromWorker, ToWorker, WorkerStart } from './messages.js';
import { viewBuffers } from './view-buffers.js';
import { ViewMaker } from './view-maker.js';
import { FolderWatcher } from './watcher/folder-watcher.js';

/** Views go out at most this often, however fast the files come. */
const VIEW_INTERVAL_MS = 250;

/** The thread that reads, matches and classifies, so that keys are answered at once whatever arrives. */
function run(start: WorkerStart, port: NonNullable<typeof parentPort>): void {
  const clock = makeClock(start.clock);
  const engine = new NightEngine(start.profile);
  const maker = new ViewMaker(engine, new FollowUpDesk(engine));
  const files = new Set<string>();
  let pending: NodeJS.Timeout | undefined;
  let lastView_ms = 0;
  let present: boolean | undefined;

  const post = (message: FromWorker, transfer: ArrayBuffer[] = []) => port.postMessage(message, transfer);
  const sendView = () => {
    pending = undefined;
    lastView_ms = Date.now();
    const view = maker.view(clock.now_ms());
    post({ kind: 'view', view }, viewBuffers(view));
  };
  const viewSoon = () => {
    pending ??= setTimeout(sendView, Math.max(0, lastView_ms + VIEW_INTERVAL_MS - Date.now()));
  };

  const watcher = new FolderWatcher(start.folder, start.poll, {
    onFile: async (name, bytes) => {
      await engine.absorb(name, bytes);
      files.add(name);
      viewSoon();
      // Between two files the port gets its turn: questions about a star are not kept waiting.
      await new Promise(resolve => setImmediate(resolve));
    },
    onRefused: (name, { code, seen }) => {
      engine.refuse(name, makeProblem(code, safeText(name), 0, seen));
      files.add(name);
      viewSoon();
    },
    onFolder: now => {
      if (now !== present) post({ kind: 'folder', present: now });
      present = now;
    },
    onIdle: () => {
      if (pending !== undefined) {
        clearTimeout(pending);
        sendView();
      }
      post({ kind: 'idle', files: files.size });
    },
  });

  port.on('message', (message: ToWorker) => {
    switch (message.kind) {
      case 'detail':
        if (message.star < engine.catalogue.count) {
          post({ kind: 'detail', detail: maker.detail(message.star, clock.now_ms()) });
        }
        break;
      case 'refresh':
        viewSoon();
        break;
      case 'look':
        watcher.look();
        break;
    }
  });
  sendView();
}

if (parentPort !== null) run(workerData as WorkerStart, parentPort);
