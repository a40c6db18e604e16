/**
 * Board facts against what the makers publish. The source stands beside each number.
 */
import { describe, expect, test } from 'vitest';
import type { BoardFacts, PinFacts } from '../../src/vehicle/board-facts.js';
import { BOARDS, findPin } from '../../src/vehicle/boards.js';

const { uno, nano, pico, esp32 } = BOARDS;

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
    expect(first?.pwmAlone).toMatchObject({ pwmHz: 16e6 / (2 * 1 * 400), dutySteps: 400 });
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

describe('ESP32', () => {
  test('the 34 GPIOs that exist', () => {
    // ESP-IDF programming guide, GPIO: GPIO0 to 19, 21 to 23, 25 to 27 and 32 to 39.
    const exist = [...Array(40).keys()].filter(
      (n) => n <= 19 || (n >= 21 && n <= 23) || (n >= 25 && n <= 27) || n >= 32,
    );
    expect(exist).toHaveLength(34);
    expect(labels(esp32, () => true)).toEqual(gpios('GPIO', ...exist));
  });

  test('input-only pins without pull-up', () => {
    // The same table and note: GPIO34 to 39 are inputs only, without software-enabled pull-up.
    const inputOnly = gpios('GPIO', 34, 35, 36, 37, 38, 39);
    expect(labels(esp32, ({ output }) => !output)).toEqual(inputOnly);
    expect(labels(esp32, ({ pullUp }) => !pullUp)).toEqual(inputOnly);
    expect(labels(esp32, ({ pwm }) => !pwm)).toEqual(inputOnly);
  });

  test('channels of both converters', () => {
    // The same table: ADC1_CH0 ... ADC2_CH9.
    const table: Record<string, string> = {
      GPIO36: '1.0',
      GPIO37: '1.1',
      GPIO38: '1.2',
      GPIO39: '1.3',
      GPIO32: '1.4',
      GPIO33: '1.5',
      GPIO34: '1.6',
      GPIO35: '1.7',
      GPIO4: '2.0',
      GPIO0: '2.1',
      GPIO2: '2.2',
      GPIO15: '2.3',
      GPIO13: '2.4',
      GPIO12: '2.5',
      GPIO14: '2.6',
      GPIO27: '2.7',
      GPIO25: '2.8',
      GPIO26: '2.9',
    };
    const found = esp32.pins.flatMap(({ label, adc }) =>
      adc ? [[label, `${adc.unit}.${adc.channel}`]] : [],
    );
    expect(Object.fromEntries(found)).toEqual(table);
    // The same note: ADC2 cannot be used together with Wi-Fi.
    for (const { adc } of esp32.pins) if (adc) expect(adc.caution === undefined).toBe(adc.unit === 1);
    // ESP32 data sheet: 12 bits.
    expect(esp32.adcMaxCount).toBe(4095);
  });

  test('pins with other duties', () => {
    // The same notes: GPIO6 to 11 flash; GPIO1 and 3 TXD and RXD; GPIO16 and 17 PSRAM where the module has it.
    expect(labels(esp32, ({ reserved }) => reserved)).toEqual(gpios('GPIO', 1, 3, 6, 7, 8, 9, 10, 11));
    // ESP32 data sheet, strapping pins: MTDI (12), GPIO0, GPIO2, MTDO (15), GPIO5.
    expect(labels(esp32, ({ caution }) => caution?.includes('strapping'))).toEqual(
      gpios('GPIO', 0, 2, 5, 12, 15),
    );
    // GPIO37 and 38 are not led out: common practice.
    expect(labels(esp32, ({ caution }) => caution && !caution.includes('strapping'))).toEqual(
      gpios('GPIO', 16, 17, 37, 38),
    );
  });

  test('memory and PWM', () => {
    // ESP32 data sheet: 520 KB SRAM, up to 240 MHz.
    expect(esp32.ramBytes).toBe(532_480);
    expect(esp32.clockHz).toBeLessThanOrEqual(240e6);
    // ESP-IDF, LED control: highest frequency at b bits is 80 MHz / 2^b, so 20 kHz has 11 bits: 39062.5 Hz, and 12 are too many.
    expect(80e6 / 2 ** 11).toBe(39062.5);
    expect(esp32.pwmHz).toBeLessThanOrEqual(80e6 / 2 ** 11);
    expect(esp32.pwmHz).toBeGreaterThan(80e6 / 2 ** 12);
  });
});
