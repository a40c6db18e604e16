import { describe, expect, it } from 'vitest';
import { compileCourse } from '../../src/course/lane.js';
import { Plant } from '../../src/rehearsal/plant.js';
import type { PlantParameters } from '../../src/rehearsal/plant-parameters.js';
import { STANDARD_GRAVITY_MPS2 } from '../../src/vehicle/gravity.js';
import { example, mirrored, open } from '../course/courses.js';
import { plainPlant } from './vehicles.js';

const lane = compileCourse(open({ straightMm: 3000 }));

function makePlant(changes: Partial<PlantParameters> = {}): Plant {
  return new Plant(plainPlant(changes), lane);
}

/** Steps with constant duties; the time need not be a multiple of the step. */
function drive(plant: Plant, left: number, right: number, timeS: number, stepS = 2e-3): Plant {
  const steps = Math.round(timeS / stepS);
  for (let i = 0; i < steps; i++) plant.step(left, right, timeS / steps);
  return plant;
}

describe('wheels', () => {
  it('run up exponentially from rest behind the dead zone', () => {
    const plant = drive(makePlant({ startDuty: 0.1, grip: 100 }), 0.55, 0.55, 0.2);
    const steady = (1.5 * (0.55 - 0.1)) / 0.9;
    expect(plant.leftMps).toBeCloseTo(steady * (1 - Math.exp(-0.2 / 0.08)), 12);
    expect(plant.xM).toBeCloseTo(steady * (0.2 - 0.08 * (1 - Math.exp(-0.2 / 0.08))), 12);
  });

  it('run the same whatever the step', () => {
    const fine = drive(makePlant({ grip: 100 }), 0.9, 0.6, 0.3, 1e-4);
    const coarse = drive(makePlant({ grip: 100 }), 0.9, 0.6, 0.3, 5e-3);
    expect(coarse.leftMps).toBeCloseTo(fine.leftMps, 12);
    expect(coarse.headingRad).toBeCloseTo(fine.headingRad, 12);
    expect(coarse.xM).toBeCloseTo(fine.xM, 6);
  });

  it('stand at and below the start duty, which a lower battery raises', () => {
    expect(drive(makePlant({ startDuty: 0.1 }), 0.1, -0.1, 0.5).speedMps).toBe(0);
    const empty = { startDuty: 0.1, batteryFactor: 0.8 };
    expect(drive(makePlant(empty), 0.12, 0.12, 0.5).leftMps).toBe(0);
    expect(drive(makePlant(empty), 0.13, 0.13, 0.5).leftMps).toBeGreaterThan(0);
  });

  it('reach at full duty what the battery leaves beside friction, each its own', () => {
    const plant = drive(
      makePlant({ batteryFactor: 0.9, topRightMps: 1.4, startDuty: 0.1, grip: 100 }),
      1,
      -1,
      2,
    );
    // friction takes its tenth of the nominal torque from a battery that gives nine
    expect(plant.leftMps).toBeCloseTo((1.5 * (0.9 - 0.1)) / 0.9, 9);
    expect(plant.rightMps).toBeCloseTo((-1.4 * (0.9 - 0.1)) / 0.9, 9);
  });

  it('brake through zero into reverse', () => {
    const plant = drive(makePlant({ grip: 100 }), 1, 1, 1);
    const from = plant.leftMps;
    drive(plant, -1, -1, 0.1);
    expect(plant.leftMps).toBeCloseTo(-1.5 + (from + 1.5) * Math.exp(-0.1 / 0.08), 12);
  });
});

