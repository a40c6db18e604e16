/**
 * Board facts against what the makers publish. The source stands beside each number.
 */
import { describe, expect, test } from 'vitest';
import type { BoardFacts, PinFacts } from '../../src/vehicle/board-facts.js';
import { wideTimerPwm } from '../../src/vehicle/boards/avr.js';
import { BOARDS, findPin } from '../../src/vehicle/boards.js';

const { uno, nano, pico } = BOARDS;

const labels = (board: BoardFacts, which: (pin: PinFacts) => unknown): string[] =>
  board.pins.filter(which).map(({ label }) => label);

const gpios = (prefix: string, ...numbers: number[]): string[] =>
  numbers.map((number) => `${prefix}${number}`);

describe.each([uno, nano])('ATmega328P on $title', (board) => {
  test('clock, converter range and memory', () => {
    // Arduino AVR core, boards.txt: build.f_cpu=16000000L.
    expect(board.clockHz).toBe(16_000_000);
    // Atmel 8271H, feature list: 10-bit converter.
    expect(board.adcMaxCount).toBe(2 ** 10 - 1);
    // avr-libc 2.0.0, iom328p.h: RAM 0x100 to 0x8FF.
    expect(board.ramBytes).toBe(0x8ff - 0x100 + 1);
    // Arduino AVR core, boards.txt: upload.maximum_size of uno and of nano with the ATmega328.
    expect(board.flashBytes).toBe(board === uno ? 32256 : 30720);
  });

  test('a reading takes 13 clocks of the converter, and our call not much more', () => {
    // Atmel 8271H, p. 241: 13 converter clocks a conversion; prescalers 2 to 128; full resolution at 50 to 200 kHz.
    const converterClockHz = board.clockHz / 32;
    const conversionS = 13 / converterClockHz;
    expect(conversionS).toBeCloseTo(26e-6, 12);
    // Faster than for full resolution, and no faster than the 1 MHz that the maker's driver notes allow.
    expect(converterClockHz).toBeGreaterThan(200e3);
    expect(converterClockHz).toBeLessThanOrEqual(1e6);
    expect(board.adcReadS).toBeGreaterThan(conversionS);
    expect(board.adcReadS).toBeLessThan(1.5 * conversionS);
  });

  test('PWM frequencies as the core sets the timers up', () => {
    // Arduino AVR core, wiring.c: timer 0 fast PWM, timers 1 and 2 phase-correct, prescaler 64. Frequencies by the formulas of
    // the ATmega328P data sheet: f / (N * 256) and f / (N * 510).
    expect(board.timerPwmHz?.[0]).toBeCloseTo(976.5625, 9);
    // Data sheet, phase-correct PWM: clock / (2 * prescaler * top); the firmware sets timer 1 up with ICR1.
    const first = board.timers?.find(({ timer }) => timer === 1);
    expect(board.timerPwmHz?.[1]).toBe(16e6 / (2 * 64 * 250));
    expect(first?.pwm).toMatchObject({ pwmHz: 500, dutySteps: 250 });
    expect(wideTimerPwm(1, 20e3)).toMatchObject({ pwmHz: 16e6 / (2 * 1 * 400), dutySteps: 400 });
    // the same with the prescaler 8, and timer 2 undivided: clock / 510
    expect(wideTimerPwm(1, 1e3)).toMatchObject({ pwmHz: 16e6 / (2 * 8 * 1000), dutySteps: 1000 });
    expect(board.timers?.find(({ timer }) => timer === 2)?.free?.fixed?.pwmHz).toBeCloseTo(31372.549, 3);
    expect(board.timerPwmHz?.[2]).toBeCloseTo(490.196078, 6);
    // Arduino reference, analogWrite(): 490 Hz, pins 5 and 6 980 Hz; values 0 to 255.
    expect(Math.abs(board.pwmHz - 490)).toBeLessThan(1);
    expect(Math.abs((board.timerPwmHz?.[0] ?? 0) - 980)).toBeLessThan(5);
    expect(board.pwmSteps).toBe(255);
    // wiring.c: the millisecond clock counts overflows of timer 0.
    expect(board.clockTimer).toBe(0);
  });

  test('pins, timers and interrupts', () => {
    // Arduino AVR core, variants/standard/pins_arduino.h: digitalPinHasPWM, digital_pin_to_timer_PGM, digitalPinToInterrupt.
    const timers = Object.fromEntries(
      board.pins.flatMap(({ label, pwm }) => (pwm ? [[label, `TIMER${pwm.timer}${pwm.channel}`]] : [])),
    );
    expect(timers).toEqual({
      3: 'TIMER2B',
      5: 'TIMER0B',
      6: 'TIMER0A',
      9: 'TIMER1A',
      10: 'TIMER1B',
      11: 'TIMER2A',
    });
    expect(labels(board, ({ interrupt }) => interrupt)).toEqual(['2', '3']);
    // The same file: PIN_A0 is 14, PIN_A7 is 21; NUM_ANALOG_INPUTS is 6, in variants/eightanaloginputs 8.
    const analog = labels(board, ({ adc }) => adc);
    expect(analog).toEqual(Array.from({ length: board === uno ? 6 : 8 }, (_, index) => `A${index}`));
    analog.forEach((label, index) => expect(findPin(board, 14 + index)?.label).toBe(label));
    // The same file: LED_BUILTIN 13, SDA is 18 (A4), SCL is 19 (A5).
    expect(labels(board, ({ caution }) => caution)).toEqual(['13', 'A4', 'A5']);
    // Serial port of the boot loader: pins 0 and 1 (board documentation).
    expect(labels(board, ({ reserved }) => reserved)).toEqual(['0', '1']);
  });

  test('A6 and A7 lead to the converter only', () => {
    // Atmel 8271H, pinout: ADC6 and ADC7 of the 32-pin packages are no port pins.
    const noPort = labels(board, ({ input, output, pullUp }) => !input && !output && !pullUp);
    expect(noPort).toEqual(board === nano ? ['A6', 'A7'] : []);
  });
});

