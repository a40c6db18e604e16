/** Integers of the control law: what each language's machine word holds. */
import { expect, test } from 'vitest';
import { overflows } from '../../src/design/intervals.js';
import { cart, quickDesign } from '../firmware/cart.js';

const { controller } = quickDesign(cart());
/** The largest gain whose product with a reading stays within a number of bits. */
const most = (bits: number) => Math.floor(2 ** bits / 1023);

function named(gain: number, language: 'arduino' | 'micropython'): string[] {
  const sensing = { ...controller.sensing, gain: [gain] };
  return overflows({ ...controller, sensing }, 1023, language).map(({ name }) => name);
}

test('the demo cart fits both languages', () => {
  expect(overflows(controller, 1023, 'arduino')).toEqual([]);
  expect(overflows(controller, 1023, 'micropython')).toEqual([]);
});

test('MicroPython has one bit less than C++', () => {
  const product = 'reading times calibration gain';
  expect(named(most(30) - 1, 'micropython')).not.toContain(product);
  expect(named(most(30) + 1, 'micropython')).toContain(product);
  expect(named(most(31) - 1, 'arduino')).not.toContain(product);
  expect(named(most(31) + 1, 'arduino')).toContain(product);
});

test('an offset beyond 16 bits is named with its limit', () => {
  const sensing = { ...controller.sensing, halfLine: 32768 };
  expect(overflows({ ...controller, sensing }, 1023, 'micropython')).toEqual([
    expect.objectContaining({ name: 'offset', limit: 32767 }),
  ]);
});
