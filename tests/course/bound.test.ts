import { describe, expect, it } from 'vitest';
import { lapBound, turnOnSpotS } from '../../src/course/bound.js';
import { compileCourse } from '../../src/course/lane.js';
import { STANDARD_GRAVITY_MPS2 } from '../../src/vehicle/gravity.js';
import { closed, example, open, oval } from './courses.js';

const G = STANDARD_GRAVITY_MPS2;
/** A vehicle that nothing limits but what a test sets. */
const FREE = { topSpeedMps: 1e3, lagS: 1e-6, grip: 1e3, trackM: 1e-9 };

describe('lapBound', () => {
  it('drives a circle at the grip limit', () => {
    const lane = compileCourse(closed({ radiusMm: 200, turnDeg: 360 }));
    const bound = lapBound({ ...FREE, lane, grip: 0.7 });
    expect(bound.lapS).toBeCloseTo((2 * Math.PI * 0.2) / Math.sqrt(0.7 * G * 0.2), 9);
  });

  it('drives a circle at the top speed of the outer wheel', () => {
    const lane = compileCourse(closed({ radiusMm: 200, turnDeg: -360 }));
    const bound = lapBound({ ...FREE, lane, topSpeedMps: 1, trackM: 0.12 });
    expect(bound.lapS).toBeCloseTo(2 * Math.PI * 0.2 * (1 + 0.3), 9);
  });

  it('runs up as a motor of first order does', () => {
    // x(t) = top (t - lag (1 - exp(-t/lag)))
    const [top, lag, t] = [1.5, 0.2, 0.7];
    const lengthM = top * (t - lag * (1 - Math.exp(-t / lag)));
    const lane = compileCourse(open({ straightMm: 1000 * lengthM }));
    const bound = lapBound({ ...FREE, lane, topSpeedMps: top, lagS: lag });
    expect(bound.lapS).toBeCloseTo(t, 4);
    expect(bound.speedMps.at(-1)).toBeCloseTo(top * (1 - Math.exp(-t / lag)), 4);
  });

  it('runs up at the grip limit', () => {
    const lane = compileCourse(open({ straightMm: 1000 }));
    const bound = lapBound({ ...FREE, lane, grip: 0.5 });
    expect(bound.lapS).toBeCloseTo(Math.sqrt(2 / (0.5 * G)), 6);
  });

  it('brakes into bends and speeds up out of them', () => {
    // Half a straight speeding up from the bend's speed, half braking to it; motors do not limit.
    const [radius, straight, mu] = [0.15, 0.8, 0.6];
    const bend = Math.sqrt(mu * G * radius);
    const peak = Math.sqrt(bend ** 2 + mu * G * straight);
    const expected = 2 * (2 * ((peak - bend) / (mu * G))) + (2 * Math.PI * radius) / bend;
    const bound = lapBound({ ...FREE, lane: compileCourse(oval(1000 * straight, 1000 * radius)), grip: mu });
    expect(bound.lapS).toBeCloseTo(expected, 4);
    expect(Math.max(...bound.speedMps)).toBeCloseTo(peak, 3);
  });

  it('ends a flying lap at the speed it began with, and is faster than from standing', () => {
    const lane = compileCourse(example('winding'));
    const vehicle = { lane, topSpeedMps: 1.5, lagS: 0.08, grip: 0.7, trackM: 0.12 };
    const flying = lapBound(vehicle);
    expect(flying.speedMps[0]).toBe(flying.speedMps.at(-1));
    const standing = lapBound({ ...vehicle, standing: true });
    expect(standing.speedMps[0]).toBe(0);
    expect(standing.lapS).toBeGreaterThan(flying.lapS);
    expect(standing.lapS).toBeLessThan(flying.lapS + 0.5);
  });

  it('never exceeds any limit on a lane of all kinds', () => {
    const vehicle = { topSpeedMps: 1.5, lagS: 0.08, grip: 0.7, trackM: 0.12 };
    const lane = compileCourse(example('hard'));
    const { sM, speedMps } = lapBound({ ...vehicle, lane });
    for (let i = 1; i < sM.length; i++) {
      const middle = lane.poseAt((sM[i - 1]! + sM[i]!) / 2);
      const k = Math.abs(middle.curvaturePerM);
      const v = (speedMps[i - 1]! + speedMps[i]!) / 2;
      const a = (speedMps[i]! ** 2 - speedMps[i - 1]! ** 2) / (2 * (sM[i]! - sM[i - 1]!));
      expect(Math.hypot(a, v * v * k)).toBeLessThan(0.7 * G * 1.01);
      expect(v * (1 + k * 0.06)).toBeLessThan(1.5 + 1e-9);
      expect(a).toBeLessThan((1.5 - v) / 0.08 + 0.1);
      expect(-a).toBeLessThan((1.5 + v) / 0.08 + 0.1);
    }
  });

  it('hardly changes with the course cut up more finely', () => {
    const vehicle = { topSpeedMps: 1.5, lagS: 0.08, grip: 0.7, trackM: 0.12 };
    const whole = lapBound({ ...vehicle, lane: compileCourse(oval(500, 200)) });
    const cut = Array<{ straightMm: number }>(500).fill({ straightMm: 1 });
    const half = { radiusMm: 200, turnDeg: 180 };
    const fine = lapBound({ ...vehicle, lane: compileCourse(closed(...cut, half, ...cut, half)) });
    expect(fine.lapS / whole.lapS).toBeCloseTo(1, 4);
  });

  it('stops at a corner and turns on the spot', () => {
    const vehicle = { topSpeedMps: 1.5, lagS: 0.08, grip: 0.7, trackM: 0.12 };
    const leg = { straightMm: 500 };
    const lane = compileCourse(open(leg, { cornerDeg: -90 }, leg));
    const bound = lapBound({ ...vehicle, lane });
    expect(bound.speedMps[(bound.speedMps.length - 1) / 2]).toBe(0);
    const alone = lapBound({ ...vehicle, lane: compileCourse(open(leg)) });
    expect(bound.lapS).toBeGreaterThan(2 * alone.lapS + turnOnSpotS(Math.PI / 2, vehicle));
    const square = Array.from({ length: 4 }, () => [leg, { cornerDeg: 90 }]).flat();
    expect(lapBound({ ...vehicle, lane: compileCourse(closed(...square)) }).speedMps[0]).toBe(0);
  });

  it('ends where it is told to', () => {
    const lane = compileCourse(open({ straightMm: 1000 }));
    const bound = lapBound({ ...FREE, lane, grip: 0.5, endM: 0.5 });
    expect(bound.lapS).toBeCloseTo(Math.sqrt(1 / (0.5 * G)), 6);
  });
});

