import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, expect, it } from 'vitest';
import { howToInstall, missingForTests, missingTools } from '../../bin/toolchain.js';

let emptyFolder = '';
beforeEach(() => (emptyFolder = mkdtempSync(join(tmpdir(), 'fairlead-path-'))));
afterEach(() => rmSync(emptyFolder, { recursive: true }));

it('finds the toolchain that `npm test` has installed', () => {
  expect(missingForTests()).toEqual([]);
});

it('asks of a rehearsal on the chip only what the chip needs', () => {
  const path = process.env['PATH'];
  process.env['PATH'] = emptyFolder;
  const [forChip, forTests] = [missingTools(), missingForTests()];
  process.env['PATH'] = path;
  expect(forChip).toEqual(['gcc-avr', 'g++']);
  expect(forTests).toEqual(['gcc-avr', 'g++', 'cppcheck', 'tmux', 'parallel']);
});

it('says exactly what to type', () => {
  expect(howToInstall(['gcc-avr', 'avr-libc'])).toBe(
    'missing: gcc-avr, avr-libc. On Debian or Ubuntu, type: sudo apt-get update && sudo apt-get install gcc-avr avr-libc',
  );
});

it('ends with exit 5 where tools are missing and nothing can install them', () => {
  const setUp = new URL('../../bin/set-up.js', import.meta.url).href;
  const code = `import(${JSON.stringify(setUp)}).then(({ setUp, toolchain }) => setUp(toolchain))`;
  const { status, stdout, stderr } = spawnSync(process.execPath, ['-e', code], {
    env: { PATH: emptyFolder },
    encoding: 'utf8',
  });
  expect(status).toBe(5);
  expect(stdout).toBe('');
  expect(stderr).toMatch(
    /^set-up: missing: gcc-avr, .*type: sudo apt-get update && sudo apt-get install gcc-avr .*\n$/,
  );
});
