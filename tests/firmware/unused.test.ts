/** Emitted code holds nothing that its vehicle does not use: no function, constant, include or import, in both languages. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { renderFirmware } from '../../src/firmware/render.js';
import { checkSheet } from '../../src/sheet/check.js';
import { toVehicle } from '../../src/sheet/to-vehicle.js';
import type { Vehicle } from '../../src/vehicle/vehicle.js';
import { validSheets } from '../properties/valid-sheets.js';
import { CARTS, SHEET, cart, quickDesign } from './cart.js';
import { MICROPYTHON_CARTS } from './micropython-carts.js';
import { unusedInCpp, unusedInPython } from './unused-names.js';

const SHEETS = 100;

async function unused(vehicle: Vehicle, change = (text: string) => text): Promise<string[]> {
  const rendered = await renderFirmware(SHEET, quickDesign(vehicle));
  const files = rendered.map((file) => ({ ...file, text: change(file.text) }));
  return vehicle.language === 'arduino' ? unusedInCpp(files) : unusedInPython(files);
}

describe('nothing is left over for', () => {
  it.each(Object.entries({ ...CARTS, ...MICROPYTHON_CARTS }))('%s', async (_, changes) => {
    expect(await unused(cart(changes))).toEqual([]);
  });

  it(`${SHEETS} random sheets`, { timeout: 120_000 }, async () => {
    for (const given of fc.sample(validSheets, { numRuns: SHEETS, seed: 14 })) {
      expect(await unused(toVehicle(checkSheet(given).sheet!)), JSON.stringify(given)).toEqual([]);
    }
  });
});

describe('what is left over is told', () => {
  it.each([
    ['a constant', 'namespace {', 'constexpr int16_t LEFT_OVER = 3;\nnamespace {', 'LEFT_OVER'],
    [
      'a function',
      '#include "motors.h"',
      '#include "motors.h"\nint16_t leftOver(int16_t a) {\n  return a;\n}',
      'leftOver',
    ],
    [
      'an include',
      '#include "motors.h"',
      '#include "motors.h"\n#include <avr/pgmspace.h>',
      'tray-cart.ino: <avr/pgmspace.h>',
    ],
  ])('C++: %s', async (_, from, to, name) => {
    expect(await unused(cart(), (text) => text.replace(from, to))).toContain(name);
  });

  it.each([
    ['a constant', 'import motors', 'import motors\n\nLEFT_OVER = 3', 'LEFT_OVER'],
    [
      'a method',
      '    def pressed(self):',
      '    def left_over(self):\n        return 1\n\n    def pressed(self):',
      'left_over',
    ],
    ['an import', 'import gc', 'import gc\nimport os', 'supervisor.py: import os'],
    [
      'an attribute',
      '        self._differs = 0\n',
      '        self._differs = 0\n        self._left_over = 0\n',
      '_left_over',
    ],
  ])('Python: %s', async (_, from, to, name) => {
    const changes = Object.values(MICROPYTHON_CARTS)[0];
    expect(await unused(cart(changes), (text) => text.replace(from, to))).toContain(name);
  });
});
