import fc from 'fast-check';
import { expect, test } from 'vitest';
import { coveredShare, evenPositions, seeingReach } from '../../src/vehicle/sensor-bar.js';

test('positions are symmetrical about 0, leftmost first', () => {
  expect(evenPositions(6, 10)).toEqual([25, 15, 5, -5, -15, -25]);
  expect(evenPositions(3, 8)).toEqual([8, 0, -8]);
  expect(evenPositions(1, 8)).toEqual([0]);
});

test.each([
  // offset, line width, spot radius: closed forms.
  ['wholly covered', 0, 19, 4, 1],
  ['edge through the middle', 9.5, 19, 4, 0.5],
  ['just out of sight', 13.5, 19, 4, 0],
  ['just wholly covered', 5.5, 19, 4, 1],
  // Segment of a circle cut at half its radius: 1/3 - sqrt(3) / (4 pi).
  ['edge half a radius short of the middle', 11.5, 19, 4, 1 / 3 - Math.sqrt(3) / (4 * Math.PI)],
  // A strip as wide as the radius across the middle: 1/3 + sqrt(3) / (2 pi).
  ['a narrow line across a wide spot', 0, 4, 4, 1 / 3 + Math.sqrt(3) / (2 * Math.PI)],
])('share of the spot: %s', (_, offset, width, radius, want) => {
  expect(coveredShare(offset, width, radius)).toBeCloseTo(want, 12);
  expect(coveredShare(-offset, width, radius)).toBeCloseTo(want, 12);
});

test('share of the spot agrees with counting points of the spot', () => {
  const points = 400;
  for (const [offset, width, radius] of [
    [3, 5, 4],
    [7, 10, 3],
    [0, 2, 5],
    [11, 19, 4],
  ] as const) {
    let covered = 0;
    let all = 0;
    for (let i = 0; i < points; i += 1) {
      for (let j = 0; j < points; j += 1) {
        const x = (2 * (i + 0.5)) / points - 1;
        const y = (2 * (j + 0.5)) / points - 1;
        if (x * x + y * y > 1) continue;
        all += 1;
        if (Math.abs(x * radius - offset) <= width / 2) covered += 1;
      }
    }
    expect(coveredShare(offset, width, radius)).toBeCloseTo(covered / all, 2);
  }
});

const length = (min: number, max: number): fc.Arbitrary<number> => fc.double({ min, max, noNaN: true });

test('at its reach a sensor sees just the share asked for, beyond it less', () => {
  fc.assert(
    fc.property(length(5, 100), length(0.5, 15), length(0.05, 0.95), (width, radius, share) => {
      const reach = seeingReach(width, radius, share);
      if (reach === undefined) {
        expect(coveredShare(0, width, radius)).toBeLessThan(share);
        return;
      }
      expect(coveredShare(reach, width, radius)).toBeGreaterThanOrEqual(share);
      expect(coveredShare(reach + 1e-6, width, radius)).toBeLessThan(share);
    }),
  );
});

test('half a spot is seen up to half the width of a line that is wider than the spot', () => {
  expect(seeingReach(19, 4, 0.5)).toBeCloseTo(9.5, 12);
  expect(seeingReach(5, 15, 0.5)).toBe(undefined);
});
