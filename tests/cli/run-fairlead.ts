/** Starts the real command line, as a person would, and collects what it says. */
import { spawn, type ChildProcess } from 'node:child_process';
import { text } from 'node:stream/consumers';
import { fileURLToPath } from 'node:url';

export const ROOT = fileURLToPath(new URL('../..', import.meta.url));
const ENTRY = fileURLToPath(new URL('../../bin/fairlead.js', import.meta.url));

export interface Outcome {
  exitCode: number | null;
  stdout: string;
  stderr: string;
}

export interface Surroundings {
  environment?: Record<string, string>;
  folder?: string;
}

/** Starts `fairlead` with no terminal anywhere: stdin is empty, stdout and stderr are pipes. */
export function startFairlead(
  words: readonly string[],
  { environment = {}, folder = ROOT }: Surroundings = {},
) {
  return spawn(process.execPath, [ENTRY, ...words], {
    cwd: folder,
    env: { ...process.env, DEBUG: '', ...environment },
    stdio: ['ignore', 'pipe', 'pipe'],
  });
}

export function exitOf(child: ChildProcess): Promise<number | null> {
  return new Promise((resolve, reject) => {
    child.once('error', reject);
    child.once('close', resolve);
  });
}

/** Runs `fairlead` to its end. */
export async function runFairlead(words: readonly string[], surroundings?: Surroundings): Promise<Outcome> {
  const child = startFairlead(words, surroundings);
  const [stdout, stderr, exitCode] = await Promise.all([
    text(child.stdout),
    text(child.stderr),
    exitOf(child),
  ]);
  return { exitCode, stdout, stderr };
}
