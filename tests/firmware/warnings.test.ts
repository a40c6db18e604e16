/**
 * The compiler has nothing to say about whole sketches, under -Wall -Wextra -Wconversion -Wshadow and against the real core. On
 * random sheets: tests/properties/render.test.ts.
 */
import { describe, expect, it } from 'vitest';
import { renderFirmware } from '../../src/firmware/render.js';
import { buildSketch } from '../../src/rehearsal/chip-build.js';
import { CARTS, SHEET, cart, quickDesign } from './cart.js';

describe('the compiler does not warn about', () => {
  it.each(Object.keys(CARTS))('%s', async (name) => {
    const vehicle = cart(CARTS[name]);
    const files = await renderFirmware(SHEET, quickDesign(vehicle));
    expect((await buildSketch(files, vehicle.board.id)).warnings).toEqual([]);
  });
});

it.each([
  ['a number that may not fit', 'char shortened(int number) { return number; }', 'Wconversion'],
  ['a name that hides another', 'int name;\nint hiding() { int name = 1; return name; }', 'Wshadow'],
  ['a function that nobody calls', 'namespace { void idle() {} }', 'Wunused-function'],
  ['a parameter that is not looked at', 'void deaf(int word) {}', 'Wunused-parameter'],
])('it would warn about %s', async (_, text, flag) => {
  const files = await renderFirmware(SHEET, quickDesign(cart()));
  const planted = { path: 'tray-cart/planted.cpp', text: `${text}\n`, owner: 'tool' as const };
  const { warnings } = await buildSketch([...files, planted], 'uno');
  expect(warnings.length).toBeGreaterThan(0);
  for (const warning of warnings) expect(warning).toMatch(new RegExp(`^planted\\.cpp:.*-${flag}`));
});
