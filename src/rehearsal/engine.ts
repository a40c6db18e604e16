/**
 * What every engine has in common: it runs one vehicle once round one lane, and says how that went.
 *
 * The twin runs the controller itself, chip and micropython the rendered firmware; the plant and the observer are the same.
 */
import type { Lane } from '../course/lane.js';
import type { Ending } from './ending.js';
import type { Fault } from './fault.js';
import type { PlantParameters } from './plant-parameters.js';

export type EngineName = 'twin' | 'chip' | 'micropython';

export interface RunSetup {
  plant: PlantParameters;
  lane: Lane;
  /** Laps to drive; 1 on an open lane. */
  laps: number;
  /** Simulated time after which a run counts as lost, s. */
  timeLimitS: number;
  /** Whether to keep a trace. */
  sampleTrace: boolean;
  /** Faults to inject; with them a run goes on through a loss until the firmware has stopped the vehicle. */
  faults?: readonly Fault[];
}

/** How a run can be lost. */
export type LossReason =
  /** The axle left the lane by more than the bar can see. */
  | 'off-lane'
  /** The firmware stopped by itself. */
  | 'stopped'
  /** The vehicle got no further. */
  | 'no-progress'
  /** The time limit passed. */
  | 'time-limit';

export interface Loss {
  reason: LossReason;
  /** Furthest place reached along the lane, m, laps counted on. */
  sM: number;
  timeS: number;
  xM: number;
  yM: number;
  /** What the firmware left behind where its program ended by itself: an exception's traceback, why the chip was reset. */
  detail?: string;
}

/** What was recorded of a run, one entry a sample; columns of equal length. */
export interface Trace {
  timeS: Float64Array;
  xM: Float64Array;
  yM: Float64Array;
  headingRad: Float64Array;
  /** Arc length along the lane, laps counted on. */
  sM: Float64Array;
  /** Axle beside the lane, positive left. */
  lateralM: Float64Array;
  speedMps: Float64Array;
  /** -1 to 1. */
  dutyLeft: Float64Array;
  dutyRight: Float64Array;
  /** Speed class in force; -1 where the engine cannot tell. */
  classIndex: Int16Array;
  /** Controller phase; -1 where the engine cannot tell. */
  phase: Int16Array;
}

export interface RunResult {
  seed: number;
  /** Absent when the run finished. */
  loss?: Loss;
  /** Time of each full lap, s; the first one is from standing. */
  lapsS: number[];
  /** Simulated time up to the finish or the loss, s. */
  timeS: number;
  /** Root mean square over time of the axle's distance from the lane, m. */
  rmsLateralM: number;
  maxLateralM: number;
  /** With faults only. */
  ending?: Ending;
  trace?: Trace;
}

export interface Engine {
  readonly name: EngineName;
  run(setup: RunSetup): Promise<RunResult>;
}
