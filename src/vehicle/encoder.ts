/** Wheel encoders: edges and distance. */
import type { PinFacts } from './board-facts.js';

/** Pins of one encoder, resolved on the board. */
export interface EncoderWiring {
  a: PinFacts;
  /** With quadrature. */
  b?: PinFacts;
  inverted: boolean;
}

export interface Encoders {
  /** Pulses of one channel in one turn of the wheel. */
  linesPerTurn: number;
  left: EncoderWiring;
  right: EncoderWiring;
  /** Whether there is no second channel to tell the direction. */
  single: boolean;
}

/** Edges counted in each metre that a wheel rolls: both edges of one channel. */
export function edgesPerM(linesPerTurn: number, wheelDiameterM: number): number {
  return (2 * linesPerTurn) / (Math.PI * wheelDiameterM);
}

/** Edges of one channel in each second at a wheel's surface speed. */
export function edgesPerS(linesPerTurn: number, wheelDiameterM: number, speedMps: number): number {
  return edgesPerM(linesPerTurn, wheelDiameterM) * speedMps;
}

/** Edges in a window at full speed that make a speed fine enough, 1. */
const FINE_EDGES = 24;
/** Longest window, as a share of the motor's time constant. */
const LONGEST_WINDOW_SHARE = 0.5;
const LONGEST_WINDOW_BITS = 5;

/**
 * Bits of the window in which edges are counted: enough of them at full speed, but no longer than the motor bears.
 *
 * @param edgesInSample at full speed
 * @param lagS time constant of the motor, s
 */
export function windowBits(edgesInSample: number, lagS: number, periodS: number): number {
  let bits = 0;
  while (
    bits < LONGEST_WINDOW_BITS &&
    edgesInSample * 2 ** bits < FINE_EDGES &&
    2 ** (bits + 1) * periodS <= LONGEST_WINDOW_SHARE * lagS
  )
    bits++;
  return bits;
}
