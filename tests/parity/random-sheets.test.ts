/**
 * Twin = C++ = MicroPython, bit for bit, on random sound sheets of all features; the C++ on the host under the sanitisers for undefined
 * behaviour and for addresses, and the first steps of each sheet on the emulated chip too.
 *
 * FAIRLEAD_PARITY_SHEETS names another number of sheets: `npm run bench -- parity` takes 200, which is 10^6 steps.
 */
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import fc from 'fast-check';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { overflows } from '../../src/design/intervals.js';
import { renderFirmware } from '../../src/firmware/render.js';
import { checkSheet } from '../../src/sheet/check.js';
import { toVehicle } from '../../src/sheet/to-vehicle.js';
import { SHEET, quickDesign } from '../firmware/cart.js';
import { validSheets } from '../properties/valid-sheets.js';
import { runOnChip } from './chip-program.js';
import { compileForChip } from './compile.js';
import { runOnHost } from './host-program.js';
import { runInMicroPython } from './micropython-program.js';
import { firstDifference, reference } from './reference.js';

const SHEETS = Number(process.env['FAIRLEAD_PARITY_SHEETS'] ?? 24);
const STEPS = 5000;
/** Fewer on the chip, which is emulated instruction by instruction. */
const CHIP_STEPS = 500;
const SEED = 8;
const LONGEST_MS_PER_SHEET = 10_000;

let folder: string;
beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), 'fairlead-parity-'));
});
afterAll(() => rmSync(folder, { recursive: true }));

describe('the language of the sheet equals the twin', () => {
  const sheets = fc.sample(validSheets, { numRuns: SHEETS, seed: SEED });
  const title = `on ${SHEETS} random sheets, ${STEPS * SHEETS} steps (at night 200 sheets, ${200 * STEPS} steps)`;

  it(title, { timeout: LONGEST_MS_PER_SHEET * SHEETS }, async () => {
    for (const [i, given] of sheets.entries()) {
      const { sheet } = checkSheet(given);
      const vehicle = toVehicle(sheet!);
      const design = quickDesign(vehicle);
      const shown = JSON.stringify(given);
      expect(overflows(design.controller, vehicle.board.adcMaxCount, vehicle.language), shown).toEqual([]);
      const files = await renderFirmware(SHEET, design);
      const wanted = reference(design, STEPS, SEED + i);
      const got =
        vehicle.language === 'arduino'
          ? runOnHost(files, join(folder, String(i)), wanted.input)
          : await runInMicroPython(files, wanted.input, wanted.expected.length);
      expect(firstDifference(wanted, got), shown).toBeUndefined();
      if (vehicle.language === 'arduino') {
        const start = reference(design, CHIP_STEPS, SEED + i);
        const { numbers } = runOnChip(compileForChip(files, join(folder, `chip-${i}`)), start.input);
        expect(firstDifference(start, numbers), shown).toBeUndefined();
      }
    }
  });

  it('has both languages, both controllers, encoders, rules by hand, an integral part and sweeps among them', () => {
    const has = (what: (sheet: (typeof sheets)[number]) => boolean): boolean => sheets.some(what);
    expect(has(({ target }) => target.language === 'arduino')).toBe(true);
    expect(has(({ target }) => target.language === 'micropython')).toBe(true);
    expect(has(({ encoders }) => encoders?.channels === 'single')).toBe(true);
    expect(has(({ encoders }) => encoders?.channels === 'quadrature')).toBe(true);
    expect(has(({ control }) => control.overrides !== undefined)).toBe(true);
    expect(has(({ control }) => control.integral === 'always')).toBe(true);
    expect(has(({ sensors }) => sensors.calibration?.mode === 'sweep')).toBe(true);
    expect(has(({ sensors }) => sensors.kind === 'digital')).toBe(true);
  });
});
