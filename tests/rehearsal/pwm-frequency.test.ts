/** The motors' PWM on the emulated chip has the frequency that timers and driver allow, and drives as the duty says. */
import { expect, it } from 'vitest';
import { pinNumber } from '../../src/rehearsal/chip-avr.js';
import { motorPwmHz } from '../../src/vehicle/pwm-modes.js';
import { cart, quickDesign } from '../firmware/cart.js';
import type { Changes } from '../sheet/example-sheet.js';
import { plannedCart } from '../vehicle/planned-cart.js';
import { ChipBench, imageOf, lineAt } from './chip-bench.js';

const inIn = (left: number, right: number, maxPwmKhz?: number): Changes => ({
  '/drive/driver': {
    scheme: 'pwm-in-in',
    left: { pwm: left, in1: 7, in2: 8 },
    right: { pwm: right, in1: 4, in2: 12 },
    ...(maxPwmKhz !== undefined && { maxPwmKhz }),
  },
});
const mega = (scheme: 'dual-pwm' | 'pwm-dir'): Changes =>
  plannedCart('mega2560', { sensorKind: 'analog', sensorCount: 6, scheme });

/** By the formulas of the data sheets: 16 MHz / (2 N top), top 255 for an 8-bit timer. */
const CASES: [string, Changes, hz: number][] = [
  ['uno, timer 1', inIn(9, 10), 20e3],
  ['uno, timer 1, a driver for 8 kHz', inIn(9, 10, 8), 8e3],
  ['uno, timer 1, a driver for 1 kHz', inIn(9, 10, 1), 1e3],
  ['uno, timer 2', inIn(3, 11), 16e6 / (2 * 64 * 255)],
  ['uno, timer 2, a driver for 40 kHz', inIn(3, 11, 40), 16e6 / (2 * 255)],
  ['mega2560, two 16-bit timers', mega('dual-pwm'), 20e3],
];

it.each(CASES)('%s', { timeout: 60_000 }, async (_, changes, hz) => {
  const made = quickDesign(cart({ ...changes, '/start/countdownS': 0 }));
  const { vehicle } = made;
  expect(motorPwmHz(vehicle) / hz).toBeCloseTo(1, 3);
  // beside the middle, so that the duties are between off and full
  const rig = new ChipBench(await imageOf(made), vehicle, lineAt(vehicle, 0.005));
  rig.start();
  const { left } = vehicle.drive;
  const pins = [left.pwm ?? left.in1!, ...(left.pwm ? [] : [left.in2!])].map(pinNumber);
  const edgesOf = pins.map(() => 0);
  let before = pins.map((pin) => rig.chip.isHigh(pin));
  const look = rig.motors.look.bind(rig.motors);
  rig.motors.look = (chip) => {
    const now = pins.map((pin) => chip.isHigh(pin));
    now.forEach((high, i) => {
      if (high && !before[i]) edgesOf[i]!++;
    });
    before = now;
    look(chip);
  };
  rig.run(0.1);
  expect(rig.isDriven).toBe(true);
  expect(Math.max(...edgesOf) / 0.1 / hz).toBeCloseTo(1, 1);
});
