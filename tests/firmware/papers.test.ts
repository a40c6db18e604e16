/** The papers beside the firmware: every pin is in the wiring table, commands name the files, no text becomes markup. */
import { basename } from 'node:path';
import { describe, expect, it } from 'vitest';
import { markdown } from '../../src/firmware/markdown.js';
import { renderProject } from '../../src/firmware/papers.js';
import { BOARDS, BOARD_IDS } from '../../src/vehicle/boards.js';
import type { DriverSchemeId } from '../../src/vehicle/drivers.js';
import { plannedCart } from '../vehicle/planned-cart.js';
import { SHEET, cart, quickDesign } from './cart.js';

const SCHEMES: readonly DriverSchemeId[] = ['pwm-dir', 'pwm-in-in', 'dual-pwm'];
const CASES = BOARD_IDS.flatMap((board) => SCHEMES.map((scheme) => [board, scheme] as const));

/** Cells of a table's row: what stands between bars that are not escaped. */
const cells = (line: string): string[] =>
  line
    .split(/(?<!\\)\|/)
    .slice(1, -1)
    .map((cell) => cell.trim());

describe.each(CASES)('%s with %s', (board, scheme) => {
  const standby = scheme === 'pwm-in-in';
  const changes = plannedCart(board, { sensorKind: 'digital', sensorCount: 6, scheme, standby });
  const design = quickDesign(cart({ ...changes, '/name': 'tray_cart_2' }));
  const { vehicle } = design;

  it('wires every pin once, and gives commands for every file', async () => {
    const files = await renderProject(SHEET, design);
    const text = (name: string): string => files.find(({ path }) => basename(path) === name)?.text ?? '';
    const wiring = text('WIRING.md').split('\n');
    const used = wiring.slice(wiring.findIndex((line) => line.startsWith('| ---')) + 1);
    const pins = used.slice(0, used.indexOf('')).map((line) => cells(line)[0]!);
    const { left, right, standby: standbyPin } = vehicle.drive;
    const motors = [left, right].flatMap(({ pwm, dir, in1, in2 }) => [pwm, dir, in1, in2]);
    const wanted = [...vehicle.bar.pins, ...motors, standbyPin, vehicle.start.button].filter(
      (pin) => pin !== undefined,
    );
    expect(pins.slice(0, -2)).toEqual(wanted.map(({ label }) => label));
    for (const line of wiring.filter((each) => each.startsWith('|'))) expect(cells(line)).toHaveLength(3);
    const loading = text('FLASHING.md');
    const { core } = BOARDS[board];
    if (core === undefined) {
      const copied = [...loading.matchAll(/^mpremote cp (.*) :$/gm)].flatMap((match) => match[1]!.split(' '));
      const modules = files.map(({ path }) => basename(path)).filter((name) => name.endsWith('.py'));
      expect([...copied].sort()).toEqual(modules.sort());
      expect(copied.at(-1)).toBe('main.py');
      expect(text('sketch.yaml')).toBe('');
    } else {
      expect(loading).toContain('arduino-cli compile tray_cart_2\n');
      expect(text('sketch.yaml')).toContain(`    fqbn: ${core.fqbn}\n`);
    }
    expect(files.every(({ text: each }) => each.endsWith('\n') && !each.includes('undefined'))).toBe(true);
  });
});

it('names an analog input as both sides of the board do', async () => {
  const changes = plannedCart('leonardo', { sensorKind: 'analog', sensorCount: 6, scheme: 'pwm-dir' });
  const files = await renderProject(SHEET, quickDesign(cart(changes)));
  const wiring = files.find(({ path }) => path.endsWith('WIRING.md'))!.text;
  expect(wiring).toContain('| 4 (A6) | output of sensor 1 of 6');
  // Reading "4" would read another input: pins_arduino.h of the Leonardo.
  expect(files.find(({ path }) => path.endsWith('pins.h'))!.text).toContain('SENSOR_PINS[] = {A6, ');
});

it.each([
  ['a | b', 'a \\| b'],
  ['<script>', '\\<script\\>'],
  ['[x](http://y)', '\\[x\\](http\\://y)'],
  ['`code` *b* _i_', '\\`code\\` \\*b\\* \\_i\\_'],
  ['end\\', 'end\\<U+005C\\>'],
  ['two\n# lines', 'two\\<U+000A\\>\\# lines'],
  ['&lt;', '\\&lt;'],
])('text as text: %j', (text, want) => {
  expect(markdown(text)).toBe(want);
});
