/**
 * Speeds in bends of real roads: AASHTO, A Policy on Geometric Design of Highways and Streets, 7th ed. (2018), table 3-7: least radius
 * R = V^2/(127 (e + f)) for a speed V in km/h, cross slope e and side friction f.
 *
 * Our bound on the lap time takes bends at v = sqrt(mu g r): with mu = e + f the same law, but for g, which is 9.80665 m/s^2 where
 * the table rounds 127.094 to 127.
 */
import { describe, expect, test } from 'vitest';
import { circleSpeedMps } from './circle-speed.js';

/** 127 for 3.6^2 g, as a relative error of the speed. */
const ROUNDED_CONSTANT = 1 - Math.sqrt(127 / (3.6 ** 2 * 9.80665));

/** V km/h, f, R at e = 4 % and at e = 6 %, m. */
const TABLE: readonly [number, number, number | undefined, number][] = [
  [15, 0.4, 4.0, 3.9],
  [20, 0.35, 8.1, 7.7],
  [30, 0.28, 22.1, 20.8],
  [40, 0.23, 46.7, 43.4],
  [50, 0.19, 85.6, 78.7],
  [60, 0.17, 135.0, 123.2],
  [70, 0.15, 203.1, 183.7],
  [80, 0.14, 280.0, 252.0],
  [90, 0.13, 375.2, 335.7],
  [100, 0.12, 492.1, 437.4],
  [110, 0.11, undefined, 560.4],
  [120, 0.09, undefined, 755.9],
  [130, 0.08, undefined, 950.5],
];

function expectSpeed(speedKmH: number, friction: number, radiusM: number): void {
  const found = 3.6 * circleSpeedMps(friction, radiusM);
  // the radius is printed to 0.1 m: half of that is a quarter of its relative size in the speed
  const rounding = 0.05 / (2 * radiusM);
  expect(Math.abs(found / speedKmH - 1)).toBeLessThan(rounding + ROUNDED_CONSTANT);
}

describe('table 3-7', () => {
  test.each(TABLE)('%d km/h, side friction %d', (speedKmH, friction, radiusAt4, radiusAt6) => {
    if (radiusAt4 !== undefined) expectSpeed(speedKmH, friction + 0.04, radiusAt4);
    expectSpeed(speedKmH, friction + 0.06, radiusAt6);
  });
});

// Ethiopian Roads Authority, Geometric Design Manual 2002, example to table 8-1: 100 km/h, e 0.08, f 0.12 give 393.7 m.
test('worked example of 393.7 m', () => {
  expectSpeed(100, 0.2, 393.7);
});
