/**
 * What integer expressions mean in the three languages of the control law, asked of the compilers and interpreters themselves.
 *
 * Sources of the rules: GCC manual, "Integers implementation" (>> of a negative number extends the sign; division truncates); Python
 * reference (// and >> floor); MDN, right shift (5 >> 2 = 1, -5 >> 2 = -2, -5 >>> 2 = 1073741822); Microchip Common Compiler Interface
 * (-13 >> 3 = -2). The other values are computed apart from this project with gcc 12.2, Python 3.11 and Node 20.20.
 */
import { execFileSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { edgeShift } from '../../src/controller/sensing.js';
import { wheelDuty } from '../../src/controller/wheel-duty.js';
import { sensingConstants } from '../../src/design/sensing-constants.js';
import { demoVehicle } from '../design/demo-vehicle.js';

interface Row {
  c: string;
  cValue: number;
  python: string;
  pythonValue: number;
  javaScript: number;
}

const row = (c: string, cValue: number, python: string, pythonValue: number, javaScript: number): Row => ({
  c,
  cValue,
  python,
  pythonValue,
  javaScript,
});

/** Wraps to the 16 or 8 bits of a typed array. */
const int16 = (value: number) => new Int16Array([value])[0]!;
const int8 = (value: number) => new Int8Array([value])[0]!;
const divide = (a: number, b: number) => (a / b) | 0;

/** Where division and remainder differ, and where nothing does. */
const ROWS: readonly Row[] = [
  row('-7 / 2', -3, '-7 // 2', -4, divide(-7, 2)),
  row('-7 % 2', -1, '-7 % 2', 1, -7 % 2),
  row('7 / -2', -3, '7 // -2', -4, divide(7, -2)),
  row('7 % -2', 1, '7 % -2', -1, 7 % -2),
  row('-7 >> 1', -4, '-7 >> 1', -4, -7 >> 1),
  row('-5 >> 2', -2, '-5 >> 2', -2, -5 >> 2),
  row('(signed char)-13 >> 3', -2, '-13 >> 3', -2, -13 >> 3),
  row('-1 >> 31', -1, '-1 >> 31', -1, -1 >> 31),
  row('(short)40000', -25536, '(40000 + 32768 & 65535) - 32768', -25536, int16(40000)),
  row('(signed char)200', -56, '(200 + 128 & 255) - 128', -56, int8(200)),
  row(
    '(int)(123456789u * 987654321u)',
    -67153019,
    '(123456789 * 987654321 + 2**31 & 2**32 - 1) - 2**31',
    -67153019,
    Math.imul(123456789, 987654321),
  ),
  row('65537u * 65537u', 131073, '65537 * 65537 & 2**32 - 1', 131073, Math.imul(65537, 65537)),
];

let folder: string;
beforeAll(() => (folder = mkdtempSync(join(tmpdir(), 'fairlead-integers-'))));
afterAll(() => rmSync(folder, { recursive: true }));

const numbers = (text: string) => text.trim().split('\n').map(Number);

describe('division, remainder, shifts and wrapping', () => {
  test('in C++, as g++ compiles them', () => {
    const lines = ROWS.map(({ c }) => `  std::printf("%d\\n", (int)(${c}));`);
    const source = join(folder, 'rows.cpp');
    writeFileSync(source, ['#include <cstdio>', 'int main() {', ...lines, '}', ''].join('\n'));
    execFileSync('g++', ['-w', source, '-o', join(folder, 'rows')]);
    const got = numbers(execFileSync(join(folder, 'rows'), { encoding: 'utf8' }));
    expect(got).toEqual(ROWS.map(({ cValue }) => cValue));
  });

  test('in Python', () => {
    const program = ROWS.map(({ python }) => `print(${python})`).join('\n');
    const got = numbers(execFileSync('/usr/bin/python3', ['-c', program], { encoding: 'utf8' }));
    expect(got).toEqual(ROWS.map(({ pythonValue }) => pythonValue));
  });

  test('in JavaScript, which truncates as C++ does', () => {
    expect(ROWS.map(({ javaScript }) => javaScript)).toEqual(ROWS.map(({ cValue }) => cValue));
  });

  test('of these only division and remainder of negative numbers depend on the language', () => {
    const differ = ROWS.filter(({ cValue, pythonValue }) => cValue !== pythonValue);
    expect(differ.map(({ c }) => c)).toEqual(['-7 / 2', '-7 % 2', '7 / -2', '7 % -2']);
  });

  test('products beyond 2^53 lose bits in JavaScript unless Math.imul makes them', () => {
    expect((123456789 * 987654321) | 0).toBe(-67153024);
    expect(Math.imul(123456789, 987654321)).toBe(-67153019);
  });
});

describe('the twin rounds as the shifts of all three languages: down', () => {
  const sensing = sensingConstants(demoVehicle());

  test('edge positions, negative ones too', () => {
    let negative = 0;
    for (let sum = 0; sum <= 510; sum++) {
      const [place, part] = [(sum + 1) >> 5, ((sum + 1) % 32) / 32];
      const [low, high] = [sensing.edgeTable[place]!, sensing.edgeTable[place + 1]!];
      const value = low + Math.floor((high - low) * part);
      const exact = (2560 * value) / 32768;
      expect(edgeShift(sensing, 2560, sum)).toBe(Math.floor(exact));
      if (exact < 0 && !Number.isInteger(exact)) negative++;
    }
    expect(negative).toBeGreaterThan(100);
  });

  test('duties, forward and backward alike', () => {
    for (const speed of [11, 137, 999]) {
      expect(wheelDuty(speed, 5, 400, 9001)).toBe(400 + Math.floor((speed * 9001) / 32768));
      expect(wheelDuty(-speed, 5, 400, 9001)).toBe(-wheelDuty(speed, 5, 400, 9001));
    }
  });
});
