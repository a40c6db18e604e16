import { beforeAll, describe, expect, test } from 'vitest';
import { compileCourse } from '../../src/course/lane.js';
import { Twin } from '../../src/controller/twin.js';
import { SteeringLaw } from '../../src/controller/steering-law.js';
import { CURVATURE_PER_INV_M, OFFSET_PER_M, PHASE, SPEED_BITS } from '../../src/controller/constants.js';
import { biasOffsetM, hasIntegral, needsIntegral } from '../../src/design/bias.js';
import { deriveDesign } from '../../src/design/derive.js';
import type { Design } from '../../src/design/design.js';
import {
  keeps,
  toleranceCorners,
  marginsAt,
  withoutIntegral,
  worstMargins,
} from '../../src/design/tolerance-box.js';
import { Random } from '../../src/rehearsal/random.js';
import { perturbedPlant } from '../../src/rehearsal/plant-parameters.js';
import { twinEngine } from '../../src/rehearsal/twin-maker.js';
import type { Vehicle } from '../../src/vehicle/vehicle.js';
import { example } from '../course/courses.js';
import { demoVehicle } from './demo-vehicle.js';

/** The demo cart with motors that may differ so much. */
function unequal(motorGain: number, integral?: 'always' | 'never'): Vehicle {
  const vehicle = demoVehicle();
  const control = integral === undefined ? vehicle.control : { ...vehicle.control, integral };
  return { ...vehicle, control, tolerance: { ...vehicle.tolerance, motorGain } };
}

const LOOSE = unequal(0.15);
let withIntegral: Design;
let without: Design;
beforeAll(() => {
  withIntegral = deriveDesign(LOOSE);
  without = deriveDesign(unequal(0.15, 'never'));
}, 120_000);

test('the design integrates where unequal motors would hold the line too far beside the middle, and only there', () => {
  expect(hasIntegral(withIntegral)).toBe(true);
  expect(needsIntegral(without)).toBe(true);
  expect(hasIntegral(without)).toBe(false);
  const demo = deriveDesign(demoVehicle());
  expect(hasIntegral(demo)).toBe(false);
  expect(demo.controller.integral).toBeUndefined();
  expect(biasOffsetM(demo)).toBeLessThan(0.2 * 0.0345);
}, 60_000);

test('margins hold at 200 points of the tolerance box, with the integral part at work and standing still', () => {
  const random = new Random(5, 1);
  const corners = toleranceCorners(LOOSE);
  const range = (of: 'gain' | 'lag') => corners.map((each) => each[of]);
  for (const { gains, speedMps, worstMargins: worst } of withIntegral.classes) {
    const frozen = withoutIntegral(gains);
    for (let i = 0; i < 200 / withIntegral.classes.length; i++) {
      const at = {
        gain: random.uniform(Math.min(...range('gain')), Math.max(...range('gain'))),
        lag: random.uniform(Math.min(...range('lag')), Math.max(...range('lag'))),
      };
      for (const law of [gains, frozen]) expect(keeps(marginsAt(LOOSE, speedMps, law, at))).toBe(true);
    }
    expect(worst).toEqual(worstMargins(LOOSE, speedMps, gains));
  }
});

test('the polynomials are what the firmware does: the response to a small step of the offset', () => {
  const { controller: constants, classes } = withIntegral;
  const { controller } = classes[0]!;
  // 1 mm: below what counts as a bend
  const stepM = 1e-3;
  const law = new SteeringLaw(constants);
  const speed = Math.round((classes[0]!.speedMps / LOOSE.drive.topSpeedMps) * 2 ** SPEED_BITS);
  const ys: number[] = [];
  const us: number[] = [];
  for (let k = 0; k < 400; k++) {
    const y = k < 2 ? 0 : stepM;
    ys.unshift(y);
    const sum = (of: readonly number[], values: readonly number[]) =>
      of.reduce((total, each, i) => total + each * (values[i] ?? 0), 0);
    const u = sum(controller.numerator, ys) - sum(controller.denominator.slice(1), us);
    us.unshift(u);
    const got = law.curvature(Math.round(y * OFFSET_PER_M), 0, speed, k === 0) / CURVATURE_PER_INV_M;
    // the derivative's first samples ask for more than a bias can: the integral part waits for them
    if (k > 60) expect(Math.abs(got * classes[0]!.speedMps - u), `sample ${k}`).toBeLessThan(0.03 * u);
  }
});

