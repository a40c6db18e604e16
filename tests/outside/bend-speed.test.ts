/** Published and exact numbers of speeds in bends and of speed profiles against the lap-time bound and the plant. */
import { describe, expect, it } from 'vitest';
import { lapBound, turnOnSpotS } from '../../src/course/bound.js';
import { compileCourse } from '../../src/course/lane.js';
import { Plant } from '../../src/rehearsal/plant.js';
import { STANDARD_GRAVITY_MPS2 } from '../../src/vehicle/gravity.js';
import { open } from '../course/courses.js';
import { plainPlant } from '../rehearsal/vehicles.js';
import { FREE, circleSpeedMps } from './circle-speed.js';

describe('v = sqrt(mu g r), g = 9.80665 m/s^2 (computed to six decimals with 50-digit arithmetic)', () => {
  const radii = [0.05, 0.1, 0.15, 0.2, 0.3, 0.5];
  const table: [number, number[]][] = [
    [0.3, [0.383536, 0.542402, 0.664304, 0.767072, 0.939467, 1.212847]],
    [0.5, [0.495143, 0.700237, 0.857612, 0.990285, 1.212847, 1.565779]],
    [0.7, [0.585861, 0.828532, 1.01474, 1.171721, 1.43506, 1.852654]],
    [1.0, [0.700237, 0.990285, 1.212847, 1.400475, 1.715224, 2.214345]],
  ];

  it.each(table)('grip %f', (grip, speeds) => {
    radii.forEach((radiusM, i) => {
      expect(Math.abs(circleSpeedMps(grip, radiusM) - speeds[i]!)).toBeLessThan(1e-6);
    });
  });

  it('is where the simulated vehicle begins to run wide', () => {
    const lane = compileCourse(open({ straightMm: 5000 }));
    const curvatureAt = (speedMps: number): number => {
      const plant = new Plant(plainPlant({ grip: 0.7, topLeftMps: 4, topRightMps: 4 }), lane);
      const half = (speedMps / 0.2) * 0.06;
      for (let i = 0; i < 1000; i++) plant.step((speedMps - half) / 4, (speedMps + half) / 4, 2e-3);
      return plant.turnRadPerS / plant.speedMps;
    };
    expect(curvatureAt(1.1717)).toBeCloseTo(5, 6);
    expect(curvatureAt(1.1718)).toBeLessThan(4.9999);
  });
});

describe('OpenStax College Physics, flat curves', () => {
  // 500 m at 25 m/s needs a friction coefficient of 0.128, with g 9.8 m/s^2 (inputs seen, result from memory and recomputed).
  it('Example 6.4', () => {
    const grip = (0.128 * 9.8) / STANDARD_GRAVITY_MPS2;
    const speed = circleSpeedMps(grip, 500);
    expect(Math.abs(speed - 25)).toBeLessThan((25 * 0.0005) / (2 * 0.128));
  });

  // A car on a flat curve: mu 0.5, r 50 m, g 9.8 m/s^2 give 15.65 m/s.
  it('mu 0.5, radius 50 m', () => {
    const grip = (0.5 * 9.8) / STANDARD_GRAVITY_MPS2;
    expect(circleSpeedMps(grip, 50)).toBeCloseTo(15.65, 2);
  });
});

describe('Trapezoidal speed profile, the time-optimal double integrator (exact)', () => {
  /** Grip that allows an acceleration. */
  const grip = (accelerationMps2: number): number => accelerationMps2 / STANDARD_GRAVITY_MPS2;
  const corner = { cornerDeg: 1 };

  /** Time from rest to rest over a distance: a lane of twice that with a stop in the middle, less the flying second half. */
  function restToRestS(distanceM: number, accelerationMps2: number, topSpeedMps: number): number {
    const vehicle = { ...FREE, topSpeedMps, grip: grip(accelerationMps2) };
    const leg = { straightMm: 1000 * distanceM };
    const both = lapBound({ ...vehicle, lane: compileCourse(open(leg, corner, leg)) }).lapS;
    const alone = lapBound({ ...vehicle, lane: compileCourse(open(leg)) }).lapS;
    return both - alone - turnOnSpotS(Math.PI / 180, vehicle);
  }

  it('distance 1, acceleration 1, no cap: time 2', () => {
    expect(restToRestS(1, 1, 1e3)).toBeCloseTo(2, 4);
  });

  it('the same with a cap of 0.5: time 2.5', () => {
    expect(restToRestS(1, 1, 0.5)).toBeCloseTo(2.5, 4);
  });

  it('distance 2, cap 1, acceleration 2, entry 0.3, exit 0.5: time 2.185', () => {
    // Circles of v^2/a set the speeds at both ends of the straight.
    const circle = (speedMps: number) => ({ radiusMm: (1000 * speedMps ** 2) / 2, turnDeg: 720 });
    const lane = compileCourse(open(circle(0.3), { straightMm: 2000 }, circle(0.5)));
    const { sM, speedMps } = lapBound({ ...FREE, lane, topSpeedMps: 1, grip: grip(2) });
    const [, straight] = lane.pieces;
    let timeS = 0;
    for (let i = 1; i < sM.length; i++) {
      if (sM[i - 1]! < straight!.startM - 1e-12 || sM[i]! > straight!.startM + 2 + 1e-12) continue;
      timeS += (2 * (sM[i]! - sM[i - 1]!)) / (speedMps[i]! + speedMps[i - 1]!);
    }
    expect(timeS).toBeCloseTo(2.185, 4);
  });
});
