/**
 * The ESP32 board's facts against what the makers publish. The source stands beside each number.
 */
import { describe, expect, test } from 'vitest';
import type { BoardFacts, PinFacts } from '../../src/vehicle/board-facts.js';
import { BOARDS } from '../../src/vehicle/boards.js';

const { esp32 } = BOARDS;

const labels = (board: BoardFacts, which: (pin: PinFacts) => unknown): string[] =>
  board.pins.filter(which).map(({ label }) => label);

const gpios = (prefix: string, ...numbers: number[]): string[] =>
  numbers.map((number) => `${prefix}${number}`);

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
