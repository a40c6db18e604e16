/** What can prove that a piece of arithmetic stays within its integers: see site-bounds.ts. */
import { type ControllerConstants, FULL_COVERAGE, FULL_SPEED } from '../../../src/controller/constants.js';

type Bits = number | ((constants: ControllerConstants) => number);

/** Proof of one piece: a bound, the largest of several, one shifted to the right, or a scale. */
export type Proof = string | readonly (string | number)[] | { of: string; bits: Bits } | { scale: number };

export const after = (of: string, bits: Bits): Proof => ({ of, bits });

export const BYTE: Proof = { scale: 255 };
export const COUNT: Proof = { scale: 65_535 };
export const SPEED: Proof = { scale: FULL_SPEED };
export const WHEELS: Proof = { scale: 2 * FULL_SPEED };
export const TWO_COVERAGES: Proof = { scale: 2 * FULL_COVERAGE };

/**
 * Largest magnitude that a proof allows.
 *
 * @param bounds of the interval analysis, by name; those of parts that the controller lacks are missing
 */
export function allowed(
  proof: Proof,
  bounds: ReadonlyMap<string, number>,
  constants: ControllerConstants,
): number {
  const named = (name: string): number => bounds.get(name) ?? 0;
  if (typeof proof === 'string') return named(proof);
  if ('scale' in proof) return proof.scale;
  if ('of' in proof) {
    const bits = typeof proof.bits === 'number' ? proof.bits : proof.bits(constants);
    // rounded down, what is negative may grow by one
    return Math.ceil(named(proof.of) / 2 ** bits);
  }
  return Math.max(...proof.map((each) => (typeof each === 'number' ? each : named(each))));
}
