import { describe, expect, it } from 'vitest';
import type { RunResult } from '../../src/rehearsal/engine.js';
import { comparePairs } from '../../src/rehearsal/paired-comparison.js';
import { curvePoint } from '../../src/rehearsal/speed-curve.js';
import { summarise } from '../../src/rehearsal/metrics.js';
import { pairsText } from '../../src/report/pairs-text.js';
import { curveText } from '../../src/report/curve-text.js';

function run(seed: number, lapS: number | undefined, rmsLateralM = 0.005): RunResult {
  const lost = { reason: 'off-lane', sM: 1, timeS: 2, xM: 0, yM: 0 } as const;
  const common = { seed, timeS: 10, rmsLateralM, maxLateralM: 2 * rmsLateralM };
  return lapS === undefined ? { ...common, loss: lost, lapsS: [] } : { ...common, lapsS: [lapS + 0.5, lapS] };
}

describe('comparePairs', () => {
  const first = [5, 5.2, undefined, 5.1, 5.3, undefined].map((lapS, i) => run(i + 1, lapS));
  const second = [4.9, 5.0, 5, 5.0, undefined, undefined].map((lapS, i) => run(i + 1, lapS, 0.004));
  const pairs = comparePairs(first, second);

  it('counts who finished, run by run', () => {
    expect(pairs.finish).toMatchObject({ both: 3, onlyFirst: 1, onlySecond: 1, neither: 1, chance: 1 });
  });

  it('takes differences over the pairs of which both finished', () => {
    // -0.1, -0.2, -0.1: mean -0.1333, standard error 0.0333, t(2) at 97.5 % 4.3027 (any table)
    expect(pairs.lapS!.mean).toBeCloseTo(-0.4 / 3, 12);
    expect(pairs.lapS!.high).toBeCloseTo(-0.4 / 3 + 4.30265 / 30, 5);
    expect(pairs.firstMeanLapS).toBeCloseTo(5.1, 12);
    expect(pairs.rmsLateralMm!.mean).toBeCloseTo(-1, 12);
  });

  it('refuses runs of other seeds', () => {
    expect(() => comparePairs(first, second.slice(1))).toThrow('Only runs of the same seeds');
  });

  it('is told in words', () => {
    const side = (name: string, results: RunResult[]) => ({ name, report: summarise(results, 'twin', 4, 5) });
    const text = pairsText(side('a', first), side('b', second), pairs, 'lane.json');
    expect(text).toContain('only A 1, only B 1');
    expect(text).toContain('-0.133 s (-0.277 to +0.010) (-2.6 %)');
    expect(text).toContain('No difference in lap time can be told with 95 % confidence.');
  });
});

describe('curvePoint', () => {
  it('has the rate with its interval and the median lap', () => {
    const point = curvePoint(1.1, [run(1, 5), run(2, undefined), run(3, 6)]);
    expect(point).toMatchObject({ factor: 1.1, runs: 3, finished: 2, lapS: 5.5 });
    expect(point.finishedPercent).toBeCloseTo(200 / 3, 9);
    // 2 of 3 (tables of exact binomial limits, from memory; the interval itself is checked against scipy)
    expect(point.lowPercent).toBeCloseTo(9.43, 2);
    expect(point.highPercent).toBeCloseTo(99.16, 2);
  });

  it('is told in words, with the fastest that keeps the target', () => {
    const points = [curvePoint(0.9, [run(1, 6), run(2, 6)]), curvePoint(1.2, [run(1, 5), run(2, undefined)])];
    const text = curveText(points, 4, 99.5);
    expect(text).toContain("Up to 0.90 times the design's speeds 99.5 % or more finish here.");
    expect(text).toMatch(/1\.20 +1 of 2 .*5\.00 s +1\.25 +#{12}\n/);
  });
});
