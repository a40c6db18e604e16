/**
 * Entering a bend: does the line stay under the bar?
 *
 * The vehicle drives along a straight at constant speed and into an arc. Kinematics of the axle's middle
 * with turn rate lag, exact geometry of line and bar; the steering law and the wheel limits act as in the
 * firmware, in real numbers. The bar stands at (L, y) in the vehicle's frame; y is where it cuts the line.
 */
import type { Vehicle } from '../vehicle/vehicle.js';
import { viewM } from './bar-view.js';
import { delayBudget } from './delay.js';
import { type Corner, toleranceCorners } from './tolerance-box.js';
import type { SteeringGains } from './steering-loop.js';

/** Share of the view that entering a bend may use. */
const ENTRY_VIEW_SHARE = 0.95;
/** Turn of heading after which the bend counts as entered, rad. */
const ENTERED_RAD = 1.6;

/** Offset at the bar of a line that runs along x up to 0 and then turns left with radius R; NaN if out of reach. */
function offsetAtBar(x: number, y: number, heading: number, aheadM: number, radiusM: number): number {
  const cos = Math.cos(heading);
  const sin = Math.sin(heading);
  const bx = x + aheadM * cos;
  const by = y + aheadM * sin;
  // the bar's own line: (bx - t sin, by + t cos); first its cut with the straight
  const straight = cos > 1e-6 ? -by / cos : NaN;
  if (bx - straight * sin <= 0) return straight;
  // then with the circle around (0, R): t^2 + 2 t b + c = 0
  const b = -bx * sin + (by - radiusM) * cos;
  const c = bx * bx + (by - radiusM) * (by - radiusM) - radiusM * radiusM;
  const root = b * b - c;
  return root < 0 ? NaN : -b - Math.sqrt(root);
}

/**
 * Largest offset at the bar, m, while entering a bend; Infinity when the line is lost.
 *
 * @param onSample told each sample: distance driven since the bar reached the bend, m, and the offset at the bar, m,
 * positive to the inner side, NaN when the bar no longer meets the line; and the turn rate that the law asks for, as a share of
 * what the wheels can do
 */
export function entryPeakM(
  vehicle: Vehicle,
  gains: SteeringGains,
  speedMps: number,
  radiusM: number,
  corner: Corner,
  onSample?: (distanceM: number, offsetM: number, wheelShare: number) => void,
): number {
  const { drive, bar, board } = vehicle;
  const period = board.samplePeriodS;
  const speed = speedMps * corner.gain;
  const lag = drive.lagS * corner.lag;
  const decay = Math.exp(-period / lag);
  const delaySamples = Math.ceil(delayBudget(vehicle).totalS / period);
  const pending = new Array<number>(delaySamples).fill(0);
  // steering has priority: the outer wheel at its limit, the inner one reversed if need be
  const turnLimit = (2 * drive.topSpeedMps * corner.gain) / drive.trackM;
  const ratio = (gains.derivativeTimeS * gains.filterCoefficient) / period;
  const limit = viewM(vehicle);
  let x = -bar.aheadM - speed * period;
  let y = 0;
  let heading = 0;
  let turn = 0;
  let filtered = 0;
  let peak = 0;
  const steps = Math.ceil((bar.aheadM + ENTERED_RAD * radiusM) / (speed * period));
  for (let i = 0; i < steps; i++) {
    const offset = offsetAtBar(x, y, heading, bar.aheadM, radiusM);
    const change = offset - filtered;
    const wanted = speed * gains.proportionalPerM2 * (offset + ratio * change);
    onSample?.((i - 1) * speed * period, offset, wanted / turnLimit);
    const size = Math.abs(offset);
    if (!(size <= limit)) return Infinity;
    peak = Math.max(peak, size);
    filtered += gains.filterCoefficient * change;
    pending.push(wanted);
    const command = Math.max(-turnLimit, Math.min(turnLimit, pending.shift() as number));
    const next = command + (turn - command) * decay;
    const mean = (turn + next) / 2;
    turn = next;
    const middle = heading + (mean * period) / 2;
    x += speed * period * Math.cos(middle);
    y += speed * period * Math.sin(middle);
    heading += mean * period;
  }
  return peak;
}

/** The offset at the bar while entering a bend, sample by sample. */
export interface EntryTrace {
  corner: Corner;
  /** Distance driven since the bar reached the bend, m; as long as offsetM. */
  distanceM: number[];
  /** Offset of the line at the bar, m, positive to the inner side; ends where the line is lost. */
  offsetM: number[];
  /** Largest size of the offset, m; Infinity when the line is lost. */
  peakM: number;
}

/** Entering a bend in every corner of the tolerance box, the nominal vehicle first. */
export function entryTraces(
  vehicle: Vehicle,
  gains: SteeringGains,
  speedMps: number,
  radiusM: number,
): EntryTrace[] {
  return toleranceCorners(vehicle).map((corner) => {
    const trace: EntryTrace = { corner, distanceM: [], offsetM: [], peakM: 0 };
    trace.peakM = entryPeakM(vehicle, gains, speedMps, radiusM, corner, (distanceM, offsetM) => {
      if (Number.isNaN(offsetM)) return;
      trace.distanceM.push(distanceM);
      trace.offsetM.push(offsetM);
    });
    return trace;
  });
}

/** Whether the line stays under the bar while entering a bend, in every corner of the tolerance box. */
export function entryHolds(
  vehicle: Vehicle,
  gains: SteeringGains,
  speedMps: number,
  radiusM: number,
): boolean {
  const limit = ENTRY_VIEW_SHARE * viewM(vehicle);
  return toleranceCorners(vehicle).every(
    (corner) => entryPeakM(vehicle, gains, speedMps, radiusM, corner) <= limit,
  );
}
