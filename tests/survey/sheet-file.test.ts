import { describe, expect, it } from 'vitest';
import { changesBetween, nameFrom, sheetText } from '../../src/survey/sheet-file.js';

describe('changesBetween', () => {
  it('names each value by its title, with its unit', () => {
    const before = {
      target: { board: 'uno' },
      line: { widthMm: 19 },
      sensors: { pins: ['A0', 'A1'], calibration: { mode: 'stored' } },
      drive: { driver: { left: { pwm: 9 }, right: { pwm: 10 } } },
    };
    const after = {
      target: { board: 'pico' },
      line: { widthMm: 25 },
      sensors: { pins: ['GP7', 'GP8'], lineLevel: 'high' },
      drive: { driver: { left: { pwm: 'GP0' }, right: { pwm: 10 } } },
    };
    expect(changesBetween(before, after)).toEqual([
      'Board: uno -> pico',
      'Line width: 19 mm -> 25 mm',
      'Sensor pins: A0 A1 -> GP7 GP8',
      'Calibration mode: stored -> not given',
      'Left motor, PWM pin: 9 -> GP0',
      'Level over the line: not given -> high',
    ]);
    expect(changesBetween(after, after)).toEqual([]);
  });

  it('sends nothing to the terminal but text, whatever an old sheet holds', () => {
    expect(changesBetween({ name: '\u001b[2J', '\u0007': 1 }, { name: 'cart' })).toEqual([
      'Vehicle name: \\u{1b}[2J -> cart',
      '/\\u{7}: 1 -> not given',
    ]);
  });
});

describe('nameFrom', () => {
  it.each([
    ['carts/bench-cart.json', 'bench-cart'],
    ['cart', 'cart'],
    ['2nd cart.json', undefined],
    ['.json', undefined],
  ])('%s suggests %s', (file, name) => {
    expect(nameFrom(file)).toBe(name);
  });
});

describe('sheetText', () => {
  it('ends with a line end and reads back', async () => {
    const sheet = { name: 'cart', sensors: { pins: ['A0', 1] } };
    const text = await sheetText(sheet);
    expect(text.endsWith('}\n')).toBe(true);
    expect(JSON.parse(text)).toEqual(sheet);
  });
});
