/**
 * MicroPython keeps integers of 31 bits in the machine word and puts larger ones on the heap (py/smallint.h). The control law must
 * stay within: what it takes from the heap in each step has to be collected one day, in the middle of a bend.
 */
import type { ControllerConstants } from '../controller/constants.js';
import { intermediateBounds } from '../design/intervals.js';
import { LiteralError } from './literals.js';

export const SMALL_INT_MAX = 2 ** 30 - 1;

/** Bounds that are stated against 16 bits, scaled up; MicroPython has no 16-bit variables. */
const OF_16_BITS = /in 16 bits$/;

/** @throws LiteralError when an intermediate could need more than 31 bits: a defect of the design */
export function checkSmallIntegers(controller: ControllerConstants, adcMaxCount: number): void {
  for (const { name, magnitude } of intermediateBounds(controller, adcMaxCount)) {
    if (magnitude > SMALL_INT_MAX && !OF_16_BITS.test(name))
      throw new LiteralError(`The ${name} can reach ${magnitude}, beyond MicroPython's 31-bit integers.`);
  }
}
