import { describe, expect, it } from 'vitest';
import type { RunResult } from '../../src/rehearsal/engine.js';
import { countedLapsS, median, summarise } from '../../src/rehearsal/metrics.js';

function result(changes: Partial<RunResult>): RunResult {
  return { seed: 1, lapsS: [5, 4], timeS: 9, rmsLateralM: 0.003, maxLateralM: 0.01, ...changes };
}

const lost = { reason: 'off-lane', sM: 7.5, timeS: 3, xM: 1, yM: 2 } as const;

describe('median', () => {
  it.each([
    [[3], 3],
    [[4, 1, 2], 2],
    [[4, 1, 2, 8], 3],
    [[], undefined],
  ])('of %j is %s', (values, expected) => {
    expect(median(values)).toBe(expected);
  });
});

describe('countedLapsS', () => {
  it('leaves out the lap from standing where there is a flying one', () => {
    expect(countedLapsS(result({ lapsS: [5, 4, 4.2] }))).toEqual([4, 4.2]);
    expect(countedLapsS(result({ lapsS: [5] }))).toEqual([5]);
    expect(countedLapsS(result({ lapsS: [] }))).toEqual([]);
  });
});

describe('summarise', () => {
  it('takes the lap from finished runs and the errors from all', () => {
    const results = [
      result({}),
      result({ seed: 2, lapsS: [5, 4.4], timeS: 9.4 }),
      result({ seed: 3, lapsS: [4.9], timeS: 6, rmsLateralM: 0.006, maxLateralM: 0.06, loss: lost }),
    ];
    const report = summarise(results, 'twin', 4, 5);
    expect(report).toMatchObject({
      runs: 3,
      finished: 2,
      lost: 1,
      lapS: 4.2,
      boundLapS: 4,
      seed: 1,
      engine: 'twin',
    });
    expect(report.ratio).toBeCloseTo(1.05, 12);
    expect(report.maxLateralMm).toBeCloseTo(60, 12);
    expect(report.rmsLateralMm).toBeCloseTo(
      1000 * Math.sqrt((18.4 * 0.003 ** 2 + 6 * 0.006 ** 2) / 24.4),
      12,
    );
    expect(report.list[0]).not.toHaveProperty('reason');
    expect(report.list[2]).toMatchObject({
      seed: 3,
      finished: false,
      reason: 'off-lane',
      lostInLap: 2,
      lapS: 4.9,
    });
    expect(report.list[2]!.lostAtMm).toBeCloseTo(2500, 9);
  });

  it('has no lap time where no run finished', () => {
    const report = summarise([result({ loss: lost, lapsS: [5] })], 'chip', 4, 5);
    expect(report).toMatchObject({ finished: 0, lapS: null, ratio: null, engine: 'chip' });
    expect(summarise([result({ loss: lost, lapsS: [] })], 'chip', 4, 5).list[0]!.lapS).toBeNull();
  });
});
