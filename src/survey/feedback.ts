/**
 * What the answers so far amount to, told at once: what the bar sees, the tightest bend, the speeds.
 *
 * Bar and bends: src/sheet/rules/view.ts and bend.ts. Speed at grip's limit on a bend of radius r:
 * v = sqrt(mu g r) (friction on a circle, e.g. any mechanics text).
 */
import type { ResolvedSheet } from '../sheet/defaults.js';
import { tightestCutRadius, tightestRadius } from '../sheet/rules/bend.js';
import { ruleContext } from '../sheet/rules/rule.js';
import { barView } from '../sheet/rules/view.js';
import { topSpeedMps } from '../sheet/top-speed.js';
import { typicalReadings } from '../sheet/typical-readings.js';
import { mmToM } from '../sheet/units.js';
import { BOARDS } from '../vehicle/boards.js';
import { STANDARD_GRAVITY_MPS2 } from '../vehicle/gravity.js';

/** What a row of sensors sees. Lengths in mm. */
export interface BarNumbers {
  /** Greatest offset of the line's middle, to either side, that is still seen. */
  halfWidthMm: number;
  /** Fewest and most sensors that see the line at once while its middle is between the outermost two. */
  fewest: number;
  most: number;
  /** Widest stretch between two sensors in which neither sees the line's middle; 0 if there is none. */
  blindGapMm: number;
  /** Radius of the tightest bend in which the line stays under the bar while the axle follows it. */
  tightestBendMm: number;
  /** Radius of the tightest bend that can be followed at all, cutting it. */
  tightestCutMm: number;
}

/** Undefined where the positions contradict each other or the spots are too wide for the line. */
export function barNumbers(sheet: ResolvedSheet): BarNumbers | undefined {
  const context = ruleContext(sheet, sheet);
  const { positionsMm } = context;
  const view = barView(context);
  if (view === undefined || positionsMm === undefined) return undefined;
  const { halfWidthMm, reachMm } = view;
  const gaps = positionsMm.slice(1).map((position, index) => (positionsMm[index] ?? position) - position);
  const seen = seenAtOnce(positionsMm, reachMm);
  return {
    halfWidthMm,
    fewest: Math.min(...seen),
    most: Math.max(...seen),
    blindGapMm: Math.max(0, Math.max(...gaps) - 2 * reachMm),
    tightestBendMm: tightestRadius(sheet.sensors.aheadOfAxleMm, halfWidthMm),
    tightestCutMm: tightestCutRadius(sheet.sensors.aheadOfAxleMm, halfWidthMm),
  };
}

/** Numbers of sensors that see the line, for every place of its middle from the first sensor to the last. */
function seenAtOnce(positionsMm: readonly number[], reachMm: number): number[] {
  const left = positionsMm[0] ?? 0;
  const right = positionsMm.at(-1) ?? 0;
  // The number changes only where a sensor begins or ceases to see the line, so one place between each two will do.
  const edges = positionsMm.flatMap((position) => [position - reachMm, position + reachMm]);
  const stops = [right, left, ...edges.filter((edge) => edge > right && edge < left)].sort((a, b) => a - b);
  return stops.slice(1).map((stop, index) => {
    const middle = (stop + (stops[index] ?? stop)) / 2;
    return positionsMm.filter((position) => Math.abs(position - middle) <= reachMm).length;
  });
}

/** Speed at which grip gives way in a bend, m/s. */
export function gripSpeedMps(gripCoefficient: number, radiusMm: number): number {
  return Math.sqrt(gripCoefficient * STANDARD_GRAVITY_MPS2 * mmToM(radiusMm));
}

const mm = (value: number): string => `${Math.floor(value)} mm`;
const mps = (value: number): string => `${value.toFixed(2)} m/s`;

function barLines(sheet: ResolvedSheet): string[] {
  const numbers = barNumbers(sheet);
  if (numbers === undefined) return [];
  const { fewest, most, blindGapMm, halfWidthMm } = numbers;
  const atOnce = fewest === most ? String(most) : `${fewest} to ${most}`;
  const gap = blindGapMm > 0 ? `a blind gap of ${blindGapMm.toFixed(1)} mm between sensors` : 'no blind gap';
  return [
    `The bar sees the line up to ${mm(halfWidthMm)} to each side: ${atOnce} of ${sheet.sensors.count} sensors at once, ${gap}.`,
    bendLine(numbers, sheet.line.tightestRadiusMm),
  ];
}

function bendLine({ tightestBendMm, tightestCutMm }: BarNumbers, radiusMm: number): string {
  const yours = `Yours, ${radiusMm} mm,`;
  const verdict =
    radiusMm >= tightestBendMm
      ? `${yours} is in view.`
      : radiusMm >= tightestCutMm
        ? `${yours} is followed by cutting it.`
        : `${yours} is too tight.`;
  return `Tightest bend it can see: ${Math.ceil(tightestBendMm)} mm. ${verdict}`;
}

function contrastLines(sheet: ResolvedSheet): string[] {
  const { ground = [], line = [] } = sheet.sensors.calibration;
  const { adcMaxCount } = BOARDS[sheet.target.board];
  const least = Math.min(...ground.map((reading, index) => Math.abs((line[index] ?? reading) - reading)));
  const percent = Math.round((100 * least) / adcMaxCount);
  const typical = typicalReadings(BOARDS[sheet.target.board], sheet.line.polarity);
  const guessed =
    ground.every((reading) => reading === typical.ground) &&
    line.every((reading) => reading === typical.line);
  return [
    `Line and ground differ by ${least} of ${adcMaxCount} counts (${percent} %).`,
    ...(guessed
      ? ['These are readings of a typical sensor: take your own before the first run, or choose the sweep.']
      : []),
  ];
}

function speedLines(sheet: ResolvedSheet): string[] {
  const { gripCoefficient } = sheet.drive;
  const { tightestRadiusMm } = sheet.line;
  const top = topSpeedMps(sheet);
  const grip = gripSpeedMps(gripCoefficient, tightestRadiusMm);
  return [
    `Top speed ${mps(top)} at ${sheet.power.nominalV} V.`,
    grip < top
      ? `In the ${tightestRadiusMm} mm bend grip allows ${mps(grip)} at most.`
      : `Grip would allow ${mps(grip)} in the ${tightestRadiusMm} mm bend: the motors are the limit.`,
  ];
}

function batteryLines(sheet: ResolvedSheet): string[] {
  const { fullV, emptyV, nominalV } = sheet.power;
  const at = (voltage: number): string => mps((topSpeedMps(sheet) * voltage) / nominalV);
  return [`Top speed ${at(fullV)} full, ${at(nominalV)} nominal, ${at(emptyV)} empty.`];
}

function pinLines(sheet: ResolvedSheet): string[] {
  const { uses } = ruleContext(sheet, sheet);
  const pins = new Set(uses.map(({ pin }) => pin));
  return pins.size === uses.length && !pins.has(undefined)
    ? [`${uses.length} pins, none of them used twice.`]
    : [];
}

/** What is told after a question, by its id, or after a group of questions. */
const LINES: Readonly<Record<string, (sheet: ResolvedSheet) => string[]>> = {
  '/sensors/spotRadiusMm': barLines,
  '/sensors/calibration/line': contrastLines,
  '/drive/motor/stallCurrentA': speedLines,
  'end of drive': pinLines,
  '/power/emptyV': batteryLines,
};

/** One or two short sentences to be told after a question (its id) or a group ("end of drive"), or none. */
export function feedbackAfter(id: string, sheet: ResolvedSheet): string[] {
  return LINES[id]?.(sheet) ?? [];
}
