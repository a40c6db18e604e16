import { describe, expect, it } from 'vitest';
import { compileCourse, type Lane } from '../../src/course/lane.js';
import { coveredShare, discShare } from '../../src/vehicle/sensor-bar.js';
import { example, mirrored, open } from './courses.js';

/** Share of a disc for whose points a test holds, by counting the points of a fine lattice. */
function counted(
  xM: number,
  yM: number,
  radiusM: number,
  isPainted: (xM: number, yM: number) => boolean,
): number {
  const half = 150;
  let [inside, painted] = [0, 0];
  for (let i = -half; i < half; i++) {
    for (let j = -half; j < half; j++) {
      const dx = ((i + 0.5) / half) * radiusM;
      const dy = ((j + 0.5) / half) * radiusM;
      if (dx * dx + dy * dy > radiusM * radiusM) continue;
      inside++;
      if (isPainted(xM + dx, yM + dy)) painted++;
    }
  }
  return painted / inside;
}

const HALF = 0.0095;

describe('discShare', () => {
  it('is the integral of the chord', () => {
    for (const u of [-1, -0.7, -0.2, 0, 0.5, 0.99, 1]) {
      let sum = 0;
      const steps = 20000;
      for (let i = 0; i < steps; i++) {
        const t = -1 + ((i + 0.5) / steps) * (u + 1);
        sum += ((u + 1) / steps) * 2 * Math.sqrt(1 - t * t);
      }
      expect(discShare(u)).toBeCloseTo(sum / Math.PI, 6);
    }
    expect([discShare(-3), discShare(3)]).toEqual([0, 1]);
  });
});

describe('coverage', () => {
  const straight = compileCourse(open({ straightMm: 1000 }));

  it.each([0.002, 0.004, 0.012, 0.015])('of a straight line by a spot of radius %f m', (radiusM) => {
    for (let yM = -0.026; yM <= 0.026; yM += 0.0013) {
      const found = straight.coverage(0.4, yM, radiusM);
      expect(found).toBeCloseTo(
        counted(0.4, yM, radiusM, (_, y) => Math.abs(y) < HALF),
        2,
      );
      expect(found).toBeCloseTo(coveredShare(yM, 0.019, radiusM), 12);
    }
  });

  it('of an arc of 120 mm', () => {
    const lane = compileCourse(
      open({ straightMm: 300 }, { radiusMm: 120, turnDeg: 150 }, { straightMm: 200 }),
    );
    const onArc = (x: number, y: number): boolean => Math.abs(Math.hypot(x - 0.3, y - 0.12) - 0.12) < HALF;
    for (const angle of [0.2, 0.8, 1.57, 1.58, 2.2]) {
      for (const off of [-0.014, -0.0105, -0.006, 0, 0.004, 0.008, 0.011]) {
        const x = 0.3 + (0.12 + off) * Math.sin(angle);
        const y = 0.12 - (0.12 + off) * Math.cos(angle);
        expect(Math.abs(lane.coverage(x, y, 0.004) - counted(x, y, 0.004, onArc))).toBeLessThan(
          ((2 / (3 * Math.PI)) * 0.004) / (0.12 - HALF) + 0.001,
        );
      }
    }
  });

  it('fades at the ends of a gap and stays whole where pieces join', () => {
    const lane = compileCourse(
      open({ straightMm: 300 }, { straightMm: 200 }, { gapMm: 40 }, { straightMm: 300 }),
    );
    const painted = (x: number, y: number): boolean =>
      Math.abs(y) < HALF && x > 0 && (x < 0.5 || (x > 0.54 && x < 0.84));
    for (const x of [
      -0.003, 0.002, 0.2999, 0.3, 0.3001, 0.497, 0.5, 0.502, 0.51, 0.538, 0.541, 0.839, 0.843,
    ]) {
      expect(lane.coverage(x, 0.001, 0.004)).toBeCloseTo(counted(x, 0.001, 0.004, painted), 2);
    }
    expect(lane.coverage(0.3, 0, 0.004)).toBe(1);
    expect(lane.coverage(0.52, 0, 0.004)).toBe(0);
  });

  it('paints a crossing 150 mm to either side', () => {
    const lane = compileCourse(open({ straightMm: 300 }, { crossing: true }, { straightMm: 300 }));
    expect(lane.coverage(0.3, 0.1, 0.004)).toBe(1);
    expect(lane.coverage(0.3, -0.149, 0.004)).toBeCloseTo(
      counted(0, 0.149, 0.004, (_, y) => y < 0.15),
      2,
    );
    expect(lane.coverage(0.3, 0.155, 0.004)).toBe(0);
    expect(lane.coverage(0.3095, -0.1, 0.004)).toBeCloseTo(0.5, 12);
  });

  it('fills a right-angled corner to its outer tip and no further', () => {
    const lane = compileCourse(open({ straightMm: 300 }, { cornerDeg: 90 }, { straightMm: 300 }));
    const painted = (x: number, y: number): boolean =>
      (Math.abs(y) < HALF && x < 0.3 + HALF) || (Math.abs(x - 0.3) < HALF && y > -HALF);
    for (const [x, y] of [
      [0.3, 0],
      [0.305, -0.005],
      [0.297, 0.004],
      [0.3095, 0.05],
      [0.316, -0.002],
    ] as const) {
      expect(lane.coverage(x, y, 0.004)).toBeCloseTo(counted(x, y, 0.004, painted), 2);
    }
  });

  it('follows the strip formula all over a lane, whatever cell of the grid a place lies in', () => {
    const lane = compileCourse(example('hard'));
    let compared = 0;
    for (let i = 0; i < 3000; i++) {
      const sM = (i / 3000) * lane.lengthM;
      if (!isPlain(lane, sM)) continue;
      const pose = lane.poseAt(sM);
      const sideM = (((i * 7919) % 61) - 30) / 1000;
      const found = lane.coverage(
        pose.xM - sideM * Math.sin(pose.headingRad),
        pose.yM + sideM * Math.cos(pose.headingRad),
        0.004,
      );
      expect(found).toBeCloseTo(coveredShare(sideM, 0.019, 0.004), 10);
      compared++;
    }
    expect(compared).toBeGreaterThan(2500);
  });

  it('is the same in the mirror', () => {
    const lane = compileCourse(example('nursery'));
    const mirror = compileCourse(mirrored(example('nursery')));
    for (let i = 0; i < 2000; i++) {
      const pose = lane.poseAt((i / 2000) * lane.lengthM);
      const yM = pose.yM + ((i % 50) - 25) / 1000;
      expect(mirror.coverage(pose.xM, -yM, 0.004)).toBeCloseTo(lane.coverage(pose.xM, yM, 0.004), 12);
    }
  });

  it('is 0 off the grid', () => {
    expect(straight.coverage(1e6, -1e6, 0.004)).toBe(0);
    expect(straight.coverage(Number.NaN, 0, 0.004)).toBe(0);
  });
});

/** Whether a place is away from crossings and gaps. */
function isPlain(lane: Lane, sM: number): boolean {
  if (lane.crossings.some((crossing) => Math.abs(crossing.sM - sM) < 0.014)) return false;
  const isNear = (startM: number, lengthM: number): boolean =>
    sM > startM - 0.005 && sM < startM + lengthM + 0.005;
  return !lane.pieces.some((piece) => piece.kind === 'gap' && isNear(piece.startM, piece.lengthM));
}
