/** A worker thread: drives the ranges of seeds that it is sent, of the study that it was started with. */
import { parentPort, workerData } from 'node:worker_threads';
import type { Study } from './study.js';
import { driveRange, type SeedRange } from './workers.js';

parentPort?.on('message', (range: SeedRange) => {
  void driveRange(workerData as Study, range).then(
    (driven) => parentPort?.postMessage({ range, driven }),
    // an uncaught failure reaches the parent as the worker's error
    (error: unknown) =>
      queueMicrotask(() => {
        throw error;
      }),
  );
});
