/** Battery, driver, motors and castor against closed forms. */
import { describe, expect, it } from 'vitest';
import type { PlantParameters } from '../../src/rehearsal/plant-parameters.js';
import { WheelDrive } from '../../src/rehearsal/wheel-drive.js';
import { plainPlant } from './vehicles.js';

function driven(
  changes: Partial<PlantParameters>,
  duties: readonly [number, number],
  speeds: readonly [number, number] = [0, 0],
  timeS = 0,
): WheelDrive {
  const wheels = new WheelDrive(plainPlant(changes));
  wheels.update(...duties, ...speeds, timeS);
  return wheels;
}

describe('battery under load', () => {
  it('sags by Ohms law: two stalled motors in parallel behind its resistance', () => {
    // Battery 6 V and 0.2 ohm, windings 5 ohm each: 2.5 ohm behind 0.2 ohm, 6 V * 2.5 / 2.7 are left.
    const wheels = driven({ batteryResistanceRatio: 0.2 / 5 }, [1, 1]);
    expect(wheels.batteryFactor).toBeCloseTo(2.5 / 2.7, 12);
    expect(wheels.steadyLeftMps).toBeCloseTo((1.5 * 2.5) / 2.7, 12);
  });

  it('sags by the square of the duty: PWM takes the current for its share of the time', () => {
    expect(driven({ batteryResistanceRatio: 0.04 }, [0.5, 0]).batteryFactor).toBeCloseTo(1 / 1.01, 12);
  });

  it('carries the current that friction takes, at the steady speed', () => {
    // 10 % of the stall current each: 2 * 0.1 * 0.04 of the voltage at full duty.
    const changes = { startDuty: 0.1, batteryResistanceRatio: 0.04 };
    const factor = 1 - 2 * 0.1 * 0.04;
    const speed = (1.5 * (factor - 0.1)) / 0.9;
    const wheels = driven(changes, [1, 1], [speed, speed]);
    expect(wheels.batteryFactor).toBeCloseTo(factor, 12);
    expect(wheels.steadyRightMps).toBeCloseTo(speed, 12);
  });

  it('gets nothing back from a motor that brakes', () => {
    expect(driven({ batteryResistanceRatio: 0.04 }, [0.2, 0.2], [1.5, 1.5]).batteryFactor).toBe(1);
    const half = driven({ batteryResistanceRatio: 0.04 }, [0.2, 1], [1.5, 0]);
    expect(half.batteryFactor).toBeCloseTo(1 / 1.04, 12);
  });
});

describe('friction', () => {
  it('is each wheels own', () => {
    const wheels = driven({ startDuty: 0.1, frictionLeft: 1.2, frictionRight: 0.8 }, [0.5, 0.5], [1, 1]);
    expect(wheels.steadyLeftMps).toBeCloseTo((1.5 * (0.5 - 0.12)) / 0.88, 12);
    expect(wheels.steadyRightMps).toBeCloseTo((1.5 * (0.5 - 0.08)) / 0.92, 12);
  });

  it('holds a standing wheel longer than a turning one', () => {
    const changes = { startDuty: 0.1, stiction: 1.3 };
    expect(driven(changes, [0.125, 0.125], [0, 0.1]).steadyLeftMps).toBe(0);
    expect(driven(changes, [0.125, 0.125], [0, 0.1]).steadyRightMps).toBeCloseTo((1.5 * 0.025) / 0.9, 12);
    expect(driven(changes, [-0.135, 0], [0, 0]).steadyLeftMps).toBeCloseTo((-1.5 * 0.035) / 0.9, 12);
  });

  it('takes away from full speed with a low battery: the same torque from less voltage', () => {
    expect(driven({ startDuty: 0.1, batteryFactor: 0.8 }, [1, -1]).steadyRightMps).toBeCloseTo(
      (-1.5 * 0.7) / 0.9,
      12,
    );
  });
});

describe('castor', () => {
  it('loads both wheels alike on the straight, against the travel', () => {
    for (const way of [1, -1]) {
      const wheels = driven({ castorDrag: 0.02 }, [0.5 * way, 0.5 * way], [0.7 * way, 0.7 * way]);
      const load = (0.02 / 2) * (0.7 / 0.71);
      expect(wheels.steadyLeftMps).toBeCloseTo(way * 1.5 * (0.5 - load), 12);
      expect(wheels.steadyRightMps).toBe(wheels.steadyLeftMps);
    }
  });

  it('resists turning on the spot with its lever over the track width', () => {
    const wheels = driven({ castorDrag: 0.02 }, [-0.5, 0.5], [-0.6, 0.6]);
    const across = ((1.2 / 0.12) * 0.075) / ((1.2 / 0.12) * 0.075 + 0.01);
    const load = 0.02 * across * (0.075 / 0.12);
    expect(wheels.steadyRightMps).toBeCloseTo(1.5 * (0.5 - load), 12);
    expect(wheels.steadyLeftMps).toBeCloseTo(-wheels.steadyRightMps, 12);
  });
});

it('a motor that warms up changes its speed by an exponential', () => {
  const speed = (timeS: number): number => driven({ driftLeft: 0.02 }, [1, 1], [1, 1], timeS).steadyLeftMps;
  expect(speed(0)).toBe(1.5);
  expect(speed(40)).toBeCloseTo(1.5 * (1 + 0.02 * (1 - Math.exp(-1))), 12);
});
