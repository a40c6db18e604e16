/** Rule tables keep the swing that the sheet allows, by the wheel-speed proportion. */
import { expect, test } from 'vitest';
import { calmLaws } from '../../src/design/calm-laws.js';
import { classBases } from '../../src/design/class-base.js';
import { largestSwingM } from '../../src/design/rule-cycle.js';
import { classRanges, speedLimits } from '../../src/design/speed-classes.js';
import { bestLaw, proportionalRange } from '../../src/design/steering-gains.js';
import { keeps, worstMargins } from '../../src/design/tolerance-box.js';
import type { Vehicle } from '../../src/vehicle/vehicle.js';
import { demoVehicle } from './demo-vehicle.js';

const demo = demoVehicle('rules');
/** Speed at which a gain of 600 per m^2 without memory swings by more than 12 mm, but does not grow for ever, m/s. */
const SPEED_MPS = (() => {
  const { vehicle } = at(0.012, 0.3, 0.7);
  for (let speedMps = 0.7; speedMps < 1; speedMps += 0.002) {
    const { gains } = bestLaw(vehicle, speedMps, 600);
    const swingM = largestSwingM(vehicle, { gains, speedMps }, 600);
    if (swingM > 0.0125 && Number.isFinite(swingM)) return speedMps;
  }
  throw new Error('no such speed');
})();

/** The tight class of a vehicle whose law is the wanted gain without memory, at a speed where that swings. */
function at(swingM: number, tightestRadiusM: number, speedMps: number) {
  const vehicle: Vehicle = {
    ...demo,
    tolerance: { motorGain: 0, lag: 0, grip: 0 },
    power: { nominalV: 6, fullV: 6, emptyV: 6 },
    line: { ...demo.line, tightestRadiusM },
    control: { ...demo.control, stateMemory: false, swingM },
  };
  const range = classRanges(vehicle).find(({ name }) => name === 'tight')!;
  const gains = bestLaw(vehicle, speedMps, 600).gains;
  const limits = speedLimits(vehicle, range);
  return { vehicle, base: { range, limits, allowedMps: speedMps, gains } };
}

const swinging = (swingM: number, tightestRadiusM: number) => at(swingM, tightestRadiusM, SPEED_MPS);

const swingOf = (vehicle: Vehicle, gains: ReturnType<typeof bestLaw>['gains']) =>
  largestSwingM(vehicle, { gains, speedMps: SPEED_MPS }, 600);

test('a proportion that swings too far is lowered until it does not, and no further', () => {
  const { vehicle, base } = swinging(0.012, 0.3);
  expect(swingOf(vehicle, base.gains)).toBeGreaterThan(0.012);
  const [calm] = calmLaws(vehicle, [base]);
  const kp = calm!.gains.proportionalPerM2;
  expect(swingOf(vehicle, calm!.gains)).toBeLessThanOrEqual(0.012);
  expect(kp).toBeGreaterThan(proportionalRange(vehicle, 0.3)[0]);
  expect(swingOf(vehicle, bestLaw(vehicle, SPEED_MPS, 1.1 * kp).gains)).toBeGreaterThan(0.012);
});

test('one that does not is left alone', () => {
  const { vehicle, base } = swinging(0.1, 0.3);
  const calmer = { ...base, gains: bestLaw(vehicle, SPEED_MPS, 250).gains };
  expect(calmLaws(vehicle, [calmer])).toEqual([calmer]);
});

test('a table without memory of the state before drives slower, and keeps its margins', () => {
  const bare: Vehicle = { ...demo, control: { ...demo.control, stateMemory: false } };
  const damped = classBases(demo);
  for (const [i, { gains, allowedMps }] of classBases(bare).entries()) {
    expect(gains.derivativeTimeS).toBe(0);
    expect(allowedMps).toBeLessThan(damped[i]!.allowedMps);
    expect(keeps(worstMargins(bare, allowedMps, gains))).toBe(true);
  }
});
