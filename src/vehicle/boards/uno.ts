/** Uno (revision 3): an ATmega328P in the package with six analog inputs. Facts and sources: atmega328p.ts. */
import type { BoardFacts } from '../board-facts.js';
import { ATMEGA328P_SOURCES, atmega328p, atmega328pPins } from './atmega328p.js';

export const uno: BoardFacts = {
  ...atmega328p,
  id: 'uno',
  title: 'Uno',
  sources: ATMEGA328P_SOURCES,
  flashBytes: 32256,
  pins: atmega328pPins(6),
  core: { fqbn: 'arduino:avr:uno', mcu: 'atmega328p', variant: 'standard', macro: 'AVR_UNO' },
};
