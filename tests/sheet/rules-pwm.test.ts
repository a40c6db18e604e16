import { PICO, dualPwm } from './pin-changes.js';
import { testRules } from './rule-cases.js';

testRules({
  'pwm-outputs-distinct': [
    {
      when: 'GP0 and GP16 of a Pico',
      changes: { ...PICO, ...dualPwm(['GP0', 'GP1'], ['GP16', 'GP3']) },
      want: [
        '/drive/driver/right/in1: Pins GP0 (left in1) and GP16 (right in1) share one PWM output (slice 0, channel A).',
      ],
    },
    {
      when: 'GP10 and GP26 of a Pico',
      changes: { ...PICO, '/sensors/pins/5': 'GP20', ...dualPwm(['GP10', 'GP1'], ['GP2', 26]) },
      want: [
        '/drive/driver/right/in2: Pins GP10 (left in1) and GP26 (right in2) share one PWM output (slice 5, channel A).',
      ],
    },
    {
      when: 'both channels of a slice',
      changes: { ...PICO, ...dualPwm(['GP0', 'GP1'], ['GP2', 'GP3']) },
      want: [],
    },
    {
      when: 'a sensor on the twin of a PWM pin',
      changes: { ...PICO, '/sensors/pins/5': 'GP16', ...dualPwm(['GP0', 'GP1'], ['GP2', 'GP3']) },
      want: [],
    },
  ],
  'pwm-limit': [
    {
      when: 'the timer of the clock, beyond a slow driver',
      changes: { '/drive/driver/maxPwmKhz': 0.6 },
      want: [
        '/drive/driver/maxPwmKhz: PWM comes at 0.977 kHz, more than the driver takes: timer 0 keeps the clock and its frequency.',
      ],
    },
    {
      when: 'timer 1, which can be as slow as the driver',
      changes: {
        '/drive/driver/maxPwmKhz': 0.6,
        '/drive/driver/left/pwm': 9,
        '/drive/driver/right': { pwm: 10, in1: 4, in2: 12 },
      },
      want: [],
    },
    {
      when: 'a Pico and a slow driver',
      changes: { ...PICO, ...dualPwm(['GP0', 'GP3'], ['GP6', 'GP11']), '/drive/driver/maxPwmKhz': 0.5 },
      want: [],
    },
  ],
  'pwm-timers': [
    {
      when: 'both motors on the timer of the clock',
      changes: {},
      want: [
        '/drive/driver/left/pwm: PWM on 5 and 6 comes from timer 0, which also drives the millisecond clock: its frequency stays at 976.6 Hz.',
      ],
    },
    {
      when: 'motors on two timers, one of them the clock',
      changes: { '/drive/driver/left/pwm': 3 },
      want: [
        '/drive/driver/right/pwm: PWM on 6 comes from timer 0, which also drives the millisecond clock: its frequency stays at 976.6 Hz.',
        "/drive/driver: The motors' PWM comes from timer 0 (976.6 Hz) and timer 2 (490.2 Hz), so the two wheels may answer a little differently.",
      ],
    },
    {
      when: 'motors on two timers of one frequency',
      changes: { '/drive/driver/left/pwm': 3, '/drive/driver/right': { pwm: 9, in1: 4, in2: 12 } },
      want: [
        "/drive/driver: The motors' PWM comes from timer 1 (500 Hz) and timer 2 (490.2 Hz), so the two wheels may answer a little differently.",
      ],
    },
    {
      when: 'both motors on timer 1',
      changes: { '/drive/driver/left/pwm': 9, '/drive/driver/right': { pwm: 10, in1: 4, in2: 12 } },
      want: [],
    },
    { when: 'four PWM pins of one frequency', changes: dualPwm([3, 11], [9, 10]), want: [] },
    { when: 'a Pico', changes: { ...PICO, ...dualPwm(['GP0', 'GP3'], ['GP6', 'GP11']) }, want: [] },
  ],
});
