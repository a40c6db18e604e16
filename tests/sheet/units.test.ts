import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import {
  degToRad,
  fractionToPercent,
  isUnit,
  mToMm,
  mmToM,
  msToS,
  parseLength,
  parseQuantity,
  percentToFraction,
  radPerSToRpm,
  radToDeg,
  rpmToRadPerS,
  sToMs,
  type Unit,
} from '../../src/sheet/units.js';

test.each<[name: string, got: number, want: number]>([
  ['mm to m', mmToM(42), 0.042],
  ['m to mm', mToMm(0.042), 42],
  ['ms to s', msToS(80), 0.08],
  ['s to ms', sToMs(0.08), 80],
  ['% to fraction', percentToFraction(10), 0.1],
  ['fraction to %', fractionToPercent(0.1), 10],
  ['deg to rad', degToRad(180), Math.PI],
  ['rad to deg', radToDeg(Math.PI / 2), 90],
  ['rpm to rad/s', rpmToRadPerS(60), 2 * Math.PI],
  ['rad/s to rpm', radPerSToRpm(2 * Math.PI), 60],
])('%s', (_, got, want) => {
  expect(got).toBeCloseTo(want, 12);
});

describe('lengths as people type them, in mm', () => {
  test.each([
    ['65', 65],
    ['65 mm', 65],
    ['6.5 cm', 65],
    ['6,5cm', 65],
    ['0.065m', 65],
    ['.5', 0.5],
    ['2.5in', 63.5],
    ['2.5"', 63.5],
    ['2 1/2 in', 63.5],
    ['2-1/2"', 63.5],
    ['3/8 in', 9.525],
    ['1 ft', 304.8],
    ['1.1 IN', 27.94],
    [' 12 MM ', 12],
    ['-25', -25],
    ['+25 mm', 25],
    ['1e2', 100],
    ['12,5', 12.5],
    ['0,125', 0.125],
    ['1.000', 1],
  ])('%s', (text, want) => {
    expect(parseLength(text)).toEqual({ ok: true, value: want });
  });

  test.each([
    ['', 'Nothing was given; write for example 65, 65 mm, 6.5 cm or 2.5 in.'],
    ['  ', 'Nothing was given; write for example 65, 65 mm, 6.5 cm or 2.5 in.'],
    ['wide', '"wide" is not a number of mm; write for example 65, 65 mm, 6.5 cm or 2.5 in.'],
    ['6 V', '"6 V": the unit "V" does not fit here; use mm, cm, m, in or ft.'],
    ['6.5 cmm', '"6.5 cmm": the unit "cmm" does not fit here; use mm, cm, m, in or ft.'],
    ['1,200', '"1,200" can be read as 1.200 or as 1200; write one of these.'],
    ['12,345 mm', '"12,345 mm" can be read as 12.345 or as 12345; write one of these.'],
    ['1/0 in', '"1/0 in" is not a number of mm; write for example 65, 65 mm, 6.5 cm or 2.5 in.'],
    ['1e999', '"1e999" is not a number of mm; write for example 65, 65 mm, 6.5 cm or 2.5 in.'],
    ['5 constructor', '"5 constructor": the unit "constructor" does not fit here; use mm, cm, m, in or ft.'],
    ['1.2.3', '"1.2.3": the unit ".3" does not fit here; use mm, cm, m, in or ft.'],
  ])('%j is refused', (text, want) => {
    expect(parseLength(text)).toEqual({ ok: false, message: want });
  });
});

test.each<[text: string, unit: Unit, want: number]>([
  ['500 ms', 's', 0.5],
  ['2 min', 's', 120],
  ['0.08 s', 'ms', 80],
  ['6 V', 'V', 6],
  ['7400 mV', 'V', 7.4],
  ['800 mA', 'A', 0.8],
  ['600 g', 'kg', 0.6],
  ['1 lb', 'kg', 0.45359237],
  ['16 oz', 'kg', 0.45359237],
  ['682 rpm', 'rpm', 682],
  ['10 rps', 'rpm', 600],
  ['50 cm/s', 'm/s', 0.5],
  ['3.6 km/h', 'm/s', 1],
  ['7 %', '%', 7],
  ['90°', 'deg', 90],
  ['1 rad', 'deg', 57.2957795131],
  ['0,7', '1', 0.7],
])('%s as %s', (text, unit, want) => {
  expect(parseQuantity(text, unit)).toEqual({ ok: true, value: want });
});

test.each<[text: string, unit: Unit, want: string]>([
  ['3 kg', 'V', '"3 kg": the unit "kg" does not fit here; use V, mV, volt or volts.'],
  ['much', '%', '"much" is not a percentage; write for example 10 or 10 %.'],
  ['0.7 mm', '1', '"0.7 mm" is not a number; write for example 0.7.'],
])('%s as %s is refused', (text, unit, want) => {
  expect(parseQuantity(text, unit)).toEqual({ ok: false, message: want });
});

test('what is written in the unit itself is read back exactly', () => {
  const value = fc.double({ noNaN: true, noDefaultInfinity: true, min: -1e9, max: 1e9 });
  fc.assert(
    fc.property(
      value,
      fc.constantFrom<Unit>('mm', 's', 'ms', 'V', 'A', 'kg', 'rpm', 'm/s', '%', 'deg'),
      (number, unit) => {
        const shown = Number(number.toPrecision(12));
        expect(parseQuantity(`${shown} ${unit}`, unit)).toEqual({ ok: true, value: shown });
      },
    ),
  );
});

test('no text makes it throw, and a number is always finite', () => {
  fc.assert(
    fc.property(fc.string({ unit: 'binary' }), (text) => {
      const read = parseLength(text);
      expect(read.ok ? Number.isFinite(read.value) : read.message.endsWith('.')).toBe(true);
    }),
  );
});

test.each(['mm', '1', '%'])('%s is a unit', (text) => expect(isUnit(text)).toBe(true));
test.each(['', 'constructor', 'parsec', 7, undefined])('%s is none', (text) =>
  expect(isUnit(text)).toBe(false),
);
