// Twin = C++ = MicroPython, bit for bit, at the size for the night: 200 random sheets, 10^6 steps
// (tests/parity/random-sheets.test.ts; the suite takes fewer sheets). FAIRLEAD_PARITY_SHEETS names another number.
import { spawnSync } from 'node:child_process';

const test = 'tests/parity/random-sheets.test.ts';
const { status } = spawnSync('npx', ['vitest', 'run', test, '--maxWorkers=1'], {
  stdio: 'inherit',
  env: { FAIRLEAD_PARITY_SHEETS: '200', ...process.env },
});
process.exitCode = status ?? 1;
