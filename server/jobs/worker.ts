import { parentPort, workerData } from 'node:worker_threads';

import { StoppedError } from '../../models/errors';
import { planScenario } from '../../models/scenario/plan-scenario';
import { readScenario } from '../../models/scenario/read-scenario';
import { failureOf } from './failure';
import type { WorkerMessage, WorkOrder } from './messages';

/** More often than this nobody can see it. */
const PROGRESS_EVERY_S = 0.1;

const { scenario, stopFlag } = workerData as WorkOrder;
const stop = new Int32Array(stopFlag);
const send = (message: WorkerMessage) => parentPort!.postMessage(message);
const now = () => performance.now() / 1000;
let lastSentS = -Infinity;

try {
  const result = await planScenario(readScenario(scenario), {
    now,
    shouldStop: () => Atomics.load(stop, 0) === 1,
    onProgress(fraction, step) {
      if (now() - lastSentS < PROGRESS_EVERY_S) return;
      lastSentS = now();
      send({ type: 'progress', fraction, step });
    },
  });
  send({ type: 'done', result });
} catch (error) {
  send(error instanceof StoppedError ? { type: 'stopped' } : { type: 'failed', failure: failureOf(error) });
}
