/** Vehicles for tests of the MicroPython firmware, as cart.ts has them for Arduino: changed copies of the demo sheet. */
import type { Changes } from '../sheet/example-sheet.js';

const PICO = {
  '/target': { board: 'pico', language: 'micropython' },
  '/start/buttonPin': 'GP15',
  '/sensors/lineLevel': 'high',
};
const ESP32 = {
  '/target': { board: 'esp32', language: 'micropython' },
  '/start/buttonPin': 4,
};
/** A Pico has three analog inputs; most bars on it are digital. */
const EIGHT_DIGITAL = {
  '/sensors/kind': 'digital',
  '/sensors/calibration': undefined,
  '/sensors/count': 8,
  '/sensors/pins': ['GP16', 'GP17', 'GP18', 'GP19', 'GP20', 'GP21', 'GP22', 'GP26'],
};
const THREE_ANALOG = {
  '/sensors/count': 3,
  '/sensors/pitchMm': 16,
  '/sensors/pins': ['GP26', 'GP27', 'GP28'],
  '/sensors/spotRadiusMm': 6,
};
const SIX_ANALOG = { '/sensors/pins': [36, 39, 34, 35, 32, 33] };
const STORED_6 = {
  '/sensors/calibration': {
    mode: 'stored',
    ground: [490, 500, 510, 480, 495, 505],
    line: [3300, 3350, 3400, 3320, 3280, 3360],
  },
};
const STORED_3 = {
  '/sensors/calibration': { mode: 'stored', ground: [600, 610, 590], line: [3100, 3000, 3050] },
};
const DARK_6 = {
  '/sensors/calibration': {
    mode: 'stored',
    ground: [2800, 2850, 2750, 2900, 2700, 2820],
    line: [400, 420, 390, 450, 380, 410],
  },
  '/line/polarity': 'dark-on-light',
};
const SWEEP = { '/sensors/calibration': { mode: 'sweep' } };
const MIXED = {
  '/sensors/kind': 'mixed',
  '/sensors/kinds': ['digital', 'analog', 'analog', 'analog', 'analog', 'digital'],
  '/sensors/lineLevel': 'low',
};
const RULES = { '/control/kind': 'rules' };
const ONE_CLASS = { '/speeds/classes': [{ name: 'all', minRadiusMm: 120, speedMps: 0.4 }] };
const UNEQUAL = { '/control/integral': 'always', '/tolerances/motorGainPercent': 20 };
const NO_CROSSINGS = { '/line/crossings': false, '/line/longestGapMm': 0 };

const IN_IN = (left: object, right: object, more: object = {}) => ({
  '/drive/driver': { scheme: 'pwm-in-in', left, right, ...more },
});
const PICO_IN_IN = IN_IN({ pwm: 'GP2', in1: 'GP3', in2: 'GP4' }, { pwm: 'GP5', in1: 'GP6', in2: 'GP7' });
const ESP32_IN_IN = IN_IN({ pwm: 25, in1: 26, in2: 27 }, { pwm: 14, in1: 13, in2: 23 }, { standbyPin: 22 });
const PICO_DIR = {
  '/drive/driver': {
    scheme: 'pwm-dir',
    left: { pwm: 'GP2', dir: 'GP3', inverted: true },
    right: { pwm: 'GP4', dir: 'GP5' },
  },
};
const ESP32_DUAL = {
  '/drive/driver': {
    scheme: 'dual-pwm',
    left: { in1: 25, in2: 26 },
    right: { in1: 27, in2: 14, inverted: true },
  },
};
const ESP32_DIGITAL = {
  '/sensors/kind': 'digital',
  '/sensors/calibration': undefined,
  '/sensors/lineLevel': 'low',
  '/sensors/pins': [36, 39, 34, 35, 32, 2],
};

/** Between them they use every branch of the templates, by what is special about them. */
export const MICROPYTHON_CARTS: Readonly<Record<string, Changes>> = {
  'esp32, analog': { ...ESP32, ...SIX_ANALOG, ...STORED_6, ...ESP32_IN_IN },
  'esp32, analog, rules': { ...ESP32, ...SIX_ANALOG, ...STORED_6, ...ESP32_DUAL, ...RULES },
  'esp32, dark line, no crossings': { ...ESP32, ...SIX_ANALOG, ...DARK_6, ...ESP32_DUAL, ...NO_CROSSINGS },
  'esp32, analog, integral part': { ...ESP32, ...SIX_ANALOG, ...STORED_6, ...ESP32_IN_IN, ...UNEQUAL },
  'esp32, sweep': { ...ESP32, ...SIX_ANALOG, ...SWEEP, ...ESP32_DUAL },
  'esp32, sweep, rules': { ...ESP32, ...SIX_ANALOG, ...SWEEP, ...ESP32_IN_IN, ...RULES },
  'esp32, digital on the LED pin': { ...ESP32, ...ESP32_DIGITAL, ...ESP32_IN_IN },
  'pico, three analog': { ...PICO, ...THREE_ANALOG, ...STORED_3, ...PICO_DIR },
  'pico, three analog, sweep': { ...PICO, ...THREE_ANALOG, ...SWEEP, ...PICO_IN_IN },
  'pico, digital, one class': { ...PICO, ...EIGHT_DIGITAL, ...PICO_DIR, ...ONE_CLASS },
  'pico, digital, rules': { ...PICO, ...EIGHT_DIGITAL, ...PICO_IN_IN, ...RULES },
  'esp32, mixed, sweep': { ...ESP32, ...SIX_ANALOG, ...MIXED, ...SWEEP, ...ESP32_DUAL },
  'pico, an LED of its own and a stop input': {
    ...PICO,
    ...THREE_ANALOG,
    ...STORED_3,
    ...PICO_DIR,
    '/led': { pin: 'GP9', activeLow: true },
    '/stopPin': 'GP10',
  },
  'esp32, encoders': {
    ...ESP32,
    ...SIX_ANALOG,
    ...STORED_6,
    ...ESP32_DUAL,
    '/encoders': { channels: 'single', linesPerTurn: 120, left: { a: 18 }, right: { a: 19 } },
  },
  'pico, quadrature encoders, rules': {
    ...PICO,
    ...EIGHT_DIGITAL,
    ...PICO_DIR,
    ...RULES,
    '/encoders': {
      channels: 'quadrature',
      linesPerTurn: 140,
      left: { a: 'GP10', b: 'GP11' },
      right: { a: 'GP12', b: 'GP13', inverted: true },
    },
  },
  'pico, digital, rules, no crossings': { ...PICO, ...EIGHT_DIGITAL, ...PICO_DIR, ...RULES, ...NO_CROSSINGS },
};
