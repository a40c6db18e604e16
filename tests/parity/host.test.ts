/** The emitted C++ equals the twin, bit for bit, on this machine, with undefined behaviour as a fault. */
import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import fc from 'fast-check';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { renderFirmware } from '../../src/firmware/render.js';
import { checkSheet } from '../../src/sheet/check.js';
import { toVehicle } from '../../src/sheet/to-vehicle.js';
import type { Vehicle } from '../../src/vehicle/vehicle.js';
import { CARTS, SHEET, cart, quickDesign } from '../firmware/cart.js';
import { validSheets } from '../properties/valid-sheets.js';
import { compileForHost } from './compile.js';
import { FIELDS, firstDifference, reference } from './reference.js';

const STEPS = 30_000;

let folder: string;
beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), 'fairlead-parity-'));
});
afterAll(() => rmSync(folder, { recursive: true }));

/** Compiles the law of a vehicle, drives it with a trace, and compares it with the twin. */
async function compare(vehicle: Vehicle, label: string, steps: number): Promise<void> {
  const design = quickDesign(vehicle);
  const program = compileForHost(await renderFirmware(SHEET, design), join(folder, label));
  const wanted = reference(design, steps, 11);
  const { status, stdout, stderr } = spawnSync(program, {
    input: new Uint8Array(wanted.input.buffer),
    maxBuffer: 2 ** 28,
  });
  expect(stderr.toString()).toBe('');
  expect(status).toBe(0);
  const bytes = new Uint8Array(stdout);
  expect(firstDifference(wanted, new Int32Array(bytes.buffer, 0, bytes.length / 4))).toBeUndefined();
}

describe('C++ on the host equals the twin', () => {
  it.each(Object.keys(CARTS))('%s', async (name) => {
    await compare(cart(CARTS[name]), name, STEPS);
  });

  const sketches = fc
    .sample(validSheets, { numRuns: 60, seed: 4 })
    .filter(({ target }) => target.language === 'arduino');

  it.each(['pid', 'rules'] as const)('six random sound sheets with %s', async (kind) => {
    const sheets = sketches.filter(({ control }) => control.kind === kind).slice(0, 6);
    expect(sheets).toHaveLength(6);
    for (const [i, given] of sheets.entries()) {
      const { sheet } = checkSheet(given);
      await compare(toVehicle(sheet!), `${kind}-${i}`, STEPS);
    }
  });
});

describe('the traces', () => {
  it('take the controller through every phase and every class', () => {
    const { expected } = reference(quickDesign(cart()), STEPS, 11);
    const seen = (field: (typeof FIELDS)[number]) =>
      new Set(expected.filter((_value, i) => i % FIELDS.length === FIELDS.indexOf(field)));
    expect([...seen('phase')].sort()).toEqual([0, 1, 2, 3, 4]);
    expect(seen('class').size).toBe(quickDesign(cart()).classes.length);
    expect(seen('dutyLeft')).toContain(4096);
  });

  it('would show a difference', () => {
    const wanted = reference(quickDesign(cart()), 100, 11);
    const other = Int32Array.from(wanted.expected);
    other[FIELDS.length * 42 + 3]! += 1;
    expect(firstDifference(wanted, other)).toMatch(/^step 42, curvature: /);
    expect(firstDifference(wanted, other.subarray(0, 10 * FIELDS.length))).toMatch(/instead of|numbers, not/);
  });
});
