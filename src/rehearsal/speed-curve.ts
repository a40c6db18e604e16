/** Speed against finish rate: the same drawn vehicles driven at class speeds from below to above those of the design. */
import { clopperPearson } from '../statistics/rates.js';
import { fractionToPercent } from '../sheet/units.js';
import type { RunResult } from './engine.js';
import { countedLapsS, median } from './metrics.js';

/** Factors on the design's class speeds. */
export const CURVE_FACTORS: readonly number[] = [
  0.7, 0.8, 0.85, 0.9, 0.95, 1, 1.05, 1.1, 1.15, 1.2, 1.25, 1.3,
];
/** Drawn vehicles at each factor, where no number is given. */
export const CURVE_RUNS = 200;

export interface CurvePoint {
  /** Class speeds over those of the design. */
  factor: number;
  runs: number;
  finished: number;
  /** Share that finished, and its interval by Clopper and Pearson, %. */
  finishedPercent: number;
  lowPercent: number;
  highPercent: number;
  /** Median lap of those that finished, s; null where none did. */
  lapS: number | null;
}

export function curvePoint(factor: number, results: readonly RunResult[]): CurvePoint {
  const done = results.filter(({ loss }) => loss === undefined);
  const runs = results.length;
  const { low, high } = clopperPearson(done.length, runs);
  return {
    factor,
    runs,
    finished: done.length,
    finishedPercent: fractionToPercent(done.length / runs),
    lowPercent: fractionToPercent(low),
    highPercent: fractionToPercent(high),
    lapS: median(done.flatMap(countedLapsS)) ?? null,
  };
}
