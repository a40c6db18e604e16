/**
 * The ATmega328P as Uno and Nano wire it: pins, timers, converter, and the timing of generated C++.
 *
 * Sources: Atmel 8271H, ATmega328P data sheet (converter p. 241, timers, port functions); the Arduino AVR core's
 * variants/standard/pins_arduino.h (pin numbers, PWM timers, interrupts), cores/arduino/wiring.c (timer set-up) and
 * boards.txt (memory left by the boot loader).
 *
 * Converter clocks and timers: avr.ts.
 */
import type { BoardFacts, PinFacts } from '../board-facts.js';
import { AVR_16_MHZ, TIMER_0, TIMER_2, TIMER_1, timerPwmHz } from './avr.js';

const PWM_OUTPUTS: Readonly<Record<number, { timer: number; channel: string }>> = {
  3: { timer: 2, channel: 'B' },
  5: { timer: 0, channel: 'B' },
  6: { timer: 0, channel: 'A' },
  9: { timer: 1, channel: 'A' },
  10: { timer: 1, channel: 'B' },
  11: { timer: 2, channel: 'A' },
};

const SERIAL = 'it carries the serial link to the computer, by which the firmware is loaded';
const I2C = 'it is also a line of the I2C bus, so no I2C part can be added later';
const LED = "the board's LED and its resistor hang on it, and it flickers while the boot loader runs";

function digitalPin(number: number): PinFacts {
  const pwm = PWM_OUTPUTS[number];
  return {
    label: String(number),
    aliases: [`D${number}`],
    code: String(number),
    input: true,
    output: true,
    pullUp: true,
    port: number < 8 ? { name: 'D', bit: number } : { name: 'B', bit: number - 8 },
    interrupt: number === 2 || number === 3,
    ...(pwm ? { pwm } : {}),
    ...(number <= 1 ? { reserved: SERIAL } : {}),
    ...(number === 13 ? { caution: LED } : {}),
  };
}

/** A0 to A5 are whole port pins; A6 and A7, where the package has them, lead to the converter only. */
function analogPin(channel: number): PinFacts {
  const portPin = channel <= 5;
  return {
    label: `A${channel}`,
    aliases: [String(14 + channel), `D${14 + channel}`],
    code: `A${channel}`,
    input: portPin,
    output: portPin,
    pullUp: portPin,
    ...(portPin ? { port: { name: 'C', bit: channel } } : {}),
    interrupt: false,
    adc: { channel },
    ...(channel === 4 || channel === 5 ? { caution: I2C } : {}),
  };
}

const DIGITAL_PINS = Array.from({ length: 14 }, (_, number) => digitalPin(number));

/** Pins 0 to 13 and A0 up to the given number of analog pins. */
export function atmega328pPins(analogCount: number): readonly PinFacts[] {
  return [...DIGITAL_PINS, ...Array.from({ length: analogCount }, (_, channel) => analogPin(channel))];
}

const TIMERS = [TIMER_1, TIMER_2, TIMER_0];

/** What Uno and Nano have in common. */
export const atmega328p = {
  ...AVR_16_MHZ,
  chip: 'ATmega328P',
  timers: TIMERS,
  timerPwmHz: timerPwmHz(TIMERS),
  ramBytes: 2048,
  led: { label: '13', code: 'LED_BUILTIN', about: "The board's own LED." },
  flashing: [
    'The computer resets the board over the serial link and its boot loader takes the sketch; there is no button to press. Opening a serial monitor resets the board as well: the vehicle then stands and waits for its button.',
  ],
  // data sheet, External Interrupts: PCINT0 to 7 are port B, 8 to 14 port C, 16 to 23 port D
  pinChange: {
    B: { vector: 'PCINT0_vect', mask: 'PCMSK0', enable: 'PCIE0' },
    C: { vector: 'PCINT1_vect', mask: 'PCMSK1', enable: 'PCIE1' },
    D: { vector: 'PCINT2_vect', mask: 'PCMSK2', enable: 'PCIE2' },
  },
} as const satisfies Partial<BoardFacts>;

export const ATMEGA328P_SOURCES = [
  'Atmel 8271H, ATmega328P data sheet',
  'Arduino AVR core: variants/standard/pins_arduino.h, cores/arduino/wiring.c, boards.txt',
] as const;
