/**
 * Where on the open loop's curve over frequency the margins are read, and which corners of the tolerance box have the worst.
 *
 *   gain margin   at the crossing of the negative real axis next to -1 with |L| below 1
 *   phase margin  at the crossover |L| = 1 with the least distance of the phase from -180 deg
 *   Ms            where |1 + L| is least
 *
 * margins.ts finds them.
 */
import type { Vehicle } from '../vehicle/vehicle.js';
import { type Response, scanLoop } from './margins.js';
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

/** Frequencies at even ratios, both ends included, rad/s. */
export function frequencyGrid(lowestRadS: number, highestRadS: number, count: number): number[] {
  const ratio = highestRadS / lowestRadS;
  return Array.from({ length: count }, (_, i) => lowestRadS * ratio ** (i / (count - 1)));
}

/**
 * The margins of a loop with their frequencies.
 *
 * @param frequenciesRadS rising; the loop is looked at between the first and the last
 */
export function loopMarks(loop: Response, frequenciesRadS: readonly number[]): LoopMarks {
  const found = scanLoop(loop, frequenciesRadS[0]!, frequenciesRadS[frequenciesRadS.length - 1]!);
  const { phaseCrossoverRadS, gainCrossoverRadS, sensitivityPeakRadS } = found;
  return {
    ...(phaseCrossoverRadS !== undefined && {
      gain: { frequencyRadS: phaseCrossoverRadS, margin: found.gainMargin },
    }),
    ...(gainCrossoverRadS !== undefined && {
      phaseDeg: { frequencyRadS: gainCrossoverRadS, margin: found.phaseMarginDeg },
    }),
    ms: { frequencyRadS: sensitivityPeakRadS, margin: found.ms },
  };
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
