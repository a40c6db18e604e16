/**
 * The emitted C++ equals the twin, bit for bit, as the AVR compiler makes it: with int of 16 bits, on an emulated ATmega328P. The
 * time of a control step is measured on the way.
 */
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { controlS } from '../../src/design/delay.js';
import { renderFirmware } from '../../src/firmware/render.js';
import { CARTS, SHEET, cart, quickDesign } from '../firmware/cart.js';
import { runOnChip } from './chip-program.js';
import { compileForChip } from './compile.js';
import { firstDifference, reference } from './reference.js';

const STEPS = 10_000;
const CYCLES_PER_S = 16e6;

let folder: string;
beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), 'fairlead-parity-'));
});
afterAll(() => rmSync(folder, { recursive: true }));

describe('C++ on the chip equals the twin', () => {
  it.each(Object.keys(CARTS))('%s', async (name) => {
    const vehicle = cart(CARTS[name]);
    const design = quickDesign(vehicle);
    const program = compileForChip(await renderFirmware(SHEET, design), join(folder, name));
    const wanted = reference(design, STEPS, 12);
    const { numbers, stepCycles } = runOnChip(program, wanted.input);
    expect(firstDifference(wanted, numbers)).toBeUndefined();
    // What the design counts on as the worst case of the control arithmetic.
    expect(Math.max(...stepCycles) / CYCLES_PER_S).toBeLessThan(controlS(vehicle));
  });
});