describe('a rehearsed vehicle, 15 % difference of its wheels, trim unknown', () => {
  const straight = compileCourse({ courseVersion: 1, pieces: [{ straightMm: 8000 }] });
  function settledM(design: Design, left: number, right: number): number {
    const plant = perturbedPlant(design.vehicle, 0);
    const wheels = { topLeftMps: plant.topLeftMps * left, topRightMps: plant.topRightMps * right };
    const setup = {
      plant: { ...plant, ...wheels },
      lane: straight,
      laps: 1,
      timeLimitS: 30,
      sampleTrace: true,
    };
    const { trace, loss } = twinEngine(design.vehicle, design.controller).runNow(setup);
    expect(loss).toBeUndefined();
    // mean of the last metre: the PWM's steps keep the vehicle from standing still beside the line
    const last = trace!.lateralM.slice(trace!.sM.findIndex((sM) => sM > 7));
    return last.reduce((sum, each) => sum + each, 0) / last.length;
  }

  test.each([
    ['right wheel faster', 0.925, 1.075],
    ['left wheel faster', 1.075, 0.925],
    ['right wheel faster by all that the tolerance allows', 0.85, 1.15],
  ])('%s: drives centred to 0.6 mm, which it does not without the integral part', (_name, left, right) => {
    expect(Math.abs(settledM(withIntegral, left, right))).toBeLessThan(6e-4);
    expect(Math.abs(settledM(without, left, right))).toBeGreaterThan(3e-3);
  });

  test.each(['wide', 'winding', 'hard'] as const)('laps the %s course', (name) => {
    const lane = compileCourse(example(name));
    const plant = perturbedPlant(LOOSE, 0);
    for (const [left, right] of [
      [0.925, 1.075],
      [1.075, 0.925],
    ] as const) {
      const wheels = { topLeftMps: plant.topLeftMps * left, topRightMps: plant.topRightMps * right };
      const setup = { plant: { ...plant, ...wheels }, lane, laps: 2, timeLimitS: 90, sampleTrace: false };
      expect(twinEngine(LOOSE, withIntegral.controller).runNow(setup).loss).toBeUndefined();
    }
  });
});

test('the integral part is kept over a gap and forgotten at a start', () => {
  const { controller } = withIntegral;
  const twin = new Twin(controller);
  const { ground, gain } = controller.sensing;
  const onLine = (covered: readonly number[]) =>
    Int32Array.from(covered, (share, i) => ground[i]! + Math.round((share * 255 * 4096) / gain[i]!));
  const beside = onLine([0, 0, 1, 0.9, 0, 0]);
  const nothing = onLine([0, 0, 0, 0, 0, 0]);
  twin.start();
  for (let i = 0; i < 1500; i++) twin.step(beside);
  const learnt = twin.curvature;
  for (let i = 0; i < 5; i++) twin.step(nothing);
  expect(twin.phase).toBe(PHASE.gap);
  for (let i = 0; i < 40; i++) twin.step(beside);
  expect(twin.phase).toBe(PHASE.follow);
  expect(Math.abs(twin.curvature - learnt)).toBeLessThan(0.1 * Math.abs(learnt));
  twin.start();
  for (let i = 0; i < 30; i++) twin.step(beside);
  expect(Math.abs(twin.curvature)).toBeLessThan(0.3 * Math.abs(learnt));
});
