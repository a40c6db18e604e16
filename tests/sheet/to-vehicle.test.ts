import { expect, test } from 'vitest';
import { checkSheet } from '../../src/sheet/check.js';
import { withDefaults } from '../../src/sheet/defaults.js';
import { toVehicle } from '../../src/sheet/to-vehicle.js';
import type { Vehicle } from '../../src/vehicle/vehicle.js';
import { changedSheet, type Changes } from './example-sheet.js';
import { PICO, dualPwm } from './pin-changes.js';

function vehicleOf(changes: Changes = {}): Vehicle {
  const { sheet, problems } = checkSheet(changedSheet(changes));
  if (sheet === undefined) throw new Error(JSON.stringify(problems));
  return toVehicle(sheet);
}

test('the demo cart in SI units', () => {
  const { board, bar, drive, start, ...rest } = vehicleOf();
  expect(rest).toEqual({
    name: 'tray-cart',
    language: 'arduino',
    line: {
      polarity: 'light-on-dark',
      widthM: 0.019,
      tightestRadiusM: 0.12,
      longestGapM: 0.04,
      crossings: true,
    },
    power: { nominalV: 6, fullV: 6.6, emptyV: 5.2 },
    control: { kind: 'pid', stateMemory: true, swingM: 0.01 },
    speeds: { classes: 'auto', finishTarget: 0.995 },
    tolerance: { motorGain: 0.07, lag: 0.35, grip: 0.2 },
  });
  expect(board.id).toBe('uno');
  expect(bar.positionsM).toEqual([0.025, 0.015, 0.005, -0.005, -0.015, -0.025]);
  expect(bar).toMatchObject({ kind: 'analog', aheadM: 0.075, spotRadiusM: 0.004 });
  expect(bar.pins.map(({ code }) => code)).toEqual(['A0', 'A1', 'A2', 'A3', 'A4', 'A5']);
  // pi * 0.042 m * 682 / 60 s
  expect(drive.topSpeedMps).toBeCloseTo(1.4997963328, 9);
  expect(drive).toMatchObject({
    trackM: 0.12,
    wheelDiameterM: 0.042,
    lagS: 0.08,
    startDuty: 0.1,
    trimLeft: 1,
    trimRight: 1,
  });
  expect(start).toMatchObject({ countdownS: 0.5, runLimitS: 120, button: { code: '2' } });
});

test('wiring by scheme', () => {
  const codes = ({ inverted, ...pins }: Vehicle['drive']['left']): unknown => ({
    inverted,
    ...Object.fromEntries(Object.entries(pins).map(([key, pin]) => [key, pin.code])),
  });
  const uno = vehicleOf({ '/drive/driver/standbyPin': 4, '/drive/driver/left/inverted': true }).drive;
  expect(codes(uno.left)).toEqual({ pwm: '5', in1: '7', in2: '8', inverted: true });
  expect(codes(uno.right)).toEqual({ pwm: '6', in1: '9', in2: '10', inverted: false });
  expect(uno.standby?.code).toBe('4');
  const pico = vehicleOf({ ...PICO, ...dualPwm([0, 'GP1'], ['gp2', 'GPIO3']) }).drive;
  expect(codes(pico.left)).toEqual({ in1: '0', in2: '1', inverted: false });
  expect(codes(pico.right)).toEqual({ in1: '2', in2: '3', inverted: false });
  expect(pico).not.toHaveProperty('standby');
});

test('a row with a middle sensor has it at 0, symmetrical about it', () => {
  const changes = {
    '/sensors/count': 5,
    '/sensors/pins': ['A0', 'A1', 'A2', 'A3', 'A4'],
    '/sensors/calibration': undefined,
  };
  const { positionsM } = vehicleOf(changes).bar;
  expect(positionsM[2]).toBe(0);
  positionsM.forEach((position, index) => expect(position).toBeCloseTo(-(positionsM[4 - index] ?? NaN), 15));
});

test('positions as given', () => {
  const positionsMm = [30, 15, 4, -4, -15, -30];
  const { positionsM } = vehicleOf({
    '/sensors/pitchMm': undefined,
    '/sensors/positionsMm': positionsMm,
  }).bar;
  expect(positionsM).toEqual([0.03, 0.015, 0.004, -0.004, -0.015, -0.03]);
});

test.each([
  ['light-on-dark', 123, 839],
  ['dark-on-light', 839, 123],
])('a sweep without readings starts from a typical sensor: %s', (polarity, ground, line) => {
  const { calibration } = vehicleOf({
    '/sensors/calibration': { mode: 'sweep' },
    '/line/polarity': polarity,
  }).bar;
  expect(calibration).toEqual({ mode: 'sweep', ground: Array(6).fill(ground), line: Array(6).fill(line) });
});

test('a sweep with readings starts from them', () => {
  const ground = [10, 11, 12, 13, 14, 15];
  const line = [500, 501, 502, 503, 504, 505];
  const { calibration } = vehicleOf({ '/sensors/calibration': { mode: 'sweep', ground, line } }).bar;
  expect(calibration).toEqual({ mode: 'sweep', ground, line });
});

test('digital sensors read 0 and 1', () => {
  const { calibration, lineLevel } = vehicleOf({
    ...PICO,
    ...dualPwm([0, 1], [2, 3]),
    '/sensors/lineLevel': 'low',
  }).bar;
  expect(calibration).toEqual({ mode: 'stored', ground: [0, 0, 0, 0, 0, 0], line: [1, 1, 1, 1, 1, 1] });
  expect(lineLevel).toBe('low');
});

test('speed follows the voltage', () => {
  const power = { nominalV: 7.4, fullV: 8.4, emptyV: 6.4 };
  expect(vehicleOf({ '/power': power }).drive.topSpeedMps).toBeCloseTo((1.4997963328 * 7.4) / 6, 9);
});

test('speed classes come tightest first', () => {
  const classes = [
    { name: 'wide', minRadiusMm: 500, speedMps: 0.8 },
    { name: 'bend', minRadiusMm: 120, speedMps: 0.4 },
  ];
  expect(vehicleOf({ '/speeds/classes': classes }).speeds.classes).toEqual([
    { name: 'bend', minRadiusM: 0.12, speedMps: 0.4 },
    { name: 'wide', minRadiusM: 0.5, speedMps: 0.8 },
  ]);
});

test('trim as a factor', () => {
  expect(vehicleOf({ '/drive/trim': { leftPercent: 95 } }).drive).toMatchObject({
    trimLeft: 0.95,
    trimRight: 1,
  });
});

test('a sheet that was not checked is a defect, told as such', () => {
  expect(() => toVehicle(withDefaults(changedSheet({ '/start/buttonPin': 'A9' })))).toThrow(
    'Uno has no pin A9',
  );
  expect(() => toVehicle(withDefaults(changedSheet({ '/sensors/pitchMm': undefined })))).toThrow(
    'contradictory',
  );
});
