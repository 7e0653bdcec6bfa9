import { Worker } from 'node:worker_threads';

import { crashed } from './failure';
import type { Failure, WorkerMessage, WorkOrder } from './messages';

export type Outcome =
  { kind: 'done'; result: unknown } | { kind: 'stopped' } | { kind: 'failed'; failure: Failure };

export interface RunningWork {
  readonly outcome: Promise<Outcome>;
  /** Asks it to stop; what has not stopped by itself after the grace period is cut off. */
  stop(graceMs: number): void;
}

/** Computes one scenario in a thread of its own, which knows no database and no secrets. */
export function runInWorker(
  entry: URL,
  scenario: unknown,
  onProgress: (fraction: number, step: string) => void,
): RunningWork {
  const stopFlag = new SharedArrayBuffer(4);
  const workerData: WorkOrder = { scenario, stopFlag };
  // execArgv and env are emptied so that the thread inherits neither the loader's flags nor the settings.
  const worker = new Worker(entry, { workerData, execArgv: [], env: {} });
  let cutOff: NodeJS.Timeout | undefined;

  const outcome = new Promise<Outcome>((settle) => {
    worker.on('message', (message: WorkerMessage) => {
      if (message.type === 'progress') onProgress(message.fraction, message.step);
      else if (message.type === 'done') settle({ kind: 'done', result: message.result });
      else if (message.type === 'stopped') settle({ kind: 'stopped' });
      else settle({ kind: 'failed', failure: message.failure });
    });
    worker.on('error', (error) => settle({ kind: 'failed', failure: crashed(error.stack ?? error.message) }));
    worker.on('exit', (code) => {
      clearTimeout(cutOff);
      const wasAsked = new Int32Array(stopFlag)[0] === 1;
      settle(
        wasAsked ? { kind: 'stopped' } : { kind: 'failed', failure: crashed(`worker left with ${code}`) },
      );
    });
  });
  return {
    outcome,
    stop(graceMs) {
      const flag = new Int32Array(stopFlag);
      Atomics.store(flag, 0, 1);
      Atomics.notify(flag, 0);
      cutOff ??= setTimeout(() => void worker.terminate(), graceMs);
    },
  };
}
