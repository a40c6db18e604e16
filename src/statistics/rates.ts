/** What runs tell about a rate: exact intervals, and how many runs a statement takes. */
import { betaQuantile, betaShare } from './beta.js';

/** Confidence of every interval that is printed. */
export const CONFIDENCE_SHARE = 0.95;

/** An interval, with the share of such intervals that hold the truth. */
export interface Interval {
  low: number;
  high: number;
}

/**
 * Interval of a rate after `hits` of `runs`: both ends such that the outcome, or one further off, had half of 1 - confidence.
 *
 * Source: Clopper and Pearson, The use of confidence or fiducial limits, Biometrika 26:404, 1934; by the beta distribution.
 */
export function clopperPearson(hits: number, runs: number, confidenceShare = CONFIDENCE_SHARE): Interval {
  const tail = (1 - confidenceShare) / 2;
  return {
    low: hits === 0 ? 0 : betaQuantile(tail, hits, runs - hits + 1),
    high: hits === runs ? 1 : betaQuantile(1 - tail, hits + 1, runs - hits),
  };
}

/** The lower end alone: the rate is at least this with the stated confidence. Same source. */
export function leastRateShare(hits: number, runs: number, confidenceShare = CONFIDENCE_SHARE): number {
  return hits === 0 ? 0 : betaQuantile(1 - confidenceShare, hits, runs - hits + 1);
}

/**
 * Runs, `misses` of them missing, after which a rate is at least `targetShare` with the stated confidence.
 *
 * Without a miss it is ln(1 - confidence)/ln(target): 59 for 95 %, 598 for 99.5 %.
 */
export function runsToShow(targetShare: number, misses: number, confidenceShare = CONFIDENCE_SHARE): number {
  const shows = (runs: number) => leastRateShare(runs - misses, runs, confidenceShare) >= targetShare;
  let [low, high] = [misses, misses + 1];
  while (!shows(high)) [low, high] = [high, 2 * high];
  while (high - low > 1) {
    const middle = Math.floor((low + high) / 2);
    if (shows(middle)) high = middle;
    else low = middle;
  }
  return high;
}

/** With which confidence so many hits show that the rate is at least `targetShare`: the other side of `leastRateShare`. */
export function shownConfidenceShare(hits: number, runs: number, targetShare: number): number {
  return hits === 0 ? 0 : 1 - betaShare(targetShare, hits, runs - hits + 1);
}

/**
 * Whether two ways differ in a rate, from runs where only one of them succeeded: probability of so uneven a split, or one more so, if
 * they were alike. Exact binomial form of the test of McNemar (Psychometrika 12:153, 1947), both sides.
 */
export function pairedRateChance(onlyFirst: number, onlySecond: number): number {
  const [fewer, all] = [Math.min(onlyFirst, onlySecond), onlyFirst + onlySecond];
  // binomial share of at most `fewer` of `all` at 1/2, by the beta distribution
  return all === 0 || 2 * fewer === all ? 1 : Math.min(1, 2 * betaShare(0.5, all - fewer, fewer + 1));
}
