import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { alongArc, sinc } from '../../src/course/arc.js';
import { compileCourse } from '../../src/course/lane.js';
import { FairleadError } from '../../src/sheet/problem.js';
import { closed, example, EXAMPLES, open, oval } from './courses.js';

describe('arc', () => {
  it('joins the series of sinc to the function without a step', () => {
    for (const x of [0, 1e-9, 0.01, 0.0299999, 0.0300001, 0.5, -0.02]) {
      const exact = x === 0 ? 1 : Math.sin(x) / x;
      expect(Math.abs(sinc(x) - exact)).toBeLessThan(3e-13);
    }
  });

  it('reaches the quarter circle', () => {
    const end = alongArc({ xM: 1, yM: 2, headingRad: 0 }, Math.PI / 2, Math.PI / 2);
    expect(end.xM).toBeCloseTo(2, 14);
    expect(end.yM).toBeCloseTo(3, 14);
  });
});

describe('compileCourse', () => {
  it('chains poses, lengths and curvatures', () => {
    const lane = compileCourse(open({ straightMm: 1000 }, { radiusMm: 200, turnDeg: -90 }, { gapMm: 40 }));
    expect(lane.lengthM).toBeCloseTo(1 + 0.1 * Math.PI + 0.04, 14);
    expect(lane.pieces.map((piece) => piece.kind)).toEqual(['straight', 'arc', 'gap']);
    expect(lane.pieces[1]).toMatchObject({ startM: 1, curvaturePerM: -5 });
    const middle = lane.poseAt(1 + 0.05 * Math.PI);
    expect(middle.xM).toBeCloseTo(1 + 0.2 * Math.SQRT1_2, 14);
    expect(middle.yM).toBeCloseTo(-0.2 * (1 - Math.SQRT1_2), 14);
    expect(middle.headingRad).toBeCloseTo(-Math.PI / 4, 14);
    const end = lane.poseAt(99);
    expect([end.xM, end.yM, end.headingRad]).toEqual([
      expect.closeTo(1.2, 12),
      expect.closeTo(-0.24, 12),
      expect.closeTo(-Math.PI / 2, 12),
    ]);
  });

  it('wraps arc length on a closed lane', () => {
    const lane = compileCourse(oval(500, 300));
    const once = lane.poseAt(0.7);
    const later = lane.poseAt(0.7 + 3 * lane.lengthM);
    expect(later.xM).toBeCloseTo(once.xM, 12);
    expect(later.yM).toBeCloseTo(once.yM, 12);
  });

  it('takes the line width that the schema gives as its default', () => {
    const schema = JSON.parse(readFileSync('schemas/course.schema.json', 'utf8')) as {
      properties: { lineWidthMm: { default: number } };
    };
    const lane = compileCourse({ courseVersion: 1, pieces: [{ straightMm: 100 }] });
    expect(lane.lineWidthM).toBe(schema.properties.lineWidthMm.default / 1000);
    expect(lane.closed).toBe(false);
  });

  it('places corners and crossings', () => {
    const lane = compileCourse(
      open({ straightMm: 300 }, { cornerDeg: 90 }, { crossing: true }, { straightMm: 200 }),
    );
    expect(lane.corners).toEqual([expect.objectContaining({ sM: 0.3, before: 1, turnRad: Math.PI / 2 })]);
    expect(lane.crossings[0]!.headingRad).toBeCloseTo(Math.PI / 2, 14);
    expect(lane.poseAt(0.5).yM).toBeCloseTo(0.2, 14);
  });
});

function problemsOf(action: () => unknown): readonly { pointer: string; message: string; got?: string }[] {
  try {
    action();
  } catch (error) {
    if (error instanceof FairleadError) return error.problems;
    throw error;
  }
  return [];
}

