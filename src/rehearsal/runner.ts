/**
 * Several runs of one vehicle on one lane, each a pure function of vehicle, lane and seed, so that any one can be repeated alone
 * and runs can be spread over workers (workers.ts) and machines (shards.ts).
 */
import { lapBound, type Bound } from '../course/bound.js';
import type { Lane } from '../course/lane.js';
import type { Vehicle } from '../vehicle/vehicle.js';
import type { Engine, RunResult, RunSetup } from './engine.js';
import type { Fault } from './fault.js';
import { summarise, type RehearsalReport } from './metrics.js';
import { perturbedPlant } from './plant-parameters.js';
import { lapEndM } from './run-monitor.js';

/** Laps where none are asked for: a flying one on a closed lane. */
export const DEFAULT_LAPS = 2;

/** Simulated time beyond the vehicle's own run limit after which a run is ended: start-up, countdown, calibration, s. */
const START_ALLOWANCE_S = 20;

export interface RehearsalSetup {
  vehicle: Vehicle;
  lane: Lane;
  engine: Engine;
  /** Number of runs, 1 or more. */
  runs: number;
  /** Seed of the first run; the next ones count up. Seed 0 is the nominal vehicle. */
  seed: number;
  laps?: number;
  /** Which runs keep their trace; by default the first. */
  traces?: 'none' | 'first' | 'all';
  /** Called after each run. */
  onRun?: (done: number, result: RunResult) => void;
}

export interface Rehearsal {
  report: RehearsalReport;
  results: RunResult[];
  bound: Bound;
}

/** The setup of the run with one seed. */
export function runSetup(
  vehicle: Vehicle,
  lane: Lane,
  seed: number,
  laps: number,
  sampleTrace: boolean,
  faults: readonly Fault[] = [],
): RunSetup {
  return {
    plant: perturbedPlant(vehicle, seed),
    lane,
    laps: lane.closed ? laps : 1,
    timeLimitS: vehicle.start.runLimitS + START_ALLOWANCE_S,
    sampleTrace,
    ...(faults.length > 0 && { faults }),
  };
}

/** The bound to which lap times are compared: flying where the vehicle drives a flying lap, else from standing. */
export function vehicleBound(vehicle: Vehicle, lane: Lane, laps: number): Bound {
  const { topSpeedMps, lagS, grip, trackM } = vehicle.drive;
  const standing = !lane.closed || laps < 2;
  return lapBound({
    lane,
    topSpeedMps,
    lagS,
    grip,
    trackM,
    standing,
    endM: lapEndM(lane, vehicle.bar.aheadM),
  });
}

/** Drives all runs, one after the other. */
export async function rehearse(setup: RehearsalSetup): Promise<Rehearsal> {
  const { vehicle, lane, engine, runs, seed, laps = DEFAULT_LAPS, traces = 'first' } = setup;
  const bound = vehicleBound(vehicle, lane, laps);
  const results: RunResult[] = [];
  for (let i = 0; i < runs; i++) {
    const sampleTrace = traces === 'all' || (traces === 'first' && i === 0);
    const result = await engine.run(runSetup(vehicle, lane, seed + i, laps, sampleTrace));
    results.push(result);
    setup.onRun?.(results.length, result);
  }
  const report = summarise(results, engine.name, bound.lapS, lapEndM(lane, vehicle.bar.aheadM));
  return { report, results, bound };
}
