/**
 * Pico: an RP2040 with MicroPython.
 *
 * Sources: RP2040 data sheet (4.5 PWM, 4.9 ADC); pico-sdk hardware_pwm: slice = (gpio >> 1) & 7, channel = gpio & 1, so
 * that GPIO n and n + 16 share one output; pico-sdk boards/pico.h and the board's data sheet (GP23 to GP25 and GP29 serve
 * the board itself, 2 MiB flash); MicroPython documentation of the rp2 port.
 * Timing is an estimate for MicroPython code that does not allocate, not a measurement.
 */
import type { BoardFacts, PinFacts } from '../board-facts.js';

const FIRST_ADC_GPIO = 26;

const TAKEN_BY_THE_BOARD: Readonly<Record<number, string>> = {
  23: "it sets the mode of the board's voltage regulator and is not led out",
  24: 'it senses the USB supply and is not led out',
  25: "it drives the board's LED and is not led out",
  29: 'it measures the supply voltage and is not led out',
};

function pin(gpio: number): PinFacts {
  const reserved = TAKEN_BY_THE_BOARD[gpio];
  return {
    label: `GP${gpio}`,
    aliases: [String(gpio), `GPIO${gpio}`],
    code: String(gpio),
    input: true,
    output: true,
    pullUp: true,
    interrupt: true,
    pwm: { timer: (gpio >> 1) & 7, channel: gpio & 1 ? 'B' : 'A' },
    ...(gpio >= FIRST_ADC_GPIO ? { adc: { channel: gpio - FIRST_ADC_GPIO } } : {}),
    ...(reserved === undefined ? {} : { reserved }),
  };
}

export const pico: BoardFacts = {
  id: 'pico',
  title: 'Pico',
  language: 'micropython',
  chip: 'RP2040',
  sources: [
    'RP2040 data sheet, 4.5 and 4.9',
    'pico-sdk: hardware/pwm.h, boards/pico.h',
    'MicroPython documentation, rp2 port',
  ],
  clockHz: 125e6,
  logicV: 3.3,
  // The firmware reads read_u16() >> 4: the converter's own 12 bits.
  adcMaxCount: 4095,
  adcReadS: 20e-6,
  // A handler in Python: 20 to 30 us on such chips, from memory; to be measured on the board.
  edgeS: 30e-6,
  digitalReadS: 5e-6,
  computeS: 2e-3,
  // an estimate, as that is
  wheelLoopS: 4e-4,
  samplePeriodS: 5e-3,
  pwmHz: 20e3,
  // The range of duty_u16(); at 20 kHz the counter itself resolves 125 MHz / 20 kHz = 6250 steps.
  // 125 MHz / 20 kHz
  pwmSteps: 6250,
  flashBytes: 2 * 1024 * 1024,
  ramBytes: 264 * 1024,
  pins: Array.from({ length: 30 }, (_, gpio) => pin(gpio)),
  // "LED" is the name on boards with and without radio, which have it on different pins.
  led: { label: 'GP25', code: '"LED"', about: "The board's own LED." },
  wiring: [
    "Pins are named by their GP numbers, which are printed on the board's back; the position along the edge is another number.",
  ],
  flashing: [
    'A board without MicroPython: hold BOOTSEL while plugging it in, and copy the UF2 file of MicroPython for this board to the drive that appears.',
  ],
};
