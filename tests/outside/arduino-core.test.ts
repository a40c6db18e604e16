/**
 * The AVR boards against the files that the Arduino core itself is built from, as Debian ships them (arduino-core-avr): pin
 * numbers, ports, timers, converter channels and interrupts from pins_arduino.h, memory and names from boards.txt.
 */
import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import { ARDUINO_CORE } from '../../bin/toolchain.js';
import { pinNumber } from '../../src/rehearsal/chip-avr.js';
import type { PinFacts } from '../../src/vehicle/board-facts.js';
import { BOARDS } from '../../src/vehicle/boards.js';
import { AVR_BOARDS, evaluate, table } from './avr-compiler.js';

describe.each(AVR_BOARDS)('$title against pins_arduino.h', (board) => {
  const ports = (): string[] => table(board, 'digital_pin_to_port_PGM');
  const numbered = board.pins.filter(({ port }) => port !== undefined);

  test('ports and bits', () => {
    const bits = table(board, 'digital_pin_to_bit_mask_PGM');
    expect(bits).toHaveLength(ports().length);
    for (const pin of numbered) {
      const number = pinNumber(pin);
      expect(`${pin.label} ${ports()[number]}`).toBe(`${pin.label} P${pin.port!.name}`);
      expect(`${pin.label} ${bits[number]}`).toBe(`${pin.label} _BV(${pin.port!.bit})`);
    }
    expect(new Set(numbered.map(({ port }) => `${port!.name}${port!.bit}`)).size).toBe(numbered.length);
  });

  test('PWM outputs', () => {
    const timers = table(board, 'digital_pin_to_timer_PGM');
    const facts = (pin: PinFacts): string =>
      pin.pwm ? `TIMER${pin.pwm.timer}${pin.pwm.channel}` : 'NOT_ON_TIMER';
    for (const pin of numbered) expect([pin.label, facts(pin)]).toEqual([pin.label, timers[pinNumber(pin)]]);
  });

  test('analog inputs, interrupts and LED', () => {
    const analog = board.pins.filter(({ adc }) => adc !== undefined);
    const [inputs, led, ...rest] = evaluate(board, [
      'NUM_ANALOG_INPUTS',
      'LED_BUILTIN',
      ...board.pins.map((pin) => `digitalPinToInterrupt(${pinNumber(pin)})`),
    ]);
    expect(analog).toHaveLength(inputs!);
    expect(String(led)).toBe(board.led.label);
    const able = board.pins.filter((_, i) => rest[i] !== -1);
    expect(board.pins.filter(({ interrupt }) => interrupt)).toEqual(able);
  });

  test('names and memory in boards.txt', () => {
    const text = readFileSync(join(ARDUINO_CORE, 'boards.txt'), 'utf8');
    const { core } = board;
    const [, , id, option] = core!.fqbn.split(':');
    const menu = option === undefined ? undefined : `${id}.menu.${option.replace('=', '.')}.`;
    const value = (key: string): string | undefined =>
      [menu, `${id}.`]
        .filter((prefix) => prefix !== undefined)
        .map((prefix) => text.split('\n').find((line) => line.startsWith(`${prefix}${key}=`)))
        .find((line) => line !== undefined)
        ?.split('=')[1]
        ?.trim();
    expect(value('build.mcu')).toBe(core!.mcu);
    expect(value('build.board')).toBe(core!.macro);
    expect(value('build.variant')).toBe(core!.variant);
    expect(value('build.f_cpu')).toBe(`${board.clockHz}L`);
    expect(Number(value('upload.maximum_size'))).toBe(board.flashBytes);
    expect(Number(value('upload.maximum_data_size'))).toBe(board.ramBytes);
  });
});

describe('Leonardo: analog inputs on digital pins', () => {
  // The same file, analog_pin_to_channel_PGM: channels of A0 to A11.
  test('channels', () => {
    const { leonardo } = BOARDS;
    const channels = table(leonardo, 'analog_pin_to_channel_PGM');
    const known = leonardo.pins.flatMap(({ adc }) => (adc ? [[adc.code, String(adc.channel)]] : []));
    expect(Object.fromEntries(known)).toEqual(
      Object.fromEntries(channels.map((channel, i) => [`A${i}`, channel])),
    );
    // PIN_A6 is 24 and lies on D4: reading pin 4 itself would read A4.
    expect(evaluate(leonardo, ['A6', 'A11'])).toEqual([24, 29]);
  });
});
