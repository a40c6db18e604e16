/**
 * Leonardo: an ATmega32U4, whose USB is part of the chip. Six more analog inputs, A6 to A11, lie on digital pins.
 *
 * Sources: Atmel 7766J, ATmega16U4/32U4 data sheet (ports, timers, converter, external interrupts); the Arduino AVR core's
 * variants/leonardo/pins_arduino.h (pin numbers, ports, PWM timers, interrupts, converter channels), cores/arduino/wiring.c
 * (timer set-up; timer 4 counts to 255 as well) and boards.txt (memory left by the boot loader).
 * Converter and PWM as atmega328p.ts has them. The board documentation says what the boot loader does (from memory): it
 * waits about eight seconds after a press of reset, and comes by itself when the computer opens the port at 1200 bit/s.
 */
import type { BoardFacts, PinFacts } from '../board-facts.js';
import { AVR_16_MHZ, TIMER_0, TIMER_1, TIMER_4_OF_32U4, timerPwmHz, wideTimer } from './avr.js';

interface Row {
  label: string;
  port: string;
  /** Arduino's number where the label is none, and further names. */
  names?: readonly string[];
  pwm?: string;
  /** Converter channel, and the name by which code reads it. */
  adc?: readonly [channel: number, code: string];
  interrupt?: boolean;
  caution?: string;
}

const SERIAL = 'it is also a line of the serial port, so no serial part can be added later';
const I2C = 'it is also a line of the I2C bus, so no I2C part can be added later';
const LED = "the board's LED hangs on it, and it flickers while the boot loader runs";
const SPI = 'it is led out on the six-pin programming header only, and a programmer there drives it';

const ROWS: readonly Row[] = [
  { label: '0', port: 'D2', interrupt: true, caution: SERIAL },
  { label: '1', port: 'D3', interrupt: true, caution: SERIAL },
  { label: '2', port: 'D1', interrupt: true, caution: I2C },
  { label: '3', port: 'D0', interrupt: true, pwm: '0B', caution: I2C },
  { label: '4', port: 'D4', adc: [8, 'A6'], names: ['24', 'D24'] },
  { label: '5', port: 'C6', pwm: '3A' },
  { label: '6', port: 'D7', pwm: '4D', adc: [10, 'A7'], names: ['25', 'D25'] },
  { label: '7', port: 'E6', interrupt: true },
  { label: '8', port: 'B4', adc: [11, 'A8'], names: ['26', 'D26'] },
  { label: '9', port: 'B5', pwm: '1A', adc: [12, 'A9'], names: ['27', 'D27'] },
  { label: '10', port: 'B6', pwm: '1B', adc: [13, 'A10'], names: ['28', 'D28'] },
  { label: '11', port: 'B7', pwm: '0A' },
  { label: '12', port: 'D6', adc: [9, 'A11'], names: ['29', 'D29'] },
  { label: '13', port: 'C7', pwm: '4A', caution: LED },
  { label: '14', port: 'B3', caution: SPI },
  { label: '15', port: 'B1', caution: SPI },
  { label: '16', port: 'B2', caution: SPI },
  { label: 'A0', port: 'F7', adc: [7, 'A0'], names: ['18', 'D18'] },
  { label: 'A1', port: 'F6', adc: [6, 'A1'], names: ['19', 'D19'] },
  { label: 'A2', port: 'F5', adc: [5, 'A2'], names: ['20', 'D20'] },
  { label: 'A3', port: 'F4', adc: [4, 'A3'], names: ['21', 'D21'] },
  { label: 'A4', port: 'F1', adc: [1, 'A4'], names: ['22', 'D22'] },
  { label: 'A5', port: 'F0', adc: [0, 'A5'], names: ['23', 'D23'] },
];

function pin({ label, port, names = [], pwm, adc, interrupt = false, caution }: Row): PinFacts {
  const isNumber = /^\d+$/.test(label);
  const readAs = adc !== undefined && adc[1] !== label ? [adc[1]] : [];
  return {
    label,
    aliases: [...(isNumber ? [`D${label}`] : []), ...readAs, ...names],
    code: label,
    input: true,
    output: true,
    pullUp: true,
    interrupt,
    port: { name: port.charAt(0), bit: Number(port.charAt(1)) },
    ...(pwm === undefined ? {} : { pwm: { timer: Number(pwm.charAt(0)), channel: pwm.charAt(1) } }),
    ...(adc === undefined ? {} : { adc: { channel: adc[0], code: adc[1] } }),
    ...(caution === undefined ? {} : { caution }),
  };
}

const TIMERS = [TIMER_1, wideTimer(3), TIMER_4_OF_32U4, TIMER_0];

export const leonardo: BoardFacts = {
  ...AVR_16_MHZ,
  id: 'leonardo',
  title: 'Leonardo',
  chip: 'ATmega32U4',
  sources: [
    'Atmel 7766J, ATmega16U4/ATmega32U4 data sheet',
    'Arduino AVR core: variants/leonardo/pins_arduino.h, cores/arduino/wiring.c, boards.txt',
  ],
  timers: TIMERS,
  timerPwmHz: timerPwmHz(TIMERS),
  flashBytes: 28672,
  ramBytes: 2560,
  pins: ROWS.map(pin),
  // data sheet, External Interrupts: PCINT0 to 7 are port B
  pinChange: { B: { vector: 'PCINT0_vect', mask: 'PCMSK0', enable: 'PCIE0' } },
  led: { label: '13', code: 'LED_BUILTIN', about: "The board's own LED." },
  core: {
    fqbn: 'arduino:avr:leonardo',
    mcu: 'atmega32u4',
    variant: 'leonardo',
    macro: 'AVR_LEONARDO',
    defines: ['USB_VID=0x2341', 'USB_PID=0x8036'],
  },
  wiring: [
    'A6 to A11 are the pins 4, 6, 8, 9, 10 and 12; the names in brackets stand on the back of the board.',
  ],
  flashing: [
    'The chip itself is the USB device: the port goes and comes back while the boot loader runs, at times under another name. If the computer finds no port, press reset twice, and load within eight seconds.',
    'After a press of reset the boot loader waits some seconds before the firmware starts; the motors stay off until then only if the driver reads an open input as off.',
  ],
};
