/**
 * Place of the run of sensors `first`..`last` in the rule arrays: the runs in lexical order.
 *
 * @param first 0-based, leftmost sensor of the run
 * @param last 0-based, at least `first`
 */
export function runIndex(first: number, last: number, sensorCount: number): number {
  return first * sensorCount - ((first * (first - 1)) >> 1) + (last - first);
}
