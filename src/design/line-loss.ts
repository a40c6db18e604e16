/** How soon the motors are off after the line has gone for good. */
import { CLASS_SPEED_BITS, type ControllerConstants, SPEED_BITS } from '../controller/constants.js';

/**
 * Longest time from the first reading without any line to motors off, s.
 *
 * The vehicle takes it for a gap while the sum of its modelled speeds is at most the gap's, then searches for a number of samples
 * (controller/line-memory.ts). The slowest class makes the gap last longest; a vehicle that is still speeding up, slower than any
 * class, takes longer by that.
 */
export function lineLossBoundS({ classes, memory, samplePeriodUs }: ControllerConstants): number {
  const slowest = Math.min(...classes.map(({ speed }) => speed)) >> (CLASS_SPEED_BITS - SPEED_BITS);
  // the sample that passes the limit, and the one that ends the search
  const samples = Math.floor(memory.gapDistance / slowest) + 1 + memory.searchSamples + 1;
  return (samples * samplePeriodUs) / 1e6;
}
