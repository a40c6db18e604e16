/** Integers of the control law: what each language's machine word holds. */
import { expect, test } from 'vitest';
import { overflows } from '../../src/design/intervals.js';
import { cart, quickDesign } from '../firmware/cart.js';

const { controller } = quickDesign(cart());
/** The largest wheel speed whose product with a 16-bit curvature stays within a number of bits. */
const fastest = (bits: number) => Math.floor(2 ** bits / 32767);

function named(wheelLimit: number, language: 'arduino' | 'micropython'): string[] {
  const faster = { ...controller, drive: { ...controller.drive, wheelLimit } };
  return overflows(faster, 1023, language).map(({ name }) => name);
}

test('the demo cart fits both languages', () => {
  expect(overflows(controller, 1023, 'arduino')).toEqual([]);
  expect(overflows(controller, 1023, 'micropython')).toEqual([]);
});

test('MicroPython has one bit less than C++', () => {
  expect(named(fastest(30) - 1, 'micropython')).not.toContain('speed times curvature');
  expect(named(fastest(30) + 1, 'micropython')).toContain('speed times curvature');
  expect(named(fastest(31) - 1, 'arduino')).not.toContain('speed times curvature');
  expect(named(fastest(31) + 1, 'arduino')).toContain('speed times curvature');
});

test('an offset beyond 16 bits is named with its limit', () => {
  const sensing = { ...controller.sensing, halfLine: 32768 };
  expect(overflows({ ...controller, sensing }, 1023, 'micropython')).toEqual([
    expect.objectContaining({ name: 'offset', limit: 32767 }),
  ]);
});
