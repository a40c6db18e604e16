/** What the Arduino core's headers say of a board, by the compiler itself. */
import { execFileSync } from 'node:child_process';
import { join } from 'node:path';
import { ARDUINO_CORE } from '../../bin/toolchain.js';
import type { BoardFacts } from '../../src/vehicle/board-facts.js';
import { BOARDS } from '../../src/vehicle/boards.js';

export const AVR_BOARDS = Object.values(BOARDS).filter(({ core }) => core !== undefined);

/** The compiler's output for a source on a board. */
function avr(board: BoardFacts, how: readonly string[], source: string): string {
  const { mcu, macro, variant } = board.core!;
  const flags = [
    ...['-x', 'c++', '-std=gnu++11', '-w', ...how, '-o', '-', '-'],
    ...[`-mmcu=${mcu}`, '-DF_CPU=16000000L', '-DARDUINO=10819', `-DARDUINO_${macro}`],
    ...[`-I${join(ARDUINO_CORE, 'cores/arduino')}`, `-I${join(ARDUINO_CORE, 'variants', variant)}`],
  ];
  return execFileSync('avr-g++', flags, { input: source, encoding: 'utf8', maxBuffer: 2 ** 24 });
}

/** Values of C expressions on a chip, with the board's pins_arduino.h: compiled to assembly, never run. */
export function evaluate(board: BoardFacts, expressions: readonly string[]): number[] {
  const source = [
    '#include <Arduino.h>',
    ...expressions.map((text, i) => `asm("VALUE_${i} = %0" :: "n" ((long)(${text})));`),
  ];
  const lines = source.slice(1);
  const program = `${source[0]}\nvoid f() {\n${lines.join('\n')}\n}`;
  const assembly = avr(board, ['-S', '-O1'], program);
  return expressions.map((_, i) => Number(new RegExp(`VALUE_${i} = (-?\\d+)`).exec(assembly)![1]));
}

/** The entries of a table in pins_arduino.h as this board has it, comments dropped. */
export function table(board: BoardFacts, name: string): string[] {
  const source = '#define ARDUINO_MAIN\n#include <Arduino.h>';
  const text = avr(board, ['-E', '-fdirectives-only'], source).replace(/\/\/.*|\/\*.*?\*\//g, '');
  const body = new RegExp(`${name}\\[\\] = \\{([^}]*)\\}`).exec(text)![1]!;
  return body
    .split(',')
    .map((entry) => entry.replace(/\s/g, ''))
    .filter((entry) => entry !== '');
}
