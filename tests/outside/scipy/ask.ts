/** Asks Debian's Python with scipy: all cases at once, JSON in, JSON out. */
import { spawnSync } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import { howToInstall, missingForTests } from '../../../bin/toolchain.js';
import type { Cases } from './cases.js';

/** The system's own interpreter, for which Debian's packages are; another one in front of it on PATH does not have them. */
const PYTHON = '/usr/bin/python3';

export interface Answers {
  plants: {
    wholeDelay: number;
    phi: number[][];
    gamma0: number[];
    gamma1: number[];
    phiByC2d: number[][];
    gammaByC2d: number[][];
    responses: [number, number][];
  }[];
  /** null where the loop never crosses the axis or the circle. */
  loops: { gainMargin: number | null; phaseMarginDeg: number | null; ms: number; radius: number }[];
  staircases: number[];
}

export function askScipy(cases: Cases): Answers {
  const missing = missingForTests().filter((name) => name.startsWith('python3'));
  if (missing.length > 0) throw new Error(howToInstall(missing));
  const script = fileURLToPath(new URL('reference.py', import.meta.url));
  // -B: no compiled files beside the sources
  const result = spawnSync(PYTHON, ['-B', script], {
    input: JSON.stringify(cases),
    encoding: 'utf8',
    maxBuffer: 2 ** 26,
  });
  if (result.status !== 0) throw new Error(`${PYTHON} ${script} failed: ${result.stderr}`);
  return JSON.parse(result.stdout) as Answers;
}
