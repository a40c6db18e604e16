import { describe, expect, it } from 'vitest';
import { Random } from '../../src/rehearsal/random.js';

describe('Random', () => {
  it('repeats itself by seed and stream, and only by them', () => {
    const draw = (seed: number, stream: number): number[] => {
      const random = new Random(seed, stream);
      return Array.from({ length: 5 }, () => random.bits());
    };
    expect(draw(7, 1)).toEqual(draw(7, 1));
    const others = [draw(7, 2), draw(8, 1), draw(0, 0), draw(1, 0), draw(0, 1), draw(4294967295, 1)];
    const all = [draw(7, 1), ...others].map((numbers) => numbers.join());
    expect(new Set(all).size).toBe(all.length);
  });

  it('fills an interval evenly', () => {
    const random = new Random(1, 1);
    const bins = new Int32Array(20);
    for (let i = 0; i < 40000; i++) bins[Math.floor((random.uniform(-3, 5) + 3) / 0.4)]!++;
    // Chi square with 19 degrees of freedom: 43.8 at 0.1 %.
    const chiSquare = bins.reduce((sum, count) => sum + (count - 2000) ** 2 / 2000, 0);
    expect(chiSquare).toBeLessThan(43.8);
  });

  it('starts neighbouring seeds independently', () => {
    const firsts = Array.from({ length: 4000 }, (_, seed) => new Random(seed, 1).uniform(0, 1));
    const products = firsts.slice(1).map((value, i) => (value - 0.5) * (firsts[i]! - 0.5));
    const correlation = (12 * products.reduce((sum, value) => sum + value, 0)) / products.length;
    expect(Math.abs(correlation)).toBeLessThan(4 / Math.sqrt(4000));
    const mean = firsts.reduce((sum, value) => sum + value, 0) / firsts.length;
    expect(Math.abs(mean - 0.5)).toBeLessThan(4 / Math.sqrt(12 * 4000));
  });

  it('gives normal numbers: moments and tails', () => {
    const random = new Random(5, 2);
    const values = Array.from({ length: 100000 }, () => random.normal());
    const moment = (power: number): number =>
      values.reduce((sum, value) => sum + value ** power, 0) / values.length;
    expect(moment(1)).toBeCloseTo(0, 1);
    expect(moment(2)).toBeCloseTo(1, 1);
    expect(Math.abs(moment(3))).toBeLessThan(0.05);
    expect(Math.abs(moment(4) - 3)).toBeLessThan(0.12);
    // Beyond two standard deviations: 4.55 %.
    const beyond = values.filter((value) => Math.abs(value) > 2).length / values.length;
    expect(Math.abs(beyond - 0.0455)).toBeLessThan(0.003);
  });
});
