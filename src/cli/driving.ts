/** Driving many runs from the command line: over all cores, with the time left on the terminal, and an orderly end at Ctrl-C. */
import { availableParallelism } from 'node:os';
import type { RunResult } from '../rehearsal/engine.js';
import type { Study } from '../rehearsal/study.js';
import { driveStudy, type SeedRange } from '../rehearsal/workers.js';
import { EXIT, FairleadError } from '../sheet/problem.js';
import type { Io } from './io.js';

/** Time between two lines of progress, ms. */
const PROGRESS_MS = 100;
/** Time left is told once so much time has passed, s. */
const GUESS_AFTER_S = 1;

/**
 * @param jobs worker threads; by default one for each core
 * @param what is driven, for the progress
 */
export async function driveAll(
  study: Study,
  seeds: SeedRange,
  jobs: number | undefined,
  io: Io,
  what = 'driving',
): Promise<RunResult[]> {
  const { runs } = seeds;
  let driven = 0;
  const show = progressOf(runs, io, what);
  const stop = new AbortController();
  const interrupt = (): void => {
    const message = `Interrupted after ${driven} of ${runs} runs; nothing was written.`;
    stop.abort(new FairleadError(message, { exitCode: EXIT.interrupted }));
  };
  // a single run holds this thread: there the signal's own way, the end of the process, is the quick one
  if (runs > 1) process.once('SIGINT', interrupt);
  try {
    return await driveStudy(study, seeds, {
      jobs: jobs ?? availableParallelism(),
      signal: stop.signal,
      onRuns: (done) => show((driven = done)),
    });
  } finally {
    process.removeListener('SIGINT', interrupt);
    io.progress('');
  }
}

function progressOf(runs: number, io: Io, what: string): (done: number) => void {
  const begun = performance.now();
  let next = 0;
  return (done) => {
    const now = performance.now();
    if (now < next) return;
    next = now + PROGRESS_MS;
    const passedS = (now - begun) / 1e3;
    const left = passedS < GUESS_AFTER_S ? '' : `, ${timeWords((passedS / done) * (runs - done))} left`;
    io.progress(`${what}: ${done} of ${runs} runs${left}`);
  };
}

function timeWords(timeS: number): string {
  const seconds = Math.ceil(timeS);
  return seconds < 100 ? `${seconds} s` : `${Math.ceil(seconds / 60)} min`;
}
