/**
 * Two vehicles on the same course and the same seeds, run by run: what differs, and whether that could be chance.
 *
 * A seed draws both from the same random numbers (plant-table.ts), so that the difference of a pair varies less than each does.
 * Differences are those of the second less the first. Means of differences with the interval of Student's paired t; finish rates by
 * the runs that only one of the two finished (exact test of McNemar).
 */
import { mToMm } from '../sheet/units.js';
import { meanDifference } from '../statistics/differences.js';
import { CONFIDENCE_SHARE, pairedRateChance } from '../statistics/rates.js';
import type { RunResult } from './engine.js';
import { countedLapsS, median } from './metrics.js';

/** A mean of paired differences and its interval, in the unit of its name. */
export interface Difference {
  pairs: number;
  mean: number;
  low: number;
  high: number;
}

export interface PairedComparison {
  runs: number;
  confidencePercent: number;
  finish: {
    both: number;
    onlyFirst: number;
    onlySecond: number;
    neither: number;
    /** Chance of so uneven a split, or one more so, if both finished alike. */
    chance: number;
  };
  /** Over the pairs of which both finished; null where there are fewer than two. */
  lapS: Difference | null;
  /** The first vehicle's mean lap over the same pairs, s; null where there are none. */
  firstMeanLapS: number | null;
  rmsLateralMm: Difference | null;
  maxLateralMm: Difference | null;
}

/** @param first results of one vehicle, and of the other with the same seeds in the same order */
export function comparePairs(first: readonly RunResult[], second: readonly RunResult[]): PairedComparison {
  const pairs = first.map((one, i) => {
    const other = second[i];
    if (other?.seed !== one.seed) throw new RangeError('Only runs of the same seeds can be compared.');
    return { one, other, oneDone: one.loss === undefined, otherDone: other.loss === undefined };
  });
  const number = (oneDone: boolean, otherDone: boolean) =>
    pairs.filter((pair) => pair.oneDone === oneDone && pair.otherDone === otherDone).length;
  const [onlyFirst, onlySecond] = [number(true, false), number(false, true)];
  const finished = pairs.filter(({ oneDone, otherDone }) => oneDone && otherDone);
  const lapOf = (result: RunResult) => median(countedLapsS(result)) ?? Number.NaN;
  const differenceOf = (of: (result: RunResult) => number) =>
    meanDifference(finished.map(({ one, other }) => of(other) - of(one))) ?? null;
  const laps = finished.map(({ one }) => lapOf(one));
  return {
    runs: pairs.length,
    confidencePercent: 100 * CONFIDENCE_SHARE,
    finish: {
      both: finished.length,
      onlyFirst,
      onlySecond,
      neither: number(false, false),
      chance: pairedRateChance(onlyFirst, onlySecond),
    },
    lapS: differenceOf(lapOf),
    firstMeanLapS: laps.length === 0 ? null : laps.reduce((sum, lapS) => sum + lapS, 0) / laps.length,
    rmsLateralMm: differenceOf((result) => mToMm(result.rmsLateralM)),
    maxLateralMm: differenceOf((result) => mToMm(result.maxLateralM)),
  };
}
