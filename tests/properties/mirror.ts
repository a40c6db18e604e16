/** A vehicle and its rule table as seen in a mirror. */
import type { ControllerConstants, RuleConstants } from '../../src/controller/constants.js';
import { runIndex } from '../../src/controller/run-index.js';
import type { Vehicle } from '../../src/vehicle/vehicle.js';

/** The vehicle as seen in a mirror. */
export function mirroredVehicle(vehicle: Vehicle): Vehicle {
  const { bar, drive } = vehicle;
  const { ground, line } = bar.calibration;
  return {
    ...vehicle,
    bar: {
      ...bar,
      positionsM: bar.positionsM.map((p) => -p).toReversed(),
      pins: bar.pins.toReversed(),
      calibration: { ...bar.calibration, ground: ground.toReversed(), line: line.toReversed() },
    },
    drive: {
      ...drive,
      left: drive.right,
      right: drive.left,
      trimLeft: drive.trimRight,
      trimRight: drive.trimLeft,
    },
  };
}

/** Rule actions of the mirrored vehicle that belong to the runs of this one: wheels and ends of the run swapped. */
export function mirroredRules({ rules, sensing }: ControllerConstants): RuleConstants | undefined {
  if (rules === undefined) return undefined;
  const count = sensing.sensorCount;
  const [left, right]: [number[], number[]] = [[], []];
  for (let first = 0; first < count; first++)
    for (let last = first; last < count; last++) {
      const image = runIndex(count - 1 - last, count - 1 - first, count);
      left.push(rules.right[image]!);
      right.push(rules.left[image]!);
    }
  return { ...rules, left, right };
}
