/** Published numbers of differential-drive kinematics against the simulated vehicle. */
import { describe, expect, it } from 'vitest';
import { alongArc, type Pose } from '../../src/course/arc.js';
import { compileCourse } from '../../src/course/lane.js';
import { Plant } from '../../src/rehearsal/plant.js';
import { open } from '../course/courses.js';
import { plainPlant } from '../rehearsal/vehicles.js';

const lane = compileCourse(open({ straightMm: 10000 }));

/** A vehicle whose wheels run at given speeds from the start and keep them; full duty is 100 m/s. */
function rolling(trackM: number, leftMps: number, rightMps: number, pose?: Pose): Plant {
  const plant = new Plant(plainPlant({ trackM, topLeftMps: 100, topRightMps: 100, grip: 1e9 }), lane);
  Object.assign(plant, { leftMps, rightMps });
  if (pose) plant.moveTo(pose);
  return plant;
}

function roll(plant: Plant, timeS: number): Plant {
  const [left, right] = [plant.leftMps / 100, plant.rightMps / 100];
  const steps = Math.ceil(timeS / 5e-3);
  for (let i = 0; i < steps; i++) plant.step(left, right, timeS / steps);
  return plant;
}

describe('Siegwart and Nourbakhsh, Autonomous Mobile Robots, 3.2.2 (from memory; the arithmetic is exact)', () => {
  it('wheel rates 4 and 2, radius 1, half track 1, heading pi/2: velocity (0, 3, 1)', () => {
    const plant = rolling(2, 2, 4, { xM: 0, yM: 0, headingRad: Math.PI / 2 });
    const dt = 1e-6;
    plant.step(0.02, 0.04, dt);
    expect(plant.xM / dt).toBeCloseTo(0, 5);
    expect(plant.yM / dt).toBeCloseTo(3, 9);
    expect(plant.turnRadPerS).toBeCloseTo(1, 12);
  });
});

describe('Turning-centre update: Dudek and Jenkin, Computational Principles of Mobile Robotics, ch. 3', () => {
  // Numbers of the solution to sheet 3, exercise 2, of the mobile-robotics course of the University of Freiburg.
  it.each([
    [{ xM: 1.5, yM: 2, headingRad: Math.PI / 2 }, 0.3, 0.3, 3, [1.5, 2.9, 1.5707963268]],
    [{ xM: 1.5, yM: 2.9, headingRad: Math.PI / 2 }, 0.1, -0.1, 1, [1.5, 2.9, 1.1707963268]],
    [
      { xM: 1.5, yM: 2.9, headingRad: Math.PI / 2 - 0.4 },
      0.2,
      0,
      2,
      [1.6396758098815527, 3.035655185914644, 0.3707963267948966],
    ],
  ] as const)('from %j with %f and %f m/s for %f s', (pose, left, right, timeS, expected) => {
    const plant = roll(rolling(0.5, left, right, pose), timeS);
    expect(plant.xM).toBeCloseTo(expected[0], 10);
    expect(plant.yM).toBeCloseTo(expected[1], 10);
    expect(plant.headingRad).toBeCloseTo(expected[2], 10);
  });
});

describe('WPILib, DifferentialDriveKinematicsTest.cpp, DifferentialDriveOdometryTest.cpp and documentation', () => {
  it.each([
    [0.762, 3, 3, 3, 0],
    [0.762, -0.381 * Math.PI, 0.381 * Math.PI, 0, Math.PI],
    // 27 inches, from the documentation's example; its numbers have four decimals.
    [0.6858, 1.6571, 2.3429, 2, 1],
  ])('track %f m, wheels %f and %f m/s: %f m/s, %f rad/s', (trackM, left, right, speed, turn) => {
    const plant = roll(rolling(trackM, left, right), 0.1);
    expect(plant.speedMps).toBeCloseTo(speed, 9);
    expect(plant.turnRadPerS).toBeCloseTo(turn, 9);
  });

  it('left wheel 0, right wheel 5 pi, heading changed by 90 degrees: (5, 5)', () => {
    const end = alongArc({ xM: 0, yM: 0, headingRad: 0 }, (0 + 5 * Math.PI) / 2, Math.PI / 2);
    expect(end.xM).toBeCloseTo(5, 9);
    expect(end.yM).toBeCloseTo(5, 9);
  });
});

describe('closed forms', () => {
  it.each([
    [1, 0, Math.PI / 2, [0.5, 0.5, Math.PI / 2]],
    // sin 1 and 1 - cos 1: a radian on the unit circle.
    [0.2, 0.9, 1.1, [0.8414709848078965, 0.4596976941318603, 1]],
  ] as const)('track %f m, wheels %f and %f m/s for 1 s', (trackM, left, right, expected) => {
    const plant = roll(rolling(trackM, left, right), 1);
    expect(plant.xM).toBeCloseTo(expected[0], 12);
    expect(plant.yM).toBeCloseTo(expected[1], 12);
    expect(plant.headingRad).toBeCloseTo(expected[2], 12);
  });

  it('keeps its digits when nearly straight, where the form by the turning centre loses eight', () => {
    const plant = roll(rolling(0.15, 0.5, 0.5 + 1e-9), 1);
    expect(plant.xM).toBeCloseTo(0.5000000005, 13);
    expect(plant.headingRad).toBeCloseTo(1e-9 / 0.15, 15);
    expect(plant.yM).toBeCloseTo(0.25e-9 / 0.15, 15);
  });
});
