import { describe, expect, it } from 'vitest';
import {
  type IntegerType,
  LiteralError,
  literal,
  numberText,
  signedTypeOf,
} from '../../src/firmware/literals.js';

describe('C++ literals', () => {
  it.each<[number, IntegerType, string]>([
    [0, 'int8_t', '0'],
    [-0, 'int16_t', '0'],
    [-128, 'int8_t', '-128'],
    [255, 'uint8_t', '255'],
    [-32768, 'int16_t', '-32768'],
    [65535, 'uint16_t', '65535'],
    [7, 'int32_t', '7L'],
    [2147483647, 'int32_t', '2147483647L'],
    [-2147483648, 'int32_t', '(-2147483647L - 1)'],
    [4294967295, 'uint32_t', '4294967295UL'],
  ])('%s as %s is %s', (value, type, text) => {
    expect(literal(value, type, 'cpp')).toBe(text);
  });

  it.each<[number, IntegerType, string]>([
    [NaN, 'int16_t', 'NaN is not an integer, as int16_t needs.'],
    [Infinity, 'int32_t', 'Infinity is not an integer, as int32_t needs.'],
    [0.5, 'uint8_t', '0.5 is not an integer, as uint8_t needs.'],
    [256, 'uint8_t', '256 does not fit uint8_t (0 to 255).'],
    [-1, 'uint32_t', '-1 does not fit uint32_t (0 to 4294967295).'],
    [32768, 'int16_t', '32768 does not fit int16_t (-32768 to 32767).'],
    [2147483648, 'int32_t', '2147483648 does not fit int32_t (-2147483648 to 2147483647).'],
  ])('refuses %s as %s', (value, type, message) => {
    expect(() => literal(value, type, 'cpp')).toThrow(new LiteralError(message));
  });
});

describe('Python literals', () => {
  it('writes small integers without a suffix', () => {
    expect(literal(-(2 ** 30 - 1), 'int32_t', 'python')).toBe('-1073741823');
    expect(literal(40000, 'uint16_t', 'python')).toBe('40000');
  });

  it('refuses what MicroPython would put on the heap', () => {
    const message = '1073741824 does not fit a MicroPython small integer (31 bits).';
    expect(() => literal(2 ** 30, 'int32_t', 'python')).toThrow(new LiteralError(message));
  });
});

describe('the type of a table', () => {
  it('is the smallest that holds every value', () => {
    expect(signedTypeOf([-32768, 32767])).toBe('int16_t');
    expect(signedTypeOf([0, 32768])).toBe('int32_t');
  });
});

describe('numbers for people', () => {
  it.each<[number, string]>([
    [34.343434, '34.34'],
    [120, '120'],
    [0.30000000000000004, '0.3'],
    [-0, '0'],
  ])('%s reads %s', (value, text) => {
    expect(numberText(value)).toBe(text);
  });

  it('refuses what is no number', () => {
    expect(() => numberText(NaN)).toThrow('NaN cannot be written as a number.');
  });
});
