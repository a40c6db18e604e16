/** The emitted Python equals the twin, bit for bit, in the real interpreter, and takes nothing from the heap. */
import { describe, expect, it } from 'vitest';
import { renderFirmware } from '../../src/firmware/render.js';
import { SHEET, cart, quickDesign } from '../firmware/cart.js';
import { MICROPYTHON_CARTS } from '../firmware/micropython-carts.js';
import { runInMicroPython } from './micropython-program.js';
import { firstDifference, reference } from './reference.js';

const STEPS = 10_000;

describe('MicroPython equals the twin', () => {
  it.each(Object.keys(MICROPYTHON_CARTS))('%s', async (name) => {
    const design = quickDesign(cart(MICROPYTHON_CARTS[name]));
    const files = await renderFirmware(SHEET, design);
    const wanted = reference(design, STEPS, 11);
    const got = await runInMicroPython(files, wanted.input, wanted.expected.length);
    expect(firstDifference(wanted, got)).toBeUndefined();
  });
});
