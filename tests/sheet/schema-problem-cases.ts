/** Single faults of a sheet, and the problems that the schema finds. */
import type { Problem } from '../../src/sheet/problem.js';
import type { Changes } from './example-sheet.js';

export interface SchemaProblemCase {
  when: string;
  changes: Changes;
  want: Problem[];
}

export const SCHEMA_PROBLEM_CASES: SchemaProblemCase[] = [
  {
    when: 'a number out of range',
    changes: { '/sensors/pitchMm': 95 },
    want: [
      {
        pointer: '/sensors/pitchMm',
        message: '95 mm is outside 3 to 30 mm.',
        got: '95 mm',
        allowed: '3 to 30 mm',
        fix: 'Measure centre to centre between neighbouring sensors.',
      },
    ],
  },
  {
    when: 'a length with its unit in a text',
    changes: { '/drive/wheelDiameterMm': '4.2 cm' },
    want: [
      {
        pointer: '/drive/wheelDiameterMm',
        message: '"4.2 cm" is not a number of mm.',
        got: '"4.2 cm"',
        allowed: '15 to 250 mm',
        fix: 'Write 42 without quotes; the unit is always mm.',
      },
    ],
  },
  {
    when: 'a half sensor',
    changes: { '/sensors/count': 2.5 },
    want: [
      {
        pointer: '/sensors/count',
        message: '2.5 is not a whole number.',
        got: '2.5',
        allowed: 'a whole number from 2 to 16',
        fix: 'Count the sensors that are wired to the board.',
      },
    ],
  },
  {
    when: 'a misspelt choice',
    changes: { '/target/board': 'unno' },
    want: [
      {
        pointer: '/target/board',
        message: '"unno" is not allowed here: it takes uno, nano, mega2560, leonardo, pico or esp32.',
        got: '"unno"',
        allowed: 'uno, nano, mega2560, leonardo, pico or esp32',
        fix: 'Did you mean "uno"?',
      },
    ],
  },
  {
    when: 'no choice at all',
    changes: { '/control/kind': null },
    want: [
      {
        pointer: '/control/kind',
        message: 'null is not allowed here: it takes pid or rules.',
        got: 'null',
        allowed: 'pid or rules',
        fix: 'Choose pid or rules.',
      },
    ],
  },
  {
    when: 'half a pin',
    changes: { '/start/buttonPin': 2.5 },
    want: [
      {
        pointer: '/start/buttonPin',
        message: '2.5 is not a whole number.',
        got: '2.5',
        allowed: 'a whole number from 0 to 99',
        fix: 'Write the label as printed beside the pin.',
      },
    ],
  },
  {
    when: 'no pin: one problem for both forms',
    changes: { '/drive/driver/left/pwm': null, '/sensors/pins/3': 'A0; reboot' },
    want: [
      {
        pointer: '/sensors/pins/3',
        message: '"A0; reboot" is not allowed here: it takes a name such as A0 or GP26.',
        got: '"A0; reboot"',
        allowed: 'a name such as A0 or GP26',
        fix: 'Write the label as printed beside the pin.',
      },
      {
        pointer: '/drive/driver/left/pwm',
        message:
          'null is not allowed here: it takes a whole number from 0 to 99 or a name such as A0 or GP26.',
        got: 'null',
        allowed: 'a whole number from 0 to 99 or a name such as A0 or GP26',
        fix: 'Write the label as printed beside the pin.',
      },
    ],
  },
  {
    when: 'speed classes: neither auto nor a list',
    changes: { '/speeds/classes': 'fast' },
    want: [
      {
        pointer: '/speeds/classes',
        message: '"fast" is not allowed here: it takes auto or a list of 1 to 64 entries.',
        got: '"fast"',
        allowed: 'auto or a list of 1 to 64 entries',
        fix: 'Write "auto", or a list such as [{ "name": "bend", "minRadiusMm": 120, "speedMps": 0.4 }].',
      },
    ],
  },
  {
    when: 'speed classes: a list with faults, each told',
    changes: { '/speeds/classes': [{ name: 'x', minRadiusMm: 1, speedMps: 2 }, 7] },
    want: [
      {
        pointer: '/speeds/classes/0/minRadiusMm',
        message: '1 mm is outside 40 to 100000 mm.',
        got: '1 mm',
        allowed: '40 to 100000 mm',
        fix: 'Give the tightest centre-line radius that is driven at this speed.',
      },
      {
        pointer: '/speeds/classes/1',
        message: '7 is not an object.',
        got: '7',
        allowed: 'an object: { ... }',
        fix: 'Write an object with the keys name and speedMps.',
      },
    ],
  },
  {
    when: 'a list too short',
    changes: { '/sensors/calibration/line': [1] },
    want: [
      {
        pointer: '/sensors/calibration/line',
        message: 'a list of 1 entry is not a list of 2 to 16 entries.',
        got: 'a list of 1 entry',
        allowed: 'a list of 2 to 16 entries',
        fix: 'Give one reading for each sensor, leftmost first.',
      },
    ],
  },
  {
    when: 'another version',
    changes: { '/sheetVersion': 2 },
    want: [
      {
        pointer: '/sheetVersion',
        message: '2 is not allowed here: it takes 1.',
        got: '2',
        allowed: '1',
        fix: 'Write 1, the one version there is.',
      },
    ],
  },
  {
    when: 'yes for true',
    changes: { '/line/crossings': 'yes' },
    want: [
      {
        pointer: '/line/crossings',
        message: '"yes" is not true or false.',
        got: '"yes"',
        allowed: 'true or false',
        fix: 'Whether lanes cross each other.',
      },
    ],
  },
];
