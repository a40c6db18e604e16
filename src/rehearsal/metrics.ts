/**
 * The figures of a rehearsal, from the results of its runs alone: parts of a study give the whole when their runs are put together.
 *
 * Times of laps are those of flying laps (the second lap on); where no run has one, those from standing. Errors are over all runs,
 * lost ones too, up to where they were lost.
 */
import { fractionToPercent, mToMm } from '../sheet/units.js';
import { CONFIDENCE_SHARE, clopperPearson } from '../statistics/rates.js';
import type { Ending } from './ending.js';
import type { EngineName, LossReason, RunResult } from './engine.js';

/** One run, as `rehearse --json` lists it. */
export interface RunRecord {
  seed: number;
  finished: boolean;
  /** Median of its flying laps, s; null when it has none. */
  lapS: number | null;
  /** All its full laps, s; the first one from standing. */
  lapsS: number[];
  timeS: number;
  rmsLateralMm: number;
  maxLateralMm: number;
  /** Only when lost. */
  reason?: LossReason;
  /** What the firmware left behind where its program ended by itself, e.g. a traceback. */
  detail?: string;
  /** Where on the lane it was lost, mm from the start line, and in which lap, from 1. */
  lostAtMm?: number;
  lostInLap?: number;
  /** With --fault only. */
  ending?: Ending;
}

/** What `rehearse --json` gives. */
export interface RehearsalReport {
  runs: number;
  finished: number;
  lost: number;
  /** Median over the laps of all finished runs, s; null when none finished. */
  lapS: number | null;
  /** Physical bound of the lap, s. */
  boundLapS: number;
  /** lapS over boundLapS. */
  ratio: number | null;
  rmsLateralMm: number;
  maxLateralMm: number;
  /** Interval of the share of all such vehicles that finish, by Clopper and Pearson; null of a single run. */
  finishRate: { lowPercent: number; highPercent: number; confidencePercent: number } | null;
  /** Seed of the first run; run i has seed + i. */
  seed: number;
  engine: EngineName;
  list: RunRecord[];
}

/** Laps that count for the lap time: the flying ones, or those from standing where there are no others. */
export function countedLapsS(result: RunResult): number[] {
  return result.lapsS.length > 1 ? result.lapsS.slice(1) : result.lapsS;
}

/** Middle value, or mean of the two middle ones; undefined of nothing. */
export function median(values: readonly number[]): number | undefined {
  const sorted = values.toSorted((a, b) => a - b);
  const low = sorted[Math.floor((sorted.length - 1) / 2)];
  const high = sorted[Math.ceil((sorted.length - 1) / 2)];
  return low === undefined || high === undefined ? undefined : (low + high) / 2;
}

/**
 * @param results of all runs, in the order of their seeds; at least one
 * @param lapM length of a lap, m
 */
export function summarise(
  results: readonly RunResult[],
  engine: EngineName,
  boundLapS: number,
  lapM: number,
): RehearsalReport {
  const finished = results.filter((result) => result.loss === undefined);
  const lapS = median(finished.flatMap(countedLapsS)) ?? null;
  const totalS = results.reduce((sum, result) => sum + result.timeS, 0);
  const squares = results.reduce((sum, result) => sum + result.timeS * result.rmsLateralM ** 2, 0);
  return {
    runs: results.length,
    finished: finished.length,
    lost: results.length - finished.length,
    lapS,
    boundLapS,
    ratio: lapS === null ? null : lapS / boundLapS,
    rmsLateralMm: mToMm(Math.sqrt(squares / Math.max(totalS, Number.MIN_VALUE))),
    maxLateralMm: mToMm(Math.max(...results.map((result) => result.maxLateralM))),
    finishRate: finishRateOf(finished.length, results.length),
    seed: results[0]?.seed ?? 0,
    engine,
    list: results.map((result) => toRecord(result, lapM)),
  };
}

function finishRateOf(finished: number, runs: number): RehearsalReport['finishRate'] {
  if (runs < 2) return null;
  const { low, high } = clopperPearson(finished, runs);
  return {
    lowPercent: fractionToPercent(low),
    highPercent: fractionToPercent(high),
    confidencePercent: fractionToPercent(CONFIDENCE_SHARE),
  };
}

function toRecord(result: RunResult, lapM: number): RunRecord {
  const { loss } = result;
  const lap = loss === undefined ? 0 : Math.floor(loss.sM / lapM);
  return {
    seed: result.seed,
    finished: loss === undefined,
    lapS: median(countedLapsS(result)) ?? null,
    lapsS: result.lapsS,
    timeS: result.timeS,
    rmsLateralMm: mToMm(result.rmsLateralM),
    maxLateralMm: mToMm(result.maxLateralM),
    ...(result.ending && { ending: result.ending }),
    ...(loss === undefined
      ? {}
      : {
          reason: loss.reason,
          ...(loss.detail === undefined ? {} : { detail: loss.detail }),
          lostAtMm: mToMm(loss.sM - lap * lapM),
          lostInLap: lap + 1,
        }),
  };
}
