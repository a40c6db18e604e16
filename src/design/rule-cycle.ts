/**
 * What the rule table's steps do to the loop: does it hold a limit cycle, and how large?
 *
 * The loop of a class crosses -180 deg at w180 with a gain margin GM at its nominal proportional gain kp. The
 * table's staircase has a gain of up to some 1.3 kp for small amplitudes. While that stays below GM kp no
 * cycle is predicted, and the vehicle wanders within one step of the table; else the amplitude follows from
 * the describing function.
 */
import { FRACTION_BITS } from '../controller/constants.js';
import type { Vehicle } from '../vehicle/vehicle.js';
import { viewM } from './bar-view.js';
import { tableGainPerM2 } from './class-constants.js';
import { type LimitCycle, type Step, cycleAmplitudes, largestGain } from './describing-function.js';
import type { DesignedClass } from './design.js';
import { runActions } from './rule-runs.js';
import { phaseCrossover } from './steering-loop.js';

/** Prediction for one class. */
export interface CyclePrediction {
  name: string;
  /** Largest gain of the staircase over the law's proportional gain. */
  gainRatio: number;
  /** Gain ratio at which the loop oscillates at the nominal vehicle. */
  criticalRatio: number;
  /** Stable cycles at the bar, m and rad/s; empty when none is predicted. */
  cycles: LimitCycle[];
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

/** Predictions for all classes of a design by rules. */
export function predictCycles(vehicle: Vehicle, classes: readonly DesignedClass[]): CyclePrediction[] {
  const largest = viewM(vehicle);
  const tableGain = tableGainPerM2(vehicle, classes);
  const table = staircase(vehicle, tableGain);
  return classes.map(({ name, gains, plant, controller, margins }) => {
    const kp = gains.proportionalPerM2;
    // each class takes its share of the table's curvature
    const steps = table.map(({ at, height }) => ({ at, height: (height * kp) / tableGain }));
    const crossover = phaseCrossover(plant, controller);
    const gainRatio = largestGain(steps, largest) / kp;
    const criticalRatio = margins.gainMargin;
    const cycles =
      crossover === undefined || gainRatio < criticalRatio
        ? []
        : cycleAmplitudes(steps, criticalRatio * kp, largest).map((amplitude) => ({
            amplitude,
            frequencyRadS: crossover,
          }));
    return { name, gainRatio, criticalRatio, cycles };
  });
}
