import { Worker } from 'node:worker_threads';
import type { FromWorker, ToWorker, WorkerStart } from './messages.js';

/** The night's worker as the main thread sees it. */
export class WorkerClient {
  private readonly worker: Worker;
  /** Stopped, or failed: nothing more is to be said of its end. */
  private ended = false;

  constructor(
    start: WorkerStart,
    onMessage: (message: FromWorker) => void,
    onFailure: (error: unknown) => void,
  ) {
    this.worker = new Worker(new URL('./worker.js', import.meta.url), { workerData: start });
    this.worker.on('message', onMessage);
    // A failure is followed by an exit, which would hide its words.
    const fail = (error: unknown) => {
      if (!this.ended) onFailure(error);
      this.ended = true;
    };
    this.worker.on('error', fail);
    this.worker.on('exit', code => fail(new Error(`the reading thread ended by itself (code ${code})`)));
  }

  post(message: ToWorker): void {
    this.worker.postMessage(message);
  }

  async stop(): Promise<void> {
    this.ended = true;
    await this.worker.terminate();
  }
}
