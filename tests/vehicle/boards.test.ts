import { describe, expect, test } from 'vitest';
import type { BoardId } from '../../src/vehicle/board-facts.js';
import { BOARDS, findPin, listPins, sheetLabel } from '../../src/vehicle/boards.js';
import { DRIVERS } from '../../src/vehicle/drivers.js';

test.each<[board: BoardId, label: number | string, want: string | undefined]>([
  ['uno', 5, '5'],
  ['uno', '5', '5'],
  ['uno', 'D5', '5'],
  ['uno', 'd5', '5'],
  ['uno', 'A0', 'A0'],
  ['uno', 'a0', 'A0'],
  ['uno', 14, 'A0'],
  ['uno', 'D19', 'A5'],
  ['uno', 20, undefined],
  ['uno', 'A6', undefined],
  ['uno', 'GP5', undefined],
  ['uno', '', undefined],
  ['uno', -1, undefined],
  ['uno', 5.5, undefined],
  ['nano', 'A6', 'A6'],
  ['nano', 21, 'A7'],
  ['nano', 'A8', undefined],
  ['pico', 'GP26', 'GP26'],
  ['pico', 'gp26', 'GP26'],
  ['pico', 26, 'GP26'],
  ['pico', 'GPIO26', 'GP26'],
  ['pico', 30, undefined],
  ['pico', 'A0', undefined],
  ['esp32', 'GPIO32', 'GPIO32'],
  ['esp32', 'IO32', 'GPIO32'],
  ['esp32', 'io32', 'GPIO32'],
  ['esp32', 'D32', 'GPIO32'],
  ['esp32', 32, 'GPIO32'],
  ['esp32', '32', 'GPIO32'],
  ['esp32', 20, undefined],
  ['esp32', 24, undefined],
  ['esp32', 31, undefined],
  ['esp32', 40, undefined],
  ['esp32', 'GP32', undefined],
])('on %s, pin %j is %s', (board, label, want) => {
  expect(findPin(BOARDS[board], label)?.label).toBe(want);
});

describe.each(Object.values(BOARDS))('$id', (board) => {
  test('is listed under its own name, with sources', () => {
    expect(BOARDS[board.id]).toBe(board);
    expect(board.sources.length).toBeGreaterThan(1);
  });

  test('has no spelling for two pins, and each spelling fits the sheet', () => {
    const spellings = board.pins.flatMap(({ label, aliases }) => [label, ...aliases]);
    expect(new Set(spellings).size).toBe(spellings.length);
    for (const spelling of spellings) expect(spelling).toMatch(/^[A-Z]{0,4}[0-9]{1,2}$/);
    for (const pin of board.pins) expect(findPin(board, sheetLabel(pin))).toBe(pin);
  });

  test('has pins that do not contradict themselves', () => {
    for (const pin of board.pins) {
      if (pin.pwm) expect(pin.output, `${pin.label}: PWM needs an output`).toBe(true);
      if (pin.pullUp) expect(pin.input, `${pin.label}: a pull-up needs an input`).toBe(true);
      if (pin.interrupt) expect(pin.input, `${pin.label}: an interrupt needs an input`).toBe(true);
      expect(pin.input || pin.output || pin.adc !== undefined, `${pin.label} can do something`).toBe(true);
      for (const text of [pin.reserved, pin.caution, pin.adc?.caution]) {
        if (text !== undefined) expect(text).toMatch(/^(it|the|most|modules) .*[^.]$/);
      }
    }
  });

  test('has one pin for each channel of each converter', () => {
    const channels = board.pins.flatMap(({ adc }) => (adc ? [`${adc.unit ?? 1}.${adc.channel}`] : []));
    expect(new Set(channels).size).toBe(channels.length);
  });

  test('is plain data, which a worker thread can be handed', () => {
    expect(structuredClone(board)).toEqual(board);
  });

  test('reads all sensors and computes within half its sample period', () => {
    const analogPins = board.pins.filter(({ adc, reserved }) => adc && reserved === undefined).length;
    const analogS = Math.min(16, analogPins) * board.adcReadS;
    const digitalS = 16 * board.digitalReadS;
    expect(Math.max(analogS, digitalS) + board.computeS).toBeLessThan(0.6 * board.samplePeriodS);
  });

  test('states the lowest PWM frequency of its timers', () => {
    const { timerPwmHz, pwmHz } = board;
    if (timerPwmHz) expect(pwmHz).toBe(Math.min(...Object.values(timerPwmHz)));
    for (const { pwm } of board.pins) if (pwm && timerPwmHz) expect(timerPwmHz[pwm.timer]).toBeGreaterThan(0);
  });
});

test('a Nano is an Uno with A6 and A7: the same pins', () => {
  const { uno, nano } = BOARDS;
  expect(nano.pins.slice(0, uno.pins.length).map(({ label }) => label)).toEqual(
    uno.pins.map(({ label }) => label),
  );
  expect(nano.pins[5]).toStrictEqual(uno.pins[5]);
  expect(nano.pins.slice(uno.pins.length).map(({ label, input, output }) => [label, input, output])).toEqual([
    ['A6', false, false],
    ['A7', false, false],
  ]);
});

test.each<[labels: (number | string)[], want: string]>([
  [[], ''],
  [[2], '2'],
  [[2, 3], '2, 3'],
  [[2, 3, 4, 6, 'A0', 'A1', 'A2'], '2 to 4, 6, A0 to A2'],
  [[13, 'A0'], '13, A0'],
])('lists %j as %s', (labels, want) => {
  expect(listPins(labels.flatMap((label) => findPin(BOARDS.uno, label) ?? []))).toBe(want);
});

test.each<[label: string, want: number | string]>([
  ['5', 5],
  ['A0', 'A0'],
])('the sheet writes Uno pin %s as %j', (label, want) => {
  const pin = findPin(BOARDS.uno, label);
  expect(pin && sheetLabel(pin)).toBe(want);
});

test('each driver scheme takes the pins that the design names', () => {
  const summary = Object.values(DRIVERS).map(({ id, motorPins, standby }) => [
    id,
    motorPins.map(({ key, pwm }) => (pwm ? `${key}*` : key)).join(' '),
    standby,
  ]);
  expect(summary).toEqual([
    ['pwm-dir', 'pwm* dir', false],
    ['pwm-in-in', 'pwm* in1 in2', true],
    ['dual-pwm', 'in1* in2*', false],
  ]);
});
