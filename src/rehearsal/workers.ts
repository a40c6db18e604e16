/**
 * Drives the runs of a study on several cores: worker threads take short ranges of seeds from one queue. A run is a pure function
 * of study and seed, so the results are the same for any number of workers and whichever of them drives what.
 */
import { existsSync } from 'node:fs';
import { Worker } from 'node:worker_threads';
import { Lane } from '../course/lane.js';
import type { RunResult } from './engine.js';
import { engineFrom } from './engine-parts.js';
import { runSetup } from './runner.js';
import type { Study } from './study.js';

/** Seeds from `first` on, so many. */
export interface SeedRange {
  first: number;
  runs: number;
}

export interface DriveOptions {
  /** Worker threads at most; 1 drives in this thread. */
  jobs: number;
  /** Called whenever runs have been driven, with their number so far. */
  onRuns?: (done: number) => void;
  /** Ends the work; the promise is rejected with the signal's reason. */
  signal?: AbortSignal;
}

/** Runs that a worker takes at a time: few enough to share evenly, enough to make a message worth it. */
const MOST_AT_A_TIME = 25;
const TURNS_PER_WORKER = 8;
/** Fewer runs than this are not worth the start of a thread: the twin drives one in some milliseconds. */
const LEAST_RUNS: Readonly<Record<Study['parts']['name'], number>> = { twin: 40, chip: 2, micropython: 2 };

/** The compiled worker beside this module, or from the sources in the build. */
function workerUrl(): URL | undefined {
  const url = new URL(
    import.meta.url.endsWith('.ts') ? '../../dist/rehearsal/worker.js' : './worker.js',
    import.meta.url,
  );
  return existsSync(url) ? url : undefined;
}

/** Drives one range in this thread. */
export async function driveRange(
  study: Study,
  { first, runs }: SeedRange,
  onRuns?: (done: number) => void,
  signal?: AbortSignal,
): Promise<RunResult[]> {
  const { parts, course, laps, faults } = study;
  const engine = await engineFrom(parts);
  const lane = new Lane(course);
  const results: RunResult[] = [];
  for (let i = 0; i < runs; i++) {
    signal?.throwIfAborted();
    results.push(await engine.run(runSetup(parts.vehicle, lane, first + i, laps, false, faults)));
    onRuns?.(results.length);
    // a moment for signals and progress
    if (signal) await new Promise((resolve) => setImmediate(resolve));
  }
  return results;
}

/** Drives all runs and gives their results in the order of the seeds; no traces are kept. */
export async function driveStudy(
  study: Study,
  seeds: SeedRange,
  options: DriveOptions,
): Promise<RunResult[]> {
  const url = workerUrl();
  const jobs = Math.min(options.jobs, seeds.runs);
  if (url === undefined || jobs < 2 || seeds.runs < LEAST_RUNS[study.parts.name]) {
    return driveRange(study, seeds, options.onRuns, options.signal);
  }
  return driveOnWorkers(url, study, seeds, { ...options, jobs });
}

async function driveOnWorkers(
  url: URL,
  study: Study,
  { first, runs }: SeedRange,
  { jobs, onRuns, signal }: DriveOptions,
): Promise<RunResult[]> {
  const results = new Array<RunResult>(runs);
  const atATime = Math.max(1, Math.min(MOST_AT_A_TIME, Math.floor(runs / jobs / TURNS_PER_WORKER)));
  let [given, done] = [0, 0];
  const workers = Array.from({ length: jobs }, () => new Worker(url, { workerData: study }));
  const work = (worker: Worker): Promise<void> =>
    new Promise((resolve, reject) => {
      const next = (): void => {
        if (given >= runs) {
          resolve();
          return;
        }
        const range = { first: first + given, runs: Math.min(atATime, runs - given) };
        given += range.runs;
        worker.postMessage(range);
      };
      worker.on('message', ({ range, driven }: { range: SeedRange; driven: RunResult[] }) => {
        driven.forEach((result, i) => (results[range.first - first + i] = result));
        done += driven.length;
        onRuns?.(done);
        next();
      });
      worker.on('error', reject);
      worker.on('exit', () => reject(new Error('A worker thread ended before its work.')));
      next();
    });
  const aborted = new Promise<never>((_, reject) => {
    const stop = (): void => reject(signal?.reason as Error);
    if (signal?.aborted) stop();
    signal?.addEventListener('abort', stop, { once: true });
  });
  try {
    await Promise.race([Promise.all(workers.map(work)), aborted]);
  } finally {
    for (const worker of workers) worker.removeAllListeners('exit');
    await Promise.all(workers.map((worker) => worker.terminate()));
  }
  return results;
}
