import { describe, expect, it } from 'vitest';
import { compileCourse, type Lane } from '../../src/course/lane.js';
import { makeProjection, WINDOW_M } from '../../src/course/projection.js';
import { Random } from '../../src/rehearsal/random.js';
import { example, mirrored, open, oval } from './courses.js';

/** The nearest place within the window by trying them all, 0.1 mm apart. */
function tried(lane: Lane, xM: number, yM: number, nearM: number): { sM: number; distanceM: number } {
  let best = { sM: 0, distanceM: Infinity };
  for (let sM = nearM - WINDOW_M; sM <= nearM + WINDOW_M; sM += 1e-4) {
    if (!lane.closed && (sM < 0 || sM > lane.lengthM)) continue;
    const pose = lane.poseAt(sM);
    const distanceM = Math.hypot(pose.xM - xM, pose.yM - yM);
    if (distanceM < best.distanceM) best = { sM, distanceM };
  }
  return best;
}

describe('project', () => {
  it.each(['nursery', 'wide', 'winding', 'hard'] as const)('finds the nearest place on %s', (name) => {
    const lane = compileCourse(example(name));
    const random = new Random(11, 0);
    const out = makeProjection();
    for (let i = 0; i < 150; i++) {
      const sM = random.uniform(-1, 2) * lane.lengthM;
      const pose = lane.poseAt(sM);
      const sideM = random.uniform(-0.055, 0.055);
      const xM = pose.xM - sideM * Math.sin(pose.headingRad);
      const yM = pose.yM + sideM * Math.cos(pose.headingRad);
      const nearM = sM + random.uniform(-0.02, 0.02);
      lane.project(xM, yM, nearM, out);
      const best = tried(lane, xM, yM, nearM);
      expect(Math.abs(out.lateralM)).toBeCloseTo(best.distanceM, 5);
      expect(out.sM).toBeCloseTo(best.sM, 3);
      expect(Math.sign(out.lateralM)).toBe(Math.sign(sideM));
      expect(Math.cos(out.headingRad - lane.poseAt(out.sM).headingRad)).toBeCloseTo(1, 10);
    }
  });

  it('counts laps on, forward and backward, through the start', () => {
    const lane = compileCourse(oval(500, 300));
    const out = makeProjection();
    let nearM = 0;
    for (let i = 0; i <= 400; i++) {
      const sM = (i / 200) * 1.25 * lane.lengthM;
      const pose = lane.poseAt(sM);
      lane.project(pose.xM, pose.yM, nearM, out);
      nearM = out.sM;
      expect(out.sM).toBeCloseTo(sM, 10);
      expect(Math.abs(out.lateralM)).toBeLessThan(1e-12);
    }
    for (let sM = nearM; sM > -0.5; sM -= 0.03) {
      const pose = lane.poseAt(sM);
      lane.project(pose.xM, pose.yM, out.sM, out);
      expect(out.sM).toBeCloseTo(sM, 10);
    }
  });

  it('holds to the ends of an open lane', () => {
    const lane = compileCourse(open({ straightMm: 500 }));
    const out = makeProjection();
    lane.project(0.53, 0.04, 0.49, out);
    expect(out.sM).toBe(0.5);
    expect(out.lateralM).toBeCloseTo(0.05, 14);
    lane.project(-0.03, -0.04, 0.01, out);
    expect(out.sM).toBe(0);
    expect(out.lateralM).toBeCloseTo(-0.05, 14);
  });

  it('goes round a sharp corner', () => {
    const lane = compileCourse(open({ straightMm: 300 }, { cornerDeg: 90 }, { straightMm: 300 }));
    const out = makeProjection();
    lane.project(0.29, 0.002, 0.28, out);
    expect([out.sM, out.lateralM]).toEqual([expect.closeTo(0.29, 12), expect.closeTo(0.002, 12)]);
    lane.project(0.301, 0.03, 0.3, out);
    expect([out.sM, out.lateralM]).toEqual([expect.closeTo(0.33, 12), expect.closeTo(-0.001, 12)]);
  });

  it('is the same in the mirror, to the last bit', () => {
    const lane = compileCourse(example('winding'));
    const mirror = compileCourse(mirrored(example('winding')));
    const [out, back] = [makeProjection(), makeProjection()];
    for (let i = 0; i < 500; i++) {
      const sM = (i / 500) * lane.lengthM;
      const pose = lane.poseAt(sM);
      lane.project(pose.xM, pose.yM + 0.013, sM, out);
      mirror.project(pose.xM, -pose.yM - 0.013, sM, back);
      expect(back.sM).toBe(out.sM);
      expect(back.lateralM).toBe(-out.lateralM);
    }
  });
});