describe('geometry that a schema cannot refuse', () => {
  it('names by how much a closed lane fails to close', () => {
    const course = closed(
      { straightMm: 500 },
      { radiusMm: 300, turnDeg: 180 },
      { straightMm: 450 },
      { radiusMm: 300, turnDeg: 177 },
    );
    const [problem] = problemsOf(() => compileCourse(course));
    expect(problem).toMatchObject({
      pointer: '/closed',
      message: 'The end of the closed lane does not meet its start.',
    });
    expect(problem?.got).toMatch(/^end at x 34\.3 mm, y 0\.4 mm, heading -3\.00 deg off$/);
  });

  it('lets a closed lane miss by 10 mm and 2 degrees, and no more', () => {
    const missing = (mm: number) =>
      closed(
        { straightMm: 500 },
        { radiusMm: 300, turnDeg: 180 },
        { straightMm: 500 - mm },
        { radiusMm: 300, turnDeg: 180 },
      );
    expect(problemsOf(() => compileCourse(missing(9.9)))).toEqual([]);
    expect(problemsOf(() => compileCourse(missing(10.1)))).toHaveLength(1);
    const seam = compileCourse(missing(9.9));
    for (const xMm of [-10, -5, 0, 5]) expect(seam.coverage(xMm / 1000, 0, 0.004)).toBe(1);
  });

  it('reports every problem at once', () => {
    const course = open({ radiusMm: 20, turnDeg: 0 }, { gapMm: 50 });
    const pointers = problemsOf(() => compileCourse({ ...course, lineWidthMm: 60 })).map(
      (problem) => problem.pointer,
    );
    expect(pointers).toEqual(['/pieces/0/turnDeg', '/pieces/0/radiusMm', '/pieces']);
  });

  it('refuses a lane of kilometres', () => {
    const problems = problemsOf(() =>
      compileCourse(open(...Array<{ straightMm: number }>(30).fill({ straightMm: 1e5 }))),
    );
    expect(problems).toEqual([
      expect.objectContaining({ pointer: '/pieces', got: '3000 m', allowed: 'at most 2000 m' }),
    ]);
  });
});

describe('example courses', () => {
  const names = Object.keys(EXAMPLES) as (keyof typeof EXAMPLES)[];

  it.each(names)('%s closes to a micrometre', (name) => {
    const lane = compileCourse(example(name));
    const last = lane.pieces.at(-1)!;
    const end = alongArc(last, last.lengthM, last.lengthM * last.curvaturePerM);
    expect(Math.hypot(end.xM, end.yM)).toBeLessThan(1e-6);
    expect(Math.abs(end.headingRad - 2 * Math.PI)).toBeLessThan(1e-9);
    expect(lane.closed).toBe(true);
  });

  it.each(names)('%s keeps its stretches 200 mm apart, so that no bar sees two', (name) => {
    const lane = compileCourse(example(name));
    const poses = Array.from({ length: Math.floor(lane.lengthM * 50) }, (_, i) => lane.poseAt(i / 50));
    let nearestM = Infinity;
    poses.forEach((a, i) => {
      for (let j = i + 1; j < poses.length; j++) {
        const betweenM = Math.min((j - i) / 50, lane.lengthM - (j - i) / 50);
        const b = poses[j]!;
        if (betweenM > 0.6) nearestM = Math.min(nearestM, Math.hypot(a.xM - b.xM, a.yM - b.yM));
      }
    });
    expect(nearestM).toBeGreaterThan(0.2);
  });

  it('has in the nursery lane what the demo is about', () => {
    const lane = compileCourse(example('nursery'));
    const curvatures = lane.pieces.map((piece) => piece.curvaturePerM);
    expect(Math.max(...curvatures)).toBeCloseTo(1 / 0.12, 12);
    expect(Math.min(...curvatures)).toBeCloseTo(-1 / 0.12, 12);
    expect(lane.pieces.filter((piece) => piece.kind === 'gap').map((piece) => piece.lengthM)).toEqual([0.04]);
    expect(lane.crossings).toHaveLength(1);
    expect(lane.lengthM).toBeGreaterThan(5);
    expect(lane.lengthM).toBeLessThan(7);
  });
});
