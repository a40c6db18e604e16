/**
 * Mega 2560: an ATmega2560 with 54 digital pins and 16 analog ones.
 *
 * Sources: Atmel 2549Q, ATmega640/1280/1281/2560/2561 data sheet (ports, timers, converter, external interrupts); the Arduino
 * AVR core's variants/mega/pins_arduino.h (pin numbers, ports, PWM timers, interrupts), cores/arduino/wiring.c (timer set-up)
 * and boards.txt (memory left by the boot loader). Converter and PWM as atmega328p.ts has them: the same peripherals.
 */
import type { BoardFacts, PinFacts } from '../board-facts.js';
import { AVR_16_MHZ, TIMER_0, TIMER_1, TIMER_2, timerPwmHz, wideTimer } from './avr.js';

/** Port letter and bit of each pin, 0 to 53. */
const PORT_BITS = [
  ...['E0', 'E1', 'E4', 'E5', 'G5', 'E3', 'H3', 'H4', 'H5', 'H6', 'B4', 'B5', 'B6', 'B7'],
  ...['J1', 'J0', 'H1', 'H0', 'D3', 'D2', 'D1', 'D0'],
  ...['A0', 'A1', 'A2', 'A3', 'A4', 'A5', 'A6', 'A7', 'C7', 'C6', 'C5', 'C4', 'C3', 'C2', 'C1', 'C0'],
  ...['D7', 'G2', 'G1', 'G0', 'L7', 'L6', 'L5', 'L4', 'L3', 'L2', 'L1', 'L0', 'B3', 'B2', 'B1', 'B0'],
] as const;

const PWM_OUTPUTS: Readonly<Record<number, string>> = {
  2: '3B',
  3: '3C',
  4: '0B',
  5: '3A',
  6: '4A',
  7: '4B',
  8: '4C',
  9: '2B',
  10: '2A',
  11: '1A',
  12: '1B',
  13: '0A',
  44: '5C',
  45: '5B',
  46: '5A',
};

/** Pins of the external interrupts; INT6 and INT7 are not led out. */
const INTERRUPT_PINS = [2, 3, 18, 19, 20, 21];

const SERIAL = 'it carries the serial link to the computer, by which the firmware is loaded';
const LED = "the board's LED hangs on it, and it flickers while the boot loader runs";
const I2C =
  'it is a line of the I2C bus with a pull-up resistor on the board, so that it reads high when open';

function port(text: string): Pick<PinFacts, 'port'> {
  return { port: { name: text.charAt(0), bit: Number(text.charAt(1)) } };
}

function digitalPin(portBit: string, number: number): PinFacts {
  const output = PWM_OUTPUTS[number];
  const caution = number === 13 ? LED : number === 20 || number === 21 ? I2C : undefined;
  return {
    label: String(number),
    aliases: [`D${number}`],
    code: String(number),
    input: true,
    output: true,
    pullUp: true,
    interrupt: INTERRUPT_PINS.includes(number),
    ...port(portBit),
    ...(output === undefined ? {} : { pwm: { timer: Number(output.charAt(0)), channel: output.charAt(1) } }),
    ...(number <= 1 ? { reserved: SERIAL } : {}),
    ...(caution === undefined ? {} : { caution }),
  };
}

/** A0 to A7 are port F, A8 to A15 port K, in order. */
function analogPin(channel: number): PinFacts {
  return {
    label: `A${channel}`,
    aliases: [String(54 + channel), `D${54 + channel}`],
    code: `A${channel}`,
    input: true,
    output: true,
    pullUp: true,
    interrupt: false,
    ...port(`${channel < 8 ? 'F' : 'K'}${channel % 8}`),
    adc: { channel },
  };
}

const TIMERS = [TIMER_1, wideTimer(3), wideTimer(4), wideTimer(5), TIMER_2, TIMER_0];

export const mega2560: BoardFacts = {
  ...AVR_16_MHZ,
  id: 'mega2560',
  title: 'Mega 2560',
  chip: 'ATmega2560',
  sources: [
    'Atmel 2549Q, ATmega640/1280/1281/2560/2561 data sheet',
    'Arduino AVR core: variants/mega/pins_arduino.h, cores/arduino/wiring.c, boards.txt',
  ],
  timers: TIMERS,
  timerPwmHz: timerPwmHz(TIMERS),
  flashBytes: 253952,
  ramBytes: 8192,
  pins: [...PORT_BITS.map(digitalPin), ...Array.from({ length: 16 }, (_, channel) => analogPin(channel))],
  // data sheet, External Interrupts: PCINT0 to 7 are port B, 16 to 23 port K; ports E and J share the one between, a bit apart
  pinChange: {
    B: { vector: 'PCINT0_vect', mask: 'PCMSK0', enable: 'PCIE0' },
    K: { vector: 'PCINT2_vect', mask: 'PCMSK2', enable: 'PCIE2' },
  },
  led: { label: '13', code: 'LED_BUILTIN', about: "The board's own LED." },
  core: {
    fqbn: 'arduino:avr:mega:cpu=atmega2560',
    mcu: 'atmega2560',
    variant: 'mega',
    macro: 'AVR_MEGA2560',
  },
  flashing: [
    'The computer resets the board over the serial link and its boot loader takes the sketch; there is no button to press. Opening a serial monitor resets the board as well: the vehicle then stands and waits for its button.',
  ],
};
