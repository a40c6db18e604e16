/**
 * What the rule table's steps do to the loop: does it hold a limit cycle, and how large?
 *
 * The loop of a class oscillates at w180, where its phase is -180 deg, when its gain is r times that of the law. The
 * table's staircase has a gain of up to some 1.3 kp for small amplitudes, more with few sensors. While that stays below r kp no
 * cycle is predicted, and the vehicle wanders within one step of the table; else the amplitude follows from
 * the describing function. Where even an amplitude as large as the view meets more than r kp, the swing grows until the line is lost.
 */
import { FRACTION_BITS } from '../controller/constants.js';
import type { Vehicle } from '../vehicle/vehicle.js';
import { viewM } from './bar-view.js';
import { tableGainPerM2 } from './class-constants.js';
import {
  type LimitCycle,
  type Step,
  cycleAmplitudes,
  describingGain,
  largestGain,
} from './describing-function.js';
import type { ClassSettings, DesignedClass } from './design.js';
import { runActions } from './rule-runs.js';
import { type Oscillation, controllerOf, oscillation } from './steering-loop.js';
import { lanePlantOf, toleranceCorners } from './tolerance-box.js';

/** Prediction for one class. */
export interface CyclePrediction {
  name: string;
  /** Largest gain of the staircase over the law's proportional gain. */
  gainRatio: number;
  /** Gain ratio at which the loop oscillates at the nominal vehicle; 0 where it does at any gain. */
  criticalRatio: number;
  /** Stable cycles at the bar, m and rad/s; empty when none is predicted. */
  cycles: LimitCycle[];
  /** Whether a swing grows until the line leaves the bar. */
  grows: boolean;
}

/** Staircase of the table: where the offset passes a step, m, and how much the curvature jumps there, 1/m. */
export function staircase(vehicle: Vehicle, proportionalPerM2: number): Step[] {
  const trackM = vehicle.drive.trackM;
  const lines = runActions(vehicle, proportionalPerM2)
    .flatMap(({ interval, left, right }) => {
      if (interval === undefined) return [];
      const curvature = (right - left) / (1 << FRACTION_BITS) / trackM;
      return [{ fromM: interval[0], curvature }];
    })
    .toSorted((a, b) => a.fromM - b.fromM);
  return lines.flatMap(({ fromM, curvature }, i) => {
    const before = lines[i - 1];
    return before === undefined || fromM < 0 ? [] : [{ at: fromM, height: curvature - before.curvature }];
  });
}

/** The table's staircase for a class of one proportional gain: each class takes its share of the table's curvature. */
function stepsOf(table: readonly Step[], tableGainPerM2: number, proportionalPerM2: number): Step[] {
  return table.map(({ at, height }) => ({ at, height: (height * proportionalPerM2) / tableGainPerM2 }));
}

/** The cycles of a staircase in the loop of one law. */
function cyclesIn(
  steps: readonly Step[],
  kp: number,
  loop: Oscillation,
  viewM: number,
): Pick<CyclePrediction, 'cycles' | 'grows'> {
  const critical = loop.gainRatio * kp;
  const { frequencyRadS } = loop;
  const cycles =
    frequencyRadS === undefined
      ? []
      : cycleAmplitudes(steps, critical, viewM).map((amplitude) => ({ amplitude, frequencyRadS }));
  return { cycles, grows: describingGain(steps, viewM) > critical };
}

/** Predictions at the nominal vehicle for all classes of a design by rules. */
export function predictCycles(vehicle: Vehicle, classes: readonly DesignedClass[]): CyclePrediction[] {
  const largest = viewM(vehicle);
  const tableGain = tableGainPerM2(vehicle, classes);
  const table = staircase(vehicle, tableGain);
  return classes.map(({ name, gains, plant, controller }) => {
    const kp = gains.proportionalPerM2;
    const steps = stepsOf(table, tableGain, kp);
    const loop = oscillation(plant, controller);
    const gainRatio = largestGain(steps, largest) / kp;
    return { name, gainRatio, criticalRatio: loop.gainRatio, ...cyclesIn(steps, kp, loop, largest) };
  });
}

/**
 * Largest swing that the table's steps may keep going in any corner of the tolerance box, m; 0 where none is predicted, Infinity
 * where it grows until the line leaves the bar.
 *
 * @param proportionalPerM2 gain that the table holds
 */
export function largestSwingM(
  vehicle: Vehicle,
  { gains, speedMps }: Pick<ClassSettings, 'gains' | 'speedMps'>,
  proportionalPerM2: number,
): number {
  const kp = gains.proportionalPerM2;
  const steps = stepsOf(staircase(vehicle, proportionalPerM2), proportionalPerM2, kp);
  const largest = viewM(vehicle);
  const swings = toleranceCorners(vehicle).flatMap((corner) => {
    const plant = lanePlantOf(vehicle, speedMps, corner);
    const loop = oscillation(plant, controllerOf(gains, plant.speedMps, plant.samplePeriodS));
    const { cycles, grows } = cyclesIn(steps, kp, loop, largest);
    return grows ? [Infinity] : cycles.map(({ amplitude }) => amplitude);
  });
  return Math.max(0, ...swings);
}
