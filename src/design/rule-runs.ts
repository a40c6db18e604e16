/**
 * The rule table: what each run of sensors on the line implies and what the wheels then do.
 *
 * A sensor is on the line while its distance to the line's middle is at most switchingM (bar-view.ts). So the run of
 * sensors a..b, and no other, is on the line exactly while the middle x lies in
 *
 *   max(p_a - switchingM, p_(b+1) + switchingM)  <=  x  <=  min(p_b + switchingM, p_(a-1) - switchingM)
 *
 * with the positions p falling from left to right. Runs whose interval is empty no single line can cause;
 * they are answered from the edges that they show. The action for an offset x is the curvature
 * kappa(x) = kp x, as wheel speeds 1 - kappa b / 2 and 1 + kappa b / 2 in units of base speed. Mirror images
 * get mirrored actions because the formula is odd in x.
 */
import { FRACTION_BITS } from '../controller/constants.js';
import type { Vehicle } from '../vehicle/vehicle.js';
import { switchingDistanceM } from './bar-view.js';

/** An interval no longer than this is the rounding of two sensors that switch at the same place, m. */
const SLIVER_M = 1e-9;

/**
 * Offsets of the line's middle that put exactly the sensors first..last on the line; undefined if none do.
 *
 * @param switchingM distance to the line's middle up to which a sensor is on the line, m; found by a search, so that who asks for many
 * runs hands it in
 */
export function runInterval(
  vehicle: Vehicle,
  first: number,
  last: number,
  switchingM = switchingDistanceM(vehicle),
): [number, number] | undefined {
  const { positionsM } = vehicle.bar;
  const at = (i: number) => positionsM[i];
  const next = at(last + 1);
  const previous = at(first - 1);
  const from = Math.max(
    (at(first) as number) - switchingM,
    next === undefined ? -Infinity : next + switchingM,
  );
  const to = Math.min(
    (at(last) as number) + switchingM,
    previous === undefined ? Infinity : previous - switchingM,
  );
  return to - from > SLIVER_M ? [from, to] : undefined;
}

/** Action of one run: the offset it stands for and the wheels' fractions of base speed. */
export interface RunAction {
  first: number;
  last: number;
  /** Offsets that cause the run, m; undefined when no single line does. */
  interval: [number, number] | undefined;
  offsetM: number;
  left: number;
  right: number;
}

const LARGEST_FRACTION = 127;

/** Wheel fractions in 1/2^FRACTION_BITS for a curvature: the difference first, the mean below 1 if it must be. */
function fractionsFor(curvaturePerM: number, trackM: number): { left: number; right: number } {
  const unit = 1 << FRACTION_BITS;
  const half = Math.min(LARGEST_FRACTION, Math.round(Math.abs((curvaturePerM * trackM) / 2) * unit));
  const outer = Math.min(LARGEST_FRACTION, unit + half);
  const inner = outer - 2 * half;
  return curvaturePerM > 0 ? { left: inner, right: outer } : { left: outer, right: inner };
}

/** The action that the sheet gives for a run, in 1/2^FRACTION_BITS; undefined where it leaves it to the formula. */
function givenAction(
  vehicle: Vehicle,
  first: number,
  last: number,
): { left: number; right: number } | undefined {
  const given = vehicle.control.overrides?.find((each) => each.first === first && each.last === last);
  const unit = 1 << FRACTION_BITS;
  return given && { left: Math.round(given.left * unit), right: Math.round(given.right * unit) };
}

/**
 * Actions of all runs, in the order of the firmware's rule table (runIndex).
 *
 * @param proportionalPerM2 curvature per offset, 1/m^2
 */
export function runActions(vehicle: Vehicle, proportionalPerM2: number): RunAction[] {
  const count = vehicle.bar.positionsM.length;
  const switchingM = switchingDistanceM(vehicle);
  const actions: RunAction[] = [];
  for (let first = 0; first < count; first++) {
    for (let last = first; last < count; last++) {
      const interval = runInterval(vehicle, first, last, switchingM);
      const offsetM = interval ? (interval[0] + interval[1]) / 2 : shownOffsetM(vehicle, first, last);
      const computed = fractionsFor(proportionalPerM2 * offsetM, vehicle.drive.trackM);
      actions.push({ first, last, interval, offsetM, ...(givenAction(vehicle, first, last) ?? computed) });
    }
  }
  return actions;
}

/**
 * Offset that the edges of a run show, m: each edge half way between the last sensor on the line and the next
 * one beside it; with an edge outside the bar, the other one and the line width.
 */
function shownOffsetM(vehicle: Vehicle, first: number, last: number): number {
  const { positionsM } = vehicle.bar;
  const edge = (i: number) => ((positionsM[i - 1] as number) + (positionsM[i] as number)) / 2;
  const leftEdge = first > 0 ? edge(first) : undefined;
  const rightEdge = last < positionsM.length - 1 ? edge(last + 1) : undefined;
  const halfLine = vehicle.line.widthM / 2;
  if (leftEdge !== undefined && rightEdge !== undefined) return (leftEdge + rightEdge) / 2;
  if (leftEdge !== undefined) return leftEdge - halfLine;
  return rightEdge === undefined ? 0 : rightEdge + halfLine;
}
