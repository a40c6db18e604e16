import type { Changes } from './example-sheet.js';

/** Turns the demo sheet into one for a Pico with digital sensors; the driver's pins come on top. */
export const PICO: Changes = {
  '/target': { board: 'pico', language: 'micropython' },
  '/sensors/kind': 'digital',
  '/sensors/pins': ['GP5', 'GP6', 'GP7', 'GP8', 'GP9', 'GP10'],
  '/sensors/calibration': undefined,
  '/start/buttonPin': 'GP4',
};
/** The four pins of two motors with dual PWM. */
export const dualPwm = (left: [unknown, unknown], right: [unknown, unknown]): Changes => ({
  '/drive/driver': {
    scheme: 'dual-pwm',
    left: { in1: left[0], in2: left[1] },
    right: { in1: right[0], in2: right[1] },
  },
});
