/**
 * The whole rule table: all 2^n states of the bar, each with its kind and its one action.
 *
 * The firmware holds an action for each run of sensors only and reduces every state to a run; this table
 * spells the result out for each state. Kinds:
 *   none        no sensor on the line: a gap or a lost line, decided by where the line was last
 *   wide        as many sensors as a crossing puts on the line
 *   line        one run that a single line can cause
 *   split       several runs, each of which a single line could cause
 *   impossible  what neither a line nor two lines cause: a faulty sensor, answered by its widest run
 */
import { type ControllerConstants, FRACTION_BITS, type RuleConstants } from '../controller/constants.js';
import { runIndex } from '../controller/run-index.js';
import { Sensing } from '../controller/sensing.js';
import type { Vehicle } from '../vehicle/vehicle.js';
import type { RuleRow } from './design.js';
import { switchingDistanceM } from './bar-view.js';
import { runInterval } from './rule-runs.js';

/** Runs of ones of a state, as [first, last] sensor, leftmost sensor highest bit. */
export function runsOf(state: number, sensorCount: number): [number, number][] {
  const runs: [number, number][] = [];
  for (let i = 0; i < sensorCount; i++) {
    if (((state >> (sensorCount - 1 - i)) & 1) === 0) continue;
    const current = runs[runs.length - 1];
    if (current && current[1] === i - 1) current[1] = i;
    else runs.push([i, i]);
  }
  return runs;
}

/** Straight on: what a state without a measured line means to the wheels. */
const STRAIGHT = { left: 1, right: 1 };

/**
 * All states in rising order.
 *
 * @throws RangeError when the controller has no rules
 */
export function stateTable(vehicle: Vehicle, controller: ControllerConstants): RuleRow[] {
  const { rules, sensing } = controller;
  if (rules === undefined) throw new RangeError('This controller works without rules.');
  const count = sensing.sensorCount;
  const h = switchingDistanceM(vehicle);
  const bar = new Sensing({ ...sensing, digital: true, lineLevelHigh: true }, true);
  const levels = new Int32Array(count);
  return Array.from({ length: 2 ** count }, (_, state): RuleRow => {
    for (let i = 0; i < count; i++) levels[i] = (state >> (count - 1 - i)) & 1;
    bar.read(levels);
    if (bar.wide) return { state, kind: 'wide', ...STRAIGHT };
    if (!bar.found) return { state, kind: 'none', ...STRAIGHT };
    const runs = runsOf(state, count);
    const feasible = runs.map(([first, last]) => runInterval(vehicle, first, last, h));
    const action = actionOf(rules, runIndex(bar.first, bar.last, count));
    const [interval] = feasible;
    if (runs.length === 1 && interval) {
      return { state, kind: 'line', fromM: interval[0], toM: interval[1], ...action };
    }
    const kind = runs.length > 1 && feasible.every(Boolean) ? 'split' : 'impossible';
    return { state, kind, ...action };
  });
}

function actionOf(rules: RuleConstants, index: number): { left: number; right: number } {
  const unit = 1 << FRACTION_BITS;
  return { left: (rules.left[index] as number) / unit, right: (rules.right[index] as number) / unit };
}
