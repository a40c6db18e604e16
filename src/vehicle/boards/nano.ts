/**
 * Nano (with the ATmega328P): as the Uno, with two more analog inputs, A6 and A7, and a larger boot loader.
 * Facts and sources: atmega328p.ts; variants/eightanaloginputs/pins_arduino.h for the number of analog inputs.
 */
import type { BoardFacts } from '../board-facts.js';
import { ATMEGA328P_SOURCES, atmega328p, atmega328pPins } from './atmega328p.js';

export const nano: BoardFacts = {
  ...atmega328p,
  id: 'nano',
  title: 'Nano',
  sources: [...ATMEGA328P_SOURCES, 'Arduino AVR core: variants/eightanaloginputs/pins_arduino.h'],
  flashBytes: 30720,
  pins: atmega328pPins(8),
  core: {
    fqbn: 'arduino:avr:nano:cpu=atmega328',
    mcu: 'atmega328p',
    variant: 'eightanaloginputs',
    macro: 'AVR_NANO',
  },
  flashing: [
    ...atmega328p.flashing,
    'If loading fails although the port is right, the board may carry the older boot loader: take arduino:avr:nano:cpu=atmega328old instead.',
  ],
};
