/** Random sound sheets for MicroPython boards: their program runs on the virtual board, and its control law is the twin's. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { renderFirmware } from '../../src/firmware/render.js';
import { checkSheet } from '../../src/sheet/check.js';
import { toVehicle } from '../../src/sheet/to-vehicle.js';
import { SHEET, quickDesign } from '../firmware/cart.js';
import { drivenFromS, onStand } from '../firmware/micropython-stand.js';
import { runInMicroPython } from '../parity/micropython-program.js';
import { firstDifference, reference } from '../parity/reference.js';
import { validSheets } from './valid-sheets.js';

const SHEETS = 40;
const STEPS = 500;
const PRESSED_S = 0.2;
const STARTED_S = 0.1;

describe('random sound sheets for MicroPython', () => {
  const forPython = validSheets.filter(({ target }) => target.language === 'micropython');
  const designs = fc.sample(forPython, { numRuns: SHEETS, seed: 3 }).map((given) => {
    const { sheet } = checkSheet(given);
    if (sheet === undefined) throw new Error('The sheet is not sound.');
    return quickDesign(toVehicle(sheet));
  });

  it(`start and drive, ${SHEETS} of them`, { timeout: 120_000 }, async () => {
    for (const design of designs) {
      const fromS = PRESSED_S + design.vehicle.start.countdownS;
      const seen = await onStand(design, {
        pressed: [[PRESSED_S, PRESSED_S + 0.1]],
        endS: fromS + STARTED_S,
      });
      expect(seen.end).toMatchObject({ by: 'power-cut', detail: '' });
      expect(drivenFromS(seen)).toBeGreaterThanOrEqual(fromS);
    }
  });

  it(`equal the twin over ${STEPS} steps each, ${SHEETS} of them`, { timeout: 120_000 }, async () => {
    for (const [i, design] of designs.entries()) {
      const wanted = reference(design, STEPS, i);
      const files = await renderFirmware(SHEET, design);
      const got = await runInMicroPython(files, wanted.input, wanted.expected.length);
      expect(firstDifference(wanted, got)).toBeUndefined();
    }
  });
});