describe('grip', () => {
  const limit = 0.7 * STANDARD_GRAVITY_MPS2;

  it('limits the run-up to mu g', () => {
    const plant = drive(makePlant(), 1, 1, 0.05);
    expect(plant.speedMps).toBeCloseTo(limit * 0.05, 12);
    expect(plant.xM).toBeCloseTo((limit * 0.05 ** 2) / 2, 12);
  });

  it('leaves the difference of the wheels as it is', () => {
    const slipping = drive(makePlant(), 1, 0.5, 0.03);
    const gripping = drive(makePlant({ grip: 100 }), 1, 0.5, 0.03);
    expect(slipping.speedMps).toBeLessThan(gripping.speedMps);
    expect(slipping.leftMps - slipping.rightMps).toBeCloseTo(gripping.leftMps - gripping.rightMps, 12);
  });

  it('lets a vehicle on a circle turn no faster than v w = mu g', () => {
    // Wheels set for a turn rate of 8 1/s at 1.2 m/s: 9.6 m/s^2, more than the floor holds.
    const plant = makePlant();
    const [left, right] = [(1.2 - 0.48) / 1.5, Math.min(1, (1.2 + 0.48) / 1.5)];
    drive(plant, left, right, 2);
    const speed = plant.speedMps;
    expect(plant.turnRadPerS * speed).toBeCloseTo(limit, 9);
    // A circle of radius v^2/(mu g): half a turn further on it is across by its diameter.
    const [x, y] = [plant.xM, plant.yM];
    drive(plant, left, right, (Math.PI * speed) / limit, 1e-3);
    expect(Math.hypot(plant.xM - x, plant.yM - y)).toBeCloseTo((2 * speed ** 2) / limit, 4);
  });

  it('follows the wheels exactly below that', () => {
    const plant = drive(makePlant(), 0.4, 0.6, 3);
    expect(plant.turnRadPerS).toBeCloseTo((0.2 * 1.5) / 0.12, 9);
    expect(plant.turnRadPerS * plant.speedMps).toBeLessThan(limit);
  });

  it('has nothing left for turning while it all goes into braking', () => {
    const plant = drive(makePlant(), 0.8, 0.8, 1);
    const before = plant.headingRad;
    drive(plant, -1, -0.6, 0.01);
    expect(plant.headingRad).toBe(before);
  });

  it('does not hinder turning on the spot', () => {
    const plant = drive(makePlant({ grip: 0.01 }), -1, 1, 1);
    expect(plant.turnRadPerS).toBeCloseTo(3 / 0.12, 3);
    expect(Math.hypot(plant.xM, plant.yM)).toBeLessThan(1e-12);
  });
});

describe('pose', () => {
  it('moves on an exact arc at constant wheel speeds', () => {
    const plant = makePlant();
    [plant.leftMps, plant.rightMps] = [0.4, 0.5];
    drive(plant, 0.4 / 1.5, 0.5 / 1.5, 1.3);
    const turn = (0.1 / 0.12) * 1.3;
    const radius = 0.45 / (0.1 / 0.12);
    expect(plant.headingRad).toBeCloseTo(turn, 12);
    expect(plant.xM).toBeCloseTo(radius * Math.sin(turn), 12);
    expect(plant.yM).toBeCloseTo(radius * (1 - Math.cos(turn)), 12);
  });

  it('starts beside the lane as told', () => {
    const plant = makePlant({ startLateralM: 0.004, startHeadingRad: -0.05 });
    expect([plant.xM, plant.yM, plant.headingRad]).toEqual([0, 0.004, -0.05]);
    expect(plant.place.lateralM).toBeCloseTo(0.004, 15);
  });

  it('is mirrored by mirrored duties on a mirrored course, to the last bit', () => {
    const course = example('winding');
    const plant = new Plant(plainPlant({ startLateralM: 0.003 }), compileCourse(course));
    const mirror = new Plant(plainPlant({ startLateralM: -0.003 }), compileCourse(mirrored(course)));
    for (let i = 0; i < 600; i++) {
      const [left, right] = [0.5 + 0.4 * Math.sin(i / 7), 0.5 + 0.4 * Math.sin(i / 11)];
      plant.step(left, right, 1.7e-3);
      mirror.step(right, left, 1.7e-3);
      // Adding 0 makes -0 a plain 0.
      expect([mirror.xM, mirror.yM + 0, mirror.headingRad + 0]).toEqual([
        plant.xM,
        0 - plant.yM,
        0 - plant.headingRad,
      ]);
      expect(mirror.count(5)).toBe(plant.count(0));
      expect(mirror.place.sM).toBe(plant.place.sM);
      expect(mirror.place.lateralM + 0).toBe(0 - plant.place.lateralM);
    }
  });

  it.each([0, -1e-3, 0.0051, Number.NaN])('refuses a step of %f s', (dtS) => {
    expect(() => makePlant().step(0, 0, dtS)).toThrow(`A plant step lasts up to 5 ms, not ${dtS} s.`);
  });
});
