/**
 * Products of 16-bit fractions (Q15): rounded as the WebAssembly instruction i16x8.q15mulr_sat_s does, which Node runs in hardware, and
 * cut down as the firmware's filters do.
 *
 * Inputs of the first table: MDN, q15mulr_sat_s (results computed). Saturation: Microchip Q15_MULTIPLY_SAT and CMSIS-DSP
 * arm_mult_q15 (-1 times -1 gives the largest fraction). Edges computed apart from this project.
 */
import { describe, expect, test } from 'vitest';
import { COEFFICIENT_BITS } from '../../src/controller/constants.js';
import { coefficientOf } from '../../src/design/scales.js';
import { Random } from '../../src/rehearsal/random.js';

/**
 * A module with one function of two vectors in memory: load 16 bytes at 0 and at 16, multiply, store at 32. Bytes by the binary format of
 * the WebAssembly core specification 2.0, section 5; the instruction is 0xfd 0x82 0x01.
 */
const MODULE = Uint8Array.from([
  ...[0x00, 0x61, 0x73, 0x6d, 0x01, 0x00, 0x00, 0x00],
  // type section: one function type, no parameters, no results; one function of it
  ...[0x01, 0x04, 0x01, 0x60, 0x00, 0x00],
  ...[0x03, 0x02, 0x01, 0x00],
  // one page of memory
  ...[0x05, 0x03, 0x01, 0x00, 0x01],
  // exports: memory "m", function "f"
  ...[0x07, 0x09, 0x02, 0x01, 0x6d, 0x02, 0x00, 0x01, 0x66, 0x00, 0x00],
  // code: i32.const 32; v128.load at 0; v128.load at 16; i16x8.q15mulr_sat_s; v128.store
  ...[0x0a, 0x19, 0x01, 0x17, 0x00],
  ...[0x41, 0x20],
  ...[0x41, 0x00, 0xfd, 0x00, 0x04, 0x00],
  ...[0x41, 0x10, 0xfd, 0x00, 0x04, 0x00],
  ...[0xfd, 0x82, 0x01],
  ...[0xfd, 0x0b, 0x04, 0x00],
  0x0b,
]);

/** What is used of Node's WebAssembly; the standard library of TypeScript has it with the browser only. */
interface WebAssemblyHost {
  WebAssembly: {
    Module: new (bytes: Uint8Array) => object;
    Instance: new (module: object) => { exports: { m: { buffer: ArrayBuffer }; f: () => void } };
  };
}

const { WebAssembly } = globalThis as unknown as WebAssemblyHost;
const { m: memory, f: multiply } = new WebAssembly.Instance(new WebAssembly.Module(MODULE)).exports;
const lanes = new Int16Array(memory.buffer, 0, 24);

/** The instruction's rounding, saturating product of two fractions. */
function instruction(a: number, b: number): number {
  lanes[0] = a;
  lanes[8] = b;
  multiply();
  return lanes[16]!;
}

const rounded = (a: number, b: number) => Math.min(32767, (a * b + 0x4000) >> 15);
const cut = (a: number, b: number) => (a * b) >> COEFFICIENT_BITS;

describe('rounding, saturating product', () => {
  test.each([
    // lanes of MDN's example
    [16384, 16384, 8192],
    [32767, 16384, 16384],
    [8192, 16384, 4096],
    [-32768, 32767, -32767],
    [16384, -16384, -8192],
    [0, 99, 0],
    [-16384, 16384, -8192],
    // edges
    [-32768, -32768, 32767],
    [1, 16384, 1],
    [-1, 16384, 0],
    [3, 16384, 2],
    [-3, 16384, -1],
    [20000, 20000, 12207],
    [-20000, 20000, -12207],
    [32767, 32767, 32766],
  ])('%d times %d is %d', (a, b, want) => {
    expect(instruction(a, b)).toBe(want);
    expect(rounded(a, b)).toBe(want);
  });
});

describe("the firmware's product, cut down to a whole number", () => {
  test('of 16384 and 16384 is 8192; of -32768 and -32768 it leaves 16 bits', () => {
    expect(cut(16384, 16384)).toBe(8192);
    expect(cut(-32768, -32768)).toBe(32768);
  });

  // so inputs are kept to 32767 in size and coefficients to 1..32767: no product needs saturation
  test('of a filter coefficient and an input never needs saturation, and is the rounded one or one less', () => {
    const random = new Random(1, 1);
    let less = 0;
    for (let i = 0; i < 20_000; i++) {
      const coefficient = coefficientOf(random.uniform(0, 1));
      const input = Math.round(random.uniform(-32767, 32767));
      const difference = instruction(input, coefficient) - cut(input, coefficient);
      expect(difference === 0 || difference === 1).toBe(true);
      less += difference;
    }
    expect(less / 20_000).toBeCloseTo(0.5, 1);
  });

  test('coefficients saturate at the largest fraction, as CMSIS-DSP has it, and never vanish', () => {
    expect(coefficientOf(1)).toBe(32767);
    expect(coefficientOf(0.5)).toBe(16384);
    expect(coefficientOf(1e-9)).toBe(1);
  });
});
