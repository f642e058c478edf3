import { Worker } from 'node:worker_threads';
import type { FromWorker, ToWorker, WorkerStart } from './messages.js';

/** The night's worker as the main thread sees it. */
export class WorkerClient {
  private readonly worker: Worker;
  private stopping = false;

  constructor(
    start: WorkerStart,
    onMessage: (message: FromWorker) => void,
    onFailure: (error: unknown) => void,
  ) {
    this.worker = new Worker(new URL('./worker.js', import.meta.url), { workerData: start });
    this.worker.on('message', onMessage);
    this.worker.on('error', onFailure);
    this.worker.on('exit', code => {
      if (!this.stopping) onFailure(new Error(`the reading thread ended by itself (code ${code})`));
    });
  }

  post(message: ToWorker): void {
    this.worker.postMessage(message);
  }

  async stop(): Promise<void> {
    this.stopping = true;
    await this.worker.terminate();
  }
}