describe('RP2040 on the Pico', () => {
  test('memory, clock, converter', () => {
    // RP2040 data sheet: 264 KiB SRAM; pico-sdk boards/pico.h: PICO_FLASH_SIZE_BYTES (2 * 1024 * 1024).
    expect(pico.ramBytes).toBe(270336);
    expect(pico.flashBytes).toBe(2_097_152);
    // MicroPython, rp2 port: 125 MHz unless changed; data sheet: at most 133 MHz.
    expect(pico.clockHz).toBe(125_000_000);
    // RP2040 data sheet 4.9: 12 bits, 96 clocks of 48 MHz = 2 us a conversion.
    expect(pico.adcMaxCount).toBe(2 ** 12 - 1);
    expect(pico.adcReadS).toBeGreaterThan(96 / 48e6);
    expect(pico.logicV).toBe(3.3);
  });

  test('analog pins GPIO26 to GPIO29, channels 0 to 3; the last is not led out', () => {
    // RP2040 data sheet 4.9; board data sheet: GPIO29 measures VSYS (from memory).
    expect(labels(pico, ({ adc }) => adc)).toEqual(gpios('GP', 26, 27, 28, 29));
    expect(pico.pins.flatMap(({ adc }) => (adc ? [adc.channel] : []))).toEqual([0, 1, 2, 3]);
    // boards/pico.h: PICO_DEFAULT_LED_PIN 25, PICO_SMPS_MODE_PIN 23; board data sheet: GPIO24 senses VBUS (from memory).
    expect(labels(pico, ({ reserved }) => reserved)).toEqual(gpios('GP', 23, 24, 25, 29));
  });

  test('eight slices of two channels', () => {
    // pico-sdk hardware/pwm.h: slice (gpio >> 1) & 7, channel gpio & 1; "8 identical slices", "up to 16 outputs", all 30 GPIOs.
    const outputs = pico.pins.map(({ pwm }) => `${pwm?.timer}${pwm?.channel}`);
    expect(pico.pins).toHaveLength(30);
    expect(new Set(outputs).size).toBe(16);
    for (let gpio = 0; gpio < 30; gpio += 1) {
      const { pwm } = findPin(pico, gpio) ?? {};
      expect(pwm).toEqual({ timer: Math.floor(gpio / 2) % 8, channel: gpio % 2 === 0 ? 'A' : 'B' });
      if (gpio < 14) expect(findPin(pico, gpio + 16)?.pwm).toEqual(pwm);
    }
  });

  test('PWM frequency within the reach of the counter', () => {
    // MicroPython, rp2 port: lowest frequency 125 MHz / (65536 * 255.94) = 7.45 Hz; a 16-bit counter.
    expect(pico.pwmSteps).toBe(Math.floor(125e6 / pico.pwmHz));
    expect(pico.pwmSteps).toBeLessThanOrEqual(65535);
    expect(pico.pwmHz).toBeGreaterThan(125e6 / (65536 * 255.94));
    // Counter steps at that frequency: more than the 256 of an Uno.
    expect(pico.clockHz / pico.pwmHz).toBeGreaterThan(256);
  });
});