describe('turnOnSpotS', () => {
  it('takes the time of a run at full duty and full reverse duty', () => {
    const [top, lag, track, turn] = [1.5, 0.08, 0.12, Math.PI / 2];
    const total = turnOnSpotS(turn, { topSpeedMps: top, lagS: lag, trackM: track });
    // Integrate with the switch where it leaves the wheel at rest after `total`.
    const switchS = total - braking(total, lag);
    let [v, x] = [0, 0];
    const dt = 1e-6;
    for (let t = 0; t < total; t += dt) {
      v += (dt * ((t < switchS ? top : -top) - v)) / lag;
      x += v * dt;
    }
    expect(x).toBeCloseTo((turn * track) / 2, 4);
    expect(v).toBeCloseTo(0, 3);
  });

  it('is distance over speed without lag', () => {
    expect(turnOnSpotS(Math.PI, { topSpeedMps: 1, lagS: 1e-6, trackM: 0.1 })).toBeCloseTo(0.05 * Math.PI, 5);
  });
});

/** How long a run of `totalS` that ends at rest brakes: t2 = lag ln(2 - exp(-(total - t2)/lag)), by fixed point. */
function braking(totalS: number, lagS: number): number {
  let t2 = totalS / 2;
  for (let i = 0; i < 200; i++) t2 = lagS * Math.log(2 - Math.exp(-(totalS - t2) / lagS));
  return t2;
}
