#!/usr/bin/env node
// `npm test`: set-up with the toolchain, then vitest with the arguments given (`npm test -- tests/course`).
import { spawnSync } from 'node:child_process';
import { join } from 'node:path';
import { build, dependencies, root, setUp, toolchain } from './set-up.js';

await setUp(dependencies, build, toolchain);
const vitest = join(root, 'node_modules', 'vitest', 'vitest.mjs');
const result = spawnSync(process.execPath, [vitest, 'run', ...process.argv.slice(2)], {
  cwd: root,
  stdio: 'inherit',
});
process.exitCode = result.status ?? 1;
