/**
 * Statistics of rehearsals against published tables and, live, against scipy.
 *
 * Clopper-Pearson: the two-sided 95 % interval of 0 of 10 is 0 to 0.3085, of 1 of 10 0.0025 to 0.4450, of 5 of 10 0.1871 to 0.8129
 * (tables of exact binomial limits, e.g. Documenta Geigy, Scientific Tables; from memory, confirmed live by scipy below).
 * Student's t, 97.5 %: 12.706, 2.228, 2.042, 1.984 for 1, 10, 30, 100 degrees of freedom (any table; from memory).
 * "Rule of three": no failure in n runs, rate of failures below 3/n (Hanley and Lippman-Hand, JAMA 249:1743, 1983).
 */
import { execFileSync } from 'node:child_process';
import { describe, expect, it } from 'vitest';
import { betaQuantile, betaShare, logGamma } from '../../src/statistics/beta.js';
import { meanDifference, studentQuantile } from '../../src/statistics/differences.js';
import { clopperPearson, leastRateShare, pairedRateChance, runsToShow } from '../../src/statistics/rates.js';

describe('published values', () => {
  it.each([
    [0, 10, 0, 0.3085],
    [1, 10, 0.0025, 0.445],
    [5, 10, 0.1871, 0.8129],
    [10, 10, 0.6915, 1],
  ])('Clopper-Pearson 1934, %i of %i', (hits, runs, low, high) => {
    const interval = clopperPearson(hits, runs);
    expect(interval.low).toBeCloseTo(low, 4);
    expect(interval.high).toBeCloseTo(high, 4);
  });

  it.each([
    [1, 12.706],
    [10, 2.228],
    [30, 2.042],
    [100, 1.984],
  ])("Student's t, 97.5 %%, %i degrees of freedom", (degrees, t) => {
    expect(studentQuantile(0.975, degrees)).toBeCloseTo(t, 3);
  });

  it('runs without a failure: ln 0.05 / ln target, about three over the rate of failures', () => {
    expect(runsToShow(0.95, 0)).toBe(59);
    expect(runsToShow(0.99, 0)).toBe(299);
    expect(runsToShow(0.995, 0)).toBe(598);
    for (const runs of [50, 200, 1000]) {
      expect(1 - leastRateShare(runs, runs)).toBeCloseTo(3 / runs, runs >= 200 ? 3 : 2);
    }
  });

  it('one failure allowed: 93 runs for 95 %, 473 for 99 % (tables of attribute sampling, from memory)', () => {
    expect(runsToShow(0.95, 1)).toBe(93);
    expect(runsToShow(0.99, 1)).toBe(473);
  });
});

const RATES = [
  [0, 7],
  [1, 7],
  [98, 100],
  [995, 1000],
  [3, 1000],
  [9990, 10_000],
] as const;
const BETAS = [
  [0.3, 0.5, 0.5],
  [0.01, 2, 80],
  [0.97, 300, 12],
  [0.5, 5, 5],
  [0.9999, 20_000, 3],
] as const;
const SPLITS = [
  [1, 9],
  [0, 5],
  [12, 20],
  [7, 7],
] as const;
const DIFFERENCES = [0.11, -0.02, 0.07, 0.05, 0.012, 0.08, -0.01, 0.034];

const PYTHON = `
import json, sys
import numpy
from scipy import stats, special
rates, betas, splits, differences = json.load(sys.stdin)
test = getattr(stats, "binomtest", None)
chance = lambda a, b: test(a, a + b).pvalue if test else stats.binom_test(a, a + b)
d = numpy.array(differences)
print(json.dumps({
  "rates": [[float(numpy.nan_to_num(stats.beta.ppf(0.025, k, n - k + 1))), float(stats.beta.ppf(0.975, k + 1, n - k))] for k, n in rates],
  "shares": [float(special.betainc(a, b, x)) for x, a, b in betas],
  "quantiles": [float(stats.beta.ppf(x, a, b)) for x, a, b in betas],
  "chances": [float(chance(a, b)) for a, b in splits],
  "t": [float(x) for x in stats.t.interval(0.95, len(d) - 1, loc=d.mean(), scale=stats.sem(d))],
  "gamma": [float(special.gammaln(x)) for x in (0.5, 1, 3.7, 250.5)],
}))
`;

interface Scipy {
  rates: [number, number][];
  shares: number[];
  quantiles: number[];
  chances: number[];
  t: [number, number];
  gamma: number[];
}

describe('scipy', () => {
  const input = JSON.stringify([RATES, BETAS, SPLITS, DIFFERENCES]);
  const scipy = JSON.parse(
    execFileSync('/usr/bin/python3', ['-c', PYTHON], { input, encoding: 'utf8' }),
  ) as Scipy;

  it('gives the same intervals of rates', () => {
    RATES.forEach(([hits, runs], i) => {
      const interval = clopperPearson(hits, runs);
      expect(interval.low).toBeCloseTo(scipy.rates[i]![0], 10);
      expect(interval.high).toBeCloseTo(scipy.rates[i]![1], 10);
    });
  });

  it('gives the same beta distribution and gamma function', () => {
    BETAS.forEach(([x, a, b], i) => {
      expect(betaShare(x, a, b)).toBeCloseTo(scipy.shares[i]!, 11);
      expect(betaQuantile(x, a, b)).toBeCloseTo(scipy.quantiles[i]!, 10);
    });
    [0.5, 1, 3.7, 250.5].forEach((x, i) => expect(logGamma(x)).toBeCloseTo(scipy.gamma[i]!, 10));
  });

  it('gives the same chance of uneven pairs', () => {
    SPLITS.forEach(([a, b], i) => expect(pairedRateChance(a, b)).toBeCloseTo(scipy.chances[i]!, 11));
  });

  it('gives the same interval of a mean difference', () => {
    const found = meanDifference(DIFFERENCES)!;
    expect(found.low).toBeCloseTo(scipy.t[0], 10);
    expect(found.high).toBeCloseTo(scipy.t[1], 10);
  });
});

it('says nothing of fewer than two pairs', () => {
  expect(meanDifference([0.1])).toBeUndefined();
});
