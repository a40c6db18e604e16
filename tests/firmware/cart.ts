/** Vehicles for tests of the firmware: changed copies of the demo sheet, with a design that costs no search. */
import { controllerConstants } from '../../src/design/controller-constants.js';
import { classRanges } from '../../src/design/speed-classes.js';
import type { FirmwareDesign } from '../../src/firmware/render.js';
import { checkSheet } from '../../src/sheet/check.js';
import { toVehicle } from '../../src/sheet/to-vehicle.js';
import { STANDARD_GRAVITY_MPS2 } from '../../src/vehicle/gravity.js';
import type { Vehicle } from '../../src/vehicle/vehicle.js';
import { type Changes, changedSheet } from '../sheet/example-sheet.js';

export const SHEET = { digest: '0'.repeat(64) };

/** The vehicle of the demo sheet with some values changed. */
export function cart(changes: Changes = {}): Vehicle {
  const { sheet, problems } = checkSheet(changedSheet(changes));
  if (sheet === undefined) throw new Error(JSON.stringify(problems, undefined, 1));
  return toVehicle(sheet);
}

/**
 * A design with rules of thumb in the place of the search for laws and of the proof: curvature 2 y / L^2, which points the
 * vehicle at the line seen L ahead, and a lead of one motor lag. It drives the demo cart; the firmware's integers are made
 * from it as from any other.
 */
export function quickDesign(vehicle: Vehicle): FirmwareDesign {
  const { drive, bar } = vehicle;
  const classes = classRanges(vehicle).map((range) => {
    const gripMps = Math.sqrt(0.6 * drive.grip * STANDARD_GRAVITY_MPS2 * range.minRadiusM);
    return {
      name: range.name,
      minRadiusM: range.minRadiusM,
      speedMps: range.speedMps ?? Math.min(0.7 * drive.topSpeedMps, gripMps),
      limitedBy: 'grip' as const,
      gains: {
        proportionalPerM2: 2 / bar.aheadM ** 2,
        derivativeTimeS: drive.lagS,
        filterCoefficient: 0.4,
        ...(vehicle.control.integral === 'always' && { integralDistanceM: 5 * bar.aheadM }),
      },
    };
  });
  return { vehicle, classes, controller: controllerConstants(vehicle, classes) };
}

const NANO = { '/target/board': 'nano' };
const DUAL_PWM = {
  '/drive/driver': {
    scheme: 'dual-pwm',
    left: { in1: 5, in2: 6 },
    right: { in1: 9, in2: 10, inverted: true },
  },
};
const PWM_DIR = {
  '/drive/driver': {
    scheme: 'pwm-dir',
    left: { pwm: 9, dir: 7, inverted: true },
    right: { pwm: 10, dir: 13 },
  },
};
const SWEEP = { '/sensors/calibration': { mode: 'sweep' } };
const DIGITAL = { '/sensors/kind': 'digital', '/sensors/calibration': undefined };
const MIXED = {
  '/sensors/kind': 'mixed',
  '/sensors/kinds': ['digital', 'analog', 'analog', 'analog', 'analog', 'digital'],
  '/sensors/pins': [3, 'A1', 'A2', 'A3', 'A4', 4],
};
const RULES = { '/control/kind': 'rules' };
const NO_CROSSINGS = { '/line/crossings': false, '/line/longestGapMm': 0 };
const EIGHT = {
  ...NANO,
  '/sensors/count': 8,
  '/sensors/pins': ['A0', 'A1', 'A2', 'A3', 'A4', 'A5', 'A6', 'A7'],
  '/sensors/calibration': {
    mode: 'stored',
    ground: [700, 710, 690, 720, 705, 702, 698, 700],
    line: [90, 95, 80, 102, 99, 91, 88, 93],
  },
  '/line/polarity': 'dark-on-light',
};
const ONE_SPEED = { '/speeds/classes': [{ name: 'Crawl', minRadiusMm: 120, speedMps: 0.3 }] };
const UNEQUAL = { '/control/integral': 'always', '/tolerances/motorGainPercent': 20 };
const UNEVEN = { '/sensors/pitchMm': undefined, '/sensors/positionsMm': [27, 15, 5, -5, -15, -27] };

/** Vehicles that between them use every branch of the templates, by what is special about them. */
export const CARTS: Readonly<Record<string, Changes>> = {
  'the demo cart': {},
  'the demo cart with rules': RULES,
  'digital sensors': { ...DIGITAL, ...DUAL_PWM },
  'digital sensors and rules': { ...DIGITAL, ...DUAL_PWM, ...RULES, ...NANO, '/sensors/lineLevel': 'low' },
  'a sweep': { ...SWEEP, ...PWM_DIR },
  'a sweep, dark line, and rules': { ...SWEEP, ...PWM_DIR, ...RULES, '/line/polarity': 'dark-on-light' },
  'eight sensors, dark line': EIGHT,
  'eight sensors, dark line and rules': { ...EIGHT, ...RULES },
  'mixed sensors, a sweep, dark line': {
    ...MIXED,
    ...SWEEP,
    '/sensors/lineLevel': 'low',
    '/line/polarity': 'dark-on-light',
  },
  'an LED of its own and a stop input': { '/led': { pin: 4, activeLow: true }, '/stopPin': 12 },
  'one speed for all': ONE_SPEED,
  'an integral part': UNEQUAL,
  'uneven bar without crossings': { ...UNEVEN, ...NO_CROSSINGS },
  encoders: { '/encoders': { channels: 'single', linesPerTurn: 120, left: { a: 3 }, right: { a: 4 } } },
  'quadrature encoders, rules and a sweep': {
    ...SWEEP,
    ...PWM_DIR,
    ...RULES,
    '/encoders': {
      channels: 'quadrature',
      linesPerTurn: 700,
      left: { a: 3, b: 12 },
      right: { a: 11, b: 4, inverted: true },
    },
  },
  'uneven bar without crossings and rules': { ...UNEVEN, ...NO_CROSSINGS, ...RULES },
};
