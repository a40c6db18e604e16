/**
 * Gain margin, phase margin and maximum sensitivity of a loop from its frequency response.
 *
 *   gain margin   1/|L| where L crosses the negative real axis, the least above 1; Infinity without one
 *   phase margin  180 deg + arg L where |L| = 1, the least; Infinity without a crossover
 *   Ms            max |1 / (1 + L)|
 *
 * A grid finds the crossings and the peak, bisection and golden section refine them: a grid alone reads
 * the peak too low. Source: Astrom and Murray, Feedback Systems, chapter 10.
 */
import type { Margins } from './design.js';
import { leastBetween } from './golden-section.js';

/** Frequency response: [real, imaginary] at a frequency in rad/s. */
export type Response = (frequencyRadS: number) => [number, number];

const GRID_POINTS = 160;
const REFINEMENTS = 44;

/** Margins and where they are read, and whether the loop crosses the negative real axis beyond -1. */
export interface LoopScan extends Margins {
  /**
   * Whether |L| > 1 at a crossing of the negative real axis, or L comes in from below it. A lane loop (two
   * integrators, lead) is stable when this is false; when it is true, it is unstable or stable only while the
   * gain does not fall either (Nyquist).
   */
  beyondMinusOne: boolean;
  /** Frequency of the crossing that sets the gain margin, rad/s; absent without one. */
  phaseCrossoverRadS?: number;
  /** Frequency of the crossover that sets the phase margin, rad/s; absent without one. */
  gainCrossoverRadS?: number;
  /** Frequency of the largest sensitivity, rad/s. */
  sensitivityPeakRadS: number;
}

/** Zero of `f` between `low` and `high`, where its signs differ. */
function bisect(f: (w: number) => number, low: number, high: number): number {
  let a = low;
  let b = high;
  const rising = f(a) < 0;
  for (let i = 0; i < REFINEMENTS; i++) {
    const middle = Math.sqrt(a * b);
    if (f(middle) < 0 === rising) a = middle;
    else b = middle;
  }
  return Math.sqrt(a * b);
}

/**
 * Margins of a loop.
 *
 * @param loop response of the open loop, negative feedback understood
 * @param lowestRadS lowest frequency looked at, rad/s
 * @param highestRadS highest frequency looked at, rad/s; the Nyquist frequency of a sampled loop
 */
export function scanLoop(loop: Response, lowestRadS: number, highestRadS: number): LoopScan {
  const size = (w: number) => Math.hypot(...loop(w));
  const imaginary = (w: number) => loop(w)[1];
  const distance = (w: number) => {
    const [re, im] = loop(w);
    return Math.hypot(1 + re, im);
  };
  const step = Math.pow(highestRadS / lowestRadS, 1 / (GRID_POINTS - 1));
  let gainMargin = Infinity;
  let phaseCrossoverRadS: number | undefined;
  let gainCrossoverRadS: number | undefined;
  let phaseMarginDeg = Infinity;
  let highestSensitivity = 0;
  let peakAt = lowestRadS;
  let before = lowestRadS;
  let [reBefore, imBefore] = loop(before);
  let beyondMinusOne = reBefore < -1 && imBefore > 0;
  for (let i = 0; i < GRID_POINTS; i++) {
    const w = i === GRID_POINTS - 1 ? highestRadS : lowestRadS * Math.pow(step, i);
    const [re, im] = loop(w);
    if (i > 0) {
      if (imBefore < 0 !== im < 0 && reBefore < 0 && re < 0) {
        const crossing = bisect(imaginary, before, w);
        const at = size(crossing);
        if (at >= 1) beyondMinusOne = true;
        else if (1 / at < gainMargin) [gainMargin, phaseCrossoverRadS] = [1 / at, crossing];
      }
      if (Math.hypot(reBefore, imBefore) > 1 !== Math.hypot(re, im) > 1) {
        const crossover = bisect((x) => size(x) - 1, before, w);
        const [cr, ci] = loop(crossover);
        const margin = Math.abs((Math.atan2(-ci, -cr) * 180) / Math.PI);
        if (margin < phaseMarginDeg) [phaseMarginDeg, gainCrossoverRadS] = [margin, crossover];
      }
    }
    const s = 1 / Math.hypot(1 + re, im);
    if (s > highestSensitivity) {
      highestSensitivity = s;
      peakAt = w;
    }
    [before, reBefore, imBefore] = [w, re, im];
  }
  const low = Math.max(lowestRadS, peakAt / step);
  const high = Math.min(highestRadS, peakAt * step);
  const nearest = leastBetween(distance, low, high, REFINEMENTS);
  const refined = 1 / nearest.value >= highestSensitivity;
  return {
    gainMargin,
    phaseMarginDeg,
    ms: refined ? 1 / nearest.value : highestSensitivity,
    sensitivityPeakRadS: refined ? nearest.at : peakAt,
    beyondMinusOne,
    ...(phaseCrossoverRadS !== undefined && { phaseCrossoverRadS }),
    ...(gainCrossoverRadS !== undefined && { gainCrossoverRadS }),
  };
}

/** Points of the coarse grid that a search may use; the peak is refined after it. */
const COARSE_POINTS = 56;
const COARSE_REFINEMENTS = 14;

/**
 * Ms of a lane loop on a coarse grid, for searches; Infinity where the loop is unstable.
 *
 * @param integrating whether the controller integrates: then the loop comes from above the negative real axis and has to cross
 * it once beyond -1, downwards; only a crossing back is bad
 */
export function quickPeak(
  loop: Response,
  lowestRadS: number,
  highestRadS: number,
  integrating = false,
): number {
  const step = Math.pow(highestRadS / lowestRadS, 1 / (COARSE_POINTS - 1));
  let highest = 0;
  let peakAt = lowestRadS;
  let reBefore = -1;
  let imBefore = integrating ? 1 : -1;
  let sizeBefore = Infinity;
  for (let i = 0, w = lowestRadS; i < COARSE_POINTS; i++, w *= step) {
    const [re, im] = loop(Math.min(w, highestRadS));
    const size = re * re + im * im;
    // a crossing of the negative real axis with |L| > 1 on both sides of it, or from the start on
    const turns = integrating ? imBefore < 0 && im >= 0 : imBefore < 0 !== im < 0;
    const crosses = turns && reBefore < 0 && re < 0;
    if (crosses && size > 1 && sizeBefore > 1) return Infinity;
    const s = 1 / ((1 + re) * (1 + re) + im * im);
    if (s > highest) [highest, peakAt] = [s, w];
    [reBefore, imBefore, sizeBefore] = [re, im, size];
  }
  const distanceSquared = (w: number) => {
    const [re, im] = loop(w);
    return (1 + re) * (1 + re) + im * im;
  };
  const high = Math.min(highestRadS, peakAt * step);
  const least = leastBetween(distanceSquared, peakAt / step, high, COARSE_REFINEMENTS).value;
  return Math.sqrt(Math.max(highest, 1 / least));
}

/** Margins of a loop; see scanLoop. */
export function marginsOf(loop: Response, lowestRadS: number, highestRadS: number): Margins {
  const { gainMargin, phaseMarginDeg, ms } = scanLoop(loop, lowestRadS, highestRadS);
  return { gainMargin, phaseMarginDeg, ms };
}
