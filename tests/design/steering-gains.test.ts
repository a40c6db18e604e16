import { describe, expect, test } from 'vitest';
import { samplePlant } from '../../src/design/lane-plant.js';
import { closedLoopRadius } from '../../src/design/closed-loop.js';
import { controllerOf, loopMargins, loopPeak } from '../../src/design/steering-loop.js';
import { designLaw, proportionalRange } from '../../src/design/steering-gains.js';
import { LEAST_MARGINS, keeps, lanePlantOf, toleranceCorners } from '../../src/design/tolerance-box.js';
import { Random } from '../../src/rehearsal/random.js';
import { demoVehicle } from './demo-vehicle.js';

const vehicle = demoVehicle();

describe('the law of a class', () => {
  test('keeps the margins and is stable at random points of the tolerance box', () => {
    const law = designLaw(vehicle, 0.86, 0.12)!;
    const random = new Random(7, 1);
    const [, ...corners] = toleranceCorners(vehicle);
    const gains = corners.map((corner) => corner.gain);
    for (let i = 0; i < 200; i++) {
      const corner = {
        gain: random.uniform(Math.min(...gains), Math.max(...gains)),
        lag: random.uniform(1 - vehicle.tolerance.lag, 1 + vehicle.tolerance.lag),
      };
      const plant = lanePlantOf(vehicle, 0.86, corner);
      const controller = controllerOf(law.gains, plant.speedMps, plant.samplePeriodS);
      expect(keeps(loopMargins(plant, controller))).toBe(true);
      expect(closedLoopRadius(samplePlant(plant), controller)).toBeLessThan(1);
    }
  });

  test('exists only up to the speed that the margins allow', () => {
    const sluggish = { ...vehicle, drive: { ...vehicle.drive, lagS: 0.5 } };
    expect(designLaw(sluggish, 0.2, 0.12)).toBeDefined();
    expect(designLaw(sluggish, 1.5, 0.12)).toBeUndefined();
  });

  test('on wide bends tends to a curvature of 2 y / L^2, the arc through the point seen', () => {
    const [, wanted] = proportionalRange(vehicle, 100);
    expect(wanted).toBeCloseTo(2 / 0.075 ** 2, 0);
  });

  test('on bends wider than the view takes more, so that the line stays under the bar', () => {
    const [least, wanted] = proportionalRange(vehicle, 0.08);
    expect(wanted).toBe(least);
    // kappa = kp y with y at 70 % of the view of 34.5 mm: the axle runs on a circle of y + sqrt(R^2 - L^2)
    const y = 0.7 * 0.0345;
    expect(least).toBeCloseTo(1 / (y * (y + Math.sqrt(0.08 ** 2 - 0.075 ** 2))), 0);
  });
});

describe('stability', () => {
  test('an unstable loop has no margins and an infinite peak', () => {
    const plant = lanePlantOf(vehicle, 1.5, { gain: 1, lag: 1 });
    const tooStiff = controllerOf(
      { proportionalPerM2: 20000, derivativeTimeS: 0, filterCoefficient: 0.4 },
      1.5,
      0.002,
    );
    expect(closedLoopRadius(samplePlant(plant), tooStiff)).toBeGreaterThan(1);
    expect(loopMargins(plant, tooStiff).ms).toBe(Infinity);
    expect(loopPeak(plant, tooStiff)).toBe(Infinity);
  });

  test('the verdict from the response agrees with the poles', () => {
    const random = new Random(11, 1);
    let unstable = 0;
    for (let i = 0; i < 300; i++) {
      const plant = {
        lookaheadM: random.uniform(0.02, 0.2),
        speedMps: random.uniform(0.1, 3),
        lagS: random.uniform(0.01, 0.3),
        delayS: random.uniform(0, 0.02),
        samplePeriodS: random.uniform(0.001, 0.01),
      };
      const law = {
        proportionalPerM2: Math.exp(random.uniform(2, 9)),
        derivativeTimeS: random.uniform(0, 0.3),
        filterCoefficient: random.uniform(0.02, 0.9),
      };
      const controller = controllerOf(law, plant.speedMps, plant.samplePeriodS);
      const stable = closedLoopRadius(samplePlant(plant), controller) < 1;
      if (!stable) unstable++;
      expect(Number.isFinite(loopMargins(plant, controller).ms), JSON.stringify({ plant, law })).toBe(stable);
    }
    expect(unstable).toBeGreaterThan(30);
    expect(unstable).toBeLessThan(270);
  });

  test('the required margins agree with each other', () => {
    // PM >= 2 asin(1/(2 Ms)): less would make the phase margin an empty demand
    const implied = (2 * Math.asin(1 / (2 * LEAST_MARGINS.ms)) * 180) / Math.PI;
    expect(LEAST_MARGINS.phaseMarginDeg).toBeGreaterThan(implied);
  });
});
