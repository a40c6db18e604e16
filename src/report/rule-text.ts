/** The rule table as a strip of the bar for each state, for reading and annotating. */
import type { Design, RuleRow } from '../design/design.js';
import { tableGainPerM2 } from '../design/class-constants.js';
import { largestSwingM, predictCycles } from '../design/rule-cycle.js';
import { stateTable } from '../design/state-table.js';
import { mToMm } from '../sheet/units.js';
import { table } from './text-table.js';

/** States up to this number of sensors are printed one by one; beyond, only those that a line causes. */
export const FULL_PRINT_SENSORS = 6;

/** The bar as characters, leftmost sensor first: # on the line, . off it. */
function strip(state: number, sensorCount: number): string {
  return state.toString(2).padStart(sensorCount, '0').replaceAll('1', '#').replaceAll('0', '.');
}

function interval({ fromM, toM }: RuleRow): string {
  return fromM === undefined || toM === undefined
    ? ''
    : `${mToMm(fromM).toFixed(1)} to ${mToMm(toM).toFixed(1)}`;
}

/** Paragraphs about the rule table; none without rules. */
export function ruleLines(design: Design): string[] {
  const { vehicle, controller } = design;
  if (controller.rules === undefined) return [];
  const count = controller.sensing.sensorCount;
  const all = stateTable(vehicle, controller);
  const shown = count <= FULL_PRINT_SENSORS ? all : all.filter((row) => row.kind === 'line');
  const rows = shown.map((row) => [
    strip(row.state, count),
    row.kind,
    interval(row),
    row.left.toFixed(3),
    row.right.toFixed(3),
  ]);
  const rest = all.length - shown.length;
  return [
    `Rule table: ${all.length} states, wheel speeds as fractions of base speed${rest > 0 ? ` (${rest} states without a single line are in --json)` : ''}`,
    table([['bar', 'kind', 'offset, mm', 'left', 'right'], ...rows]),
    ...cycleLines(design),
  ];
}

/** What the steps of the table do to the loop, by the describing function. */
function cycleLines({ vehicle, classes }: Design): string[] {
  const tableGain = tableGainPerM2(vehicle, classes);
  const swingM = Math.max(...classes.map((each) => largestSwingM(vehicle, each, tableGain)));
  const allowed = `the sheet allows ${mToMm(vehicle.control.swingM)} mm`;
  const kept = !Number.isFinite(swingM)
    ? `In some corner of the tolerances a swing grows until the line is lost; ${allowed}.`
    : swingM > 0
      ? `Largest swing in any corner of the tolerances: ${mToMm(swingM).toFixed(1)} mm; ${allowed}.`
      : 'In no corner of the tolerances either.';
  const predictions = predictCycles(vehicle, classes);
  const steepest = Math.max(...predictions.map((each) => each.gainRatio));
  const nearest = Math.min(...predictions.map((each) => each.criticalRatio));
  const cycling = predictions.flatMap(({ name, cycles }) =>
    cycles.map(
      ({ amplitude, frequencyRadS }) =>
        `class ${name}: ${mToMm(amplitude).toFixed(1)} mm at the bar, ${(frequencyRadS / (2 * Math.PI)).toFixed(1)} Hz`,
    ),
  );
  const measure = `the table's steps act like up to ${steepest.toFixed(2)} times the gain, the loop bears ${nearest.toFixed(1)} times`;
  return cycling.length > 0
    ? [`Limit cycles predicted (describing function; ${measure}): ${cycling.join('; ')}. ${kept}`]
    : [`No limit cycle is predicted (describing function): ${measure}. ${kept}`];
}
