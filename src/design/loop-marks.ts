/**
 * Where on the open loop's curve over frequency the margins are read, and which corners of the tolerance box have the worst.
 *
 *   gain margin   at the crossing of the negative real axis next to -1 with |L| below 1
 *   phase margin  at the crossover |L| = 1 with the least distance of the phase from -180 deg
 *   Ms            where |1 + L| is least
 *
 * Sign changes on a logarithmic grid, refined by bisection and golden section. Source: Astrom and Murray, Feedback Systems, chapter 10.
 */
import { radToDeg } from '../sheet/units.js';
import type { Vehicle } from '../vehicle/vehicle.js';
import type { Response } from './margins.js';
import { type Corner, marginsAt, toleranceCorners } from './tolerance-box.js';
import type { SteeringGains } from './steering-loop.js';

/** A margin and the frequency at which it is read, rad/s. */
export interface LoopMark {
  frequencyRadS: number;
  /** A factor, degrees or Ms, by kind. */
  margin: number;
}

export interface LoopMarks {
  /** Factor; absent when the loop never crosses the negative real axis below 1. */
  gain?: LoopMark;
  /** Degrees; absent without a crossover. */
  phaseDeg?: LoopMark;
  ms: LoopMark;
}

const REFINEMENTS = 50;

/** Frequencies at even ratios, both ends included, rad/s. */
export function frequencyGrid(lowestRadS: number, highestRadS: number, count: number): number[] {
  const ratio = highestRadS / lowestRadS;
  return Array.from({ length: count }, (_, i) => lowestRadS * ratio ** (i / (count - 1)));
}

/** Where `f` changes its sign between two frequencies. */
function crossing(f: (w: number) => number, low: number, high: number): number {
  let [a, b] = [low, high];
  const falls = f(a) > 0;
  for (let i = 0; i < REFINEMENTS; i++) {
    const middle = Math.sqrt(a * b);
    if (f(middle) > 0 === falls) a = middle;
    else b = middle;
  }
  return Math.sqrt(a * b);
}

/** Where `f` is least between two frequencies around one minimum. */
function lowest(f: (w: number) => number, low: number, high: number): number {
  const ratio = (Math.sqrt(5) - 1) / 2;
  let [a, b] = [low, high];
  for (let i = 0; i < REFINEMENTS; i++) {
    const [c, d] = [b - ratio * (b - a), a + ratio * (b - a)];
    if (f(c) < f(d)) b = d;
    else a = c;
  }
  return (a + b) / 2;
}

/**
 * The margins of a loop with their frequencies.
 *
 * @param frequenciesRadS rising, at least three, as close as the loop's crossings need
 */
export function loopMarks(loop: Response, frequenciesRadS: readonly number[]): LoopMarks {
  const size = (w: number) => Math.hypot(...loop(w));
  const distance = (w: number) => {
    const [re, im] = loop(w);
    return Math.hypot(1 + re, im);
  };
  const distances = frequenciesRadS.map(distance);
  const nearest = distances.indexOf(Math.min(...distances));
  const last = frequenciesRadS.length - 1;
  const msAt = lowest(
    distance,
    frequenciesRadS[Math.max(0, nearest - 1)]!,
    frequenciesRadS[Math.min(last, nearest + 1)]!,
  );
  const marks: LoopMarks = { ms: { frequencyRadS: msAt, margin: 1 / distance(msAt) } };
  for (let i = 1; i <= last; i++) {
    const [before, w] = [frequenciesRadS[i - 1]!, frequenciesRadS[i]!];
    const [reBefore, imBefore] = loop(before);
    const [re, im] = loop(w);
    if (imBefore < 0 !== im < 0 && reBefore < 0 && re < 0) {
      const frequencyRadS = crossing((x) => loop(x)[1], before, w);
      const margin = 1 / size(frequencyRadS);
      if (margin > 1 && margin < (marks.gain?.margin ?? Infinity)) marks.gain = { frequencyRadS, margin };
    }
    if (Math.hypot(reBefore, imBefore) > 1 !== Math.hypot(re, im) > 1) {
      const frequencyRadS = crossing((x) => size(x) - 1, before, w);
      const [cr, ci] = loop(frequencyRadS);
      const margin = Math.abs(radToDeg(Math.atan2(-ci, -cr)));
      if (margin < (marks.phaseDeg?.margin ?? Infinity)) marks.phaseDeg = { frequencyRadS, margin };
    }
  }
  return marks;
}

/** Corners of the tolerance box in which each margin is worst; the nominal vehicle where none is worse. */
export interface WorstCorners {
  gain: Corner;
  phase: Corner;
  ms: Corner;
}

export function worstCorners(vehicle: Vehicle, speedMps: number, gains: SteeringGains): WorstCorners {
  const judged = toleranceCorners(vehicle).map((corner) => ({
    corner,
    margins: marginsAt(vehicle, speedMps, gains, corner),
  }));
  type Judged = (typeof judged)[number];
  const worst = (isWorse: (a: Judged['margins'], b: Judged['margins']) => boolean) =>
    judged.reduce((found, each) => (isWorse(each.margins, found.margins) ? each : found)).corner;
  return {
    gain: worst((a, b) => a.gainMargin < b.gainMargin),
    phase: worst((a, b) => a.phaseMarginDeg < b.phaseMarginDeg),
    ms: worst((a, b) => a.ms > b.ms),
  };
}
