/**
 * Readings of a typical reflectance sensor, for a vehicle whose own are not known yet: 12 % of the converter's range over
 * the darker surface, 82 % over the lighter (common practice).
 */
import type { BoardFacts } from '../vehicle/board-facts.js';

const TYPICAL_DARK = 0.12;
const TYPICAL_LIGHT = 0.82;

/** One reading over the ground and one over the line, counts of the board's converter. */
export function typicalReadings(
  board: BoardFacts,
  polarity: 'light-on-dark' | 'dark-on-light',
): { ground: number; line: number } {
  const dark = Math.round(TYPICAL_DARK * board.adcMaxCount);
  const light = Math.round(TYPICAL_LIGHT * board.adcMaxCount);
  return polarity === 'light-on-dark' ? { ground: dark, line: light } : { ground: light, line: dark };
}
