/** The emitted C++ equals the twin, bit for bit, on this machine, with undefined behaviour and access out of bounds as faults. */
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { renderFirmware } from '../../src/firmware/render.js';
import { CARTS, SHEET, cart, quickDesign } from '../firmware/cart.js';
import { runOnHost } from './host-program.js';
import { FIELDS, firstDifference, reference } from './reference.js';

const STEPS = 30_000;

let folder: string;
beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), 'fairlead-parity-'));
});
afterAll(() => rmSync(folder, { recursive: true }));

describe('C++ on the host equals the twin', () => {
  it.each(Object.keys(CARTS))('%s', async (name) => {
    const design = quickDesign(cart(CARTS[name]));
    const wanted = reference(design, STEPS, 11);
    const got = runOnHost(await renderFirmware(SHEET, design), join(folder, name), wanted.input);
    expect(firstDifference(wanted, got)).toBeUndefined();
  });
});

describe('the host reports', () => {
  it.each([
    [
      'a sum that leaves 32 bits',
      'steering.speedQ29 += 0x7f000000L;',
      /harness ended with .*signed integer overflow/,
    ],
    [
      'a number cut to 16 bits',
      'lag = static_cast<int16_t>(lag + 32767 + (lag <= 0));',
      /-?\d+ does not fit its type/,
    ],
    [
      'a shift too far',
      'steering.speedQ29 = 1L << (steering.speedQ29 + 70);',
      /harness ended with .*shift exponent/,
    ],
    [
      'a place just behind a table',
      'lag = (&SPEED_CLASSES[CLASS_COUNT - 1].curvaturePerMQ8)[lag * 0 + sizeof(SpeedClass) / 2];',
      /harness ended with .*insufficient space/,
    ],
    [
      'a place behind a store, by a pointer',
      'static int16_t store[4]; int16_t* volatile place = store; lag = place[4];',
      /harness ended with [^]*global-buffer-overflow/,
    ],
  ])('%s, planted in the control law', async (_, planted, words) => {
    const design = quickDesign(cart());
    const begin = 'void advance() {\n';
    const files = (await renderFirmware(SHEET, design)).map((file) => ({
      ...file,
      text: file.text.replace(begin, `${begin}  ${planted}\n`),
    }));
    expect(files.some(({ text }) => text.includes(planted))).toBe(true);
    const { input } = reference(design, 100, 11);
    expect(() =>
      runOnHost(files, join(folder, `planted-${words.source.replaceAll(/\W/g, '')}`), input),
    ).toThrow(words);
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
