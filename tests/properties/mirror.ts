/** A rule table as seen in a mirror. */
import type { ControllerConstants, RuleConstants } from '../../src/controller/constants.js';
import { runIndex } from '../../src/controller/run-index.js';

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
