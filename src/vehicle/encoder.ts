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
