import fc from 'fast-check';
import { expect, it } from 'vitest';
import { type Point, clipped, filled, thinned } from '../../../src/report/figures/polyline.js';

const box = { x: 10, y: 20, width: 100, height: 50 };
const place = fc.integer({ min: -200, max: 300 });
const points: fc.Arbitrary<Point[]> = fc.array(fc.tuple(place, place), { minLength: 2, maxLength: 12 });

const isInside = ([x, y]: Point): boolean =>
  x >= box.x - 1e-6 && x <= box.x + box.width + 1e-6 && y >= box.y - 1e-6 && y <= box.y + box.height + 1e-6;

it.each<[string, Point[], Point[][]]>([
  [
    'inside',
    [
      [20, 30],
      [50, 60],
    ],
    [
      [
        [20, 30],
        [50, 60],
      ],
    ],
  ],
  [
    'through',
    [
      [-40, 40],
      [160, 40],
    ],
    [
      [
        [10, 40],
        [110, 40],
      ],
    ],
  ],
  [
    'beside',
    [
      [0, 0],
      [200, 0],
    ],
    [],
  ],
  [
    'out and in again',
    [
      [20, 30],
      [20, 0],
      [40, 0],
      [40, 30],
    ],
    [
      [
        [20, 30],
        [20, 20],
      ],
      [
        [40, 20],
        [40, 30],
      ],
    ],
  ],
  [
    'round a corner inside',
    [
      [20, 30],
      [30, 30],
      [30, 40],
    ],
    [
      [
        [20, 30],
        [30, 30],
        [30, 40],
      ],
    ],
  ],
])('a line %s is cut at the edge of the plot', (_, given, expected) => {
  expect(clipped(given, box)).toEqual(expected);
});

it('what is left of any line lies inside, and all of the inside is left', () => {
  fc.assert(
    fc.property(points, (given) => {
      const parts = clipped(given, box);
      expect(parts.flat().every(isInside)).toBe(true);
      const length = (lines: readonly (readonly Point[])[]) =>
        lines.flatMap((line) =>
          line.slice(1).map((b, i) => Math.hypot(b[0] - line[i]![0], b[1] - line[i]![1])),
        );
      const sum = (lengths: number[]) => lengths.reduce((total, each) => total + each, 0);
      // an independent measure: how many of many points along the line lie inside
      const steps = filled(given, 0.5);
      const inside = steps.slice(1).filter((b, i) => isInside(b) && isInside(steps[i]!));
      const whole = sum(length([steps])) / Math.max(1, steps.length - 1);
      expect(Math.abs(sum(length(parts)) - inside.length * whole)).toBeLessThan(
        0.02 * sum(length([given])) + 6 * given.length,
      );
    }),
  );
});

it('filling leaves no wide step, thinning no narrow one, both keep the ends', () => {
  fc.assert(
    fc.property(points, (given) => {
      const steps = (line: readonly Point[]) =>
        line.slice(1).map((b, i) => Math.hypot(b[0] - line[i]![0], b[1] - line[i]![1]));
      const dense = filled(given, 3);
      expect(Math.max(...steps(dense))).toBeLessThanOrEqual(3 + 1e-9);
      expect([dense[0], dense.at(-1)]).toEqual([given[0], given.at(-1)]);
      const sparse = thinned(given, 5);
      expect([sparse[0], sparse.at(-1)]).toEqual([given[0], given.at(-1)]);
      for (const step of steps(sparse).slice(0, -1)) expect(step).toBeGreaterThanOrEqual(5);
    }),
  );
});
