/** What rules by hand break: symmetry, order, or the room to a limit cycle. */
import type { Vehicle } from '../vehicle/vehicle.js';
import type { DesignedClass } from './design.js';
import { predictCycles } from './rule-cycle.js';
import { type RunAction, runActions } from './rule-runs.js';

/** The bar as digits, leftmost sensor first. */
function stateText({ first, last }: RunAction, count: number): string {
  return '0'.repeat(first) + '1'.repeat(last - first + 1) + '0'.repeat(count - 1 - last);
}

/** Sentences of warning; none where the sheet gives no rules by hand or they break nothing. */
export function overrideRemarks(
  vehicle: Vehicle,
  classes: readonly DesignedClass[],
  proportionalPerM2: number,
): string[] {
  if (vehicle.control.overrides === undefined) return [];
  const count = vehicle.bar.positionsM.length;
  const actions = runActions(vehicle, proportionalPerM2);
  return [...asymmetric(actions, count), ...outOfOrder(actions, count), ...cycling(vehicle, classes)];
}

function asymmetric(actions: readonly RunAction[], count: number): string[] {
  return actions.flatMap((action) => {
    const image = actions.find(
      (each) => each.first === count - 1 - action.last && each.last === count - 1 - action.first,
    );
    const broken = image !== undefined && (image.left !== action.right || image.right !== action.left);
    return broken && action.first < image.first
      ? [
          `States ${stateText(action, count)} and ${stateText(image, count)} are mirror images, their actions are not: the vehicle will favour one side.`,
        ]
      : [];
  });
}

function outOfOrder(actions: readonly RunAction[], count: number): string[] {
  const lines = actions
    .filter((each) => each.interval !== undefined)
    .toSorted((a, b) => a.offsetM - b.offsetM);
  return lines.flatMap((action, i) => {
    const before = lines[i - 1];
    const falls = before !== undefined && action.right - action.left < before.right - before.left;
    return falls
      ? [
          `In state ${stateText(action, count)} the vehicle turns less to the left than in ${stateText(before, count)}, though the line is further left: it may settle beside the line.`,
        ]
      : [];
  });
}

function cycling(vehicle: Vehicle, classes: readonly DesignedClass[]): string[] {
  return predictCycles(vehicle, classes)
    .filter(({ gainRatio, criticalRatio }) => gainRatio >= criticalRatio)
    .map(
      ({ name, gainRatio, criticalRatio }) =>
        `In class ${name} the steps of the table act like ${gainRatio.toFixed(1)} times the gain, the loop bears ${criticalRatio.toFixed(1)}: the vehicle will weave.`,
    );
}
