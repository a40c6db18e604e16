/** The emitted C++ equals the twin, bit for bit, on this machine, with undefined behaviour as a fault. */
import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { renderFirmware } from '../../src/firmware/render.js';
import { CARTS, SHEET, cart, quickDesign } from '../firmware/cart.js';
import { compileForHost } from './compile.js';
import { firstDifference, reference } from './reference.js';

const STEPS = 30_000;

let folder: string;
beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), 'fairlead-parity-'));
});
afterAll(() => rmSync(folder, { recursive: true }));

describe.concurrent('C++ on the host equals the twin', () => {
  it.each(Object.keys(CARTS))('%s', async (name) => {
    const design = quickDesign(cart(CARTS[name]));
    const program = compileForHost(await renderFirmware(SHEET, design), join(folder, name));
    const wanted = reference(design, STEPS, 11);
    const { status, stdout, stderr } = spawnSync(program, {
      input: new Uint8Array(wanted.input.buffer),
      maxBuffer: 2 ** 28,
    });
    expect(stderr.toString()).toBe('');
    expect(status).toBe(0);
    const bytes = new Uint8Array(stdout);
    expect(firstDifference(wanted, new Int32Array(bytes.buffer, 0, bytes.length / 4))).toBeUndefined();
  });
});
