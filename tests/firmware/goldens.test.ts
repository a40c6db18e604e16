/**
 * Firmware as files that a person can read beside the sheet that gives them (tests/goldens/), and that compile.
 *
 * After a deliberate change: UPDATE_GOLDENS=1 npx vitest run tests/firmware/goldens.test.ts, then read `git diff tests/goldens` as
 * code.
 */
import { describe, expect, it } from 'vitest';
import { buildSketch } from '../../src/rehearsal/chip-build.js';
import { CASES, goldenFiles, renderCase, replaceGolden } from './golden-cases.js';

const BOARDS = ['uno', 'nano'] as const;

/** Sketch limits of the boards: boards.txt of the Arduino AVR core (upload.maximum_size). */
const LARGEST_SKETCH = { uno: 32_256, nano: 30_720 } as const;

describe.each(CASES)('golden %s', (name) => {
  it('is what its sheet gives, byte for byte', async () => {
    const files = await renderCase(name);
    if (process.env['UPDATE_GOLDENS'] === '1') replaceGolden(name, files);
    expect(Object.fromEntries(files.map(({ path, text }) => [path, text]))).toEqual(goldenFiles(name));
  });
});

describe.each(BOARDS)('golden sketches for %s', (board) => {
  it('compile without a warning, and fit', async () => {
    const cases = CASES.filter((name) => name.startsWith(board));
    expect(cases.length).toBeGreaterThan(0);
    for (const name of cases) {
      const files = await renderCase(name);
      const image = await buildSketch(files, board);
      expect(image.warnings).toEqual([]);
      expect(image.flashBytes).toBeLessThan(LARGEST_SKETCH[board] / 2);
      expect(image.ramBytes).toBeLessThan(600);
    }
  });
});
