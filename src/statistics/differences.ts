/** The interval of a mean of paired differences, by Student's t (Student, Biometrika 6:1, 1908). */
import { betaQuantile } from './beta.js';
import { CONFIDENCE_SHARE, type Interval } from './rates.js';

/** Value of t beyond which (1 - share) of its distribution lies, share 1/2 to 1: t^2/(f + t^2) is beta(1/2, f/2). */
export function studentQuantile(share: number, degreesCount: number): number {
  const x = betaQuantile(2 * share - 1, 0.5, degreesCount / 2);
  return Math.sqrt((degreesCount * x) / (1 - x));
}

export interface MeanDifference extends Interval {
  pairs: number;
  mean: number;
}

/** Mean of paired differences and its interval; undefined of fewer than two. */
export function meanDifference(
  differences: readonly number[],
  confidenceShare = CONFIDENCE_SHARE,
): MeanDifference | undefined {
  const pairs = differences.length;
  if (pairs < 2) return undefined;
  const mean = differences.reduce((sum, each) => sum + each, 0) / pairs;
  const squares = differences.reduce((sum, each) => sum + (each - mean) ** 2, 0);
  const half =
    studentQuantile((1 + confidenceShare) / 2, pairs - 1) * Math.sqrt(squares / (pairs - 1) / pairs);
  return { pairs, mean, low: mean - half, high: mean + half };
}
