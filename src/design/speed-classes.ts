/**
 * Speed classes: for each range of bend radii, the least of four limits.
 *
 *   motor    v (1 + b / 2R) <= wheel speed at full duty: the outer wheel must get there
 *   grip     v = sqrt(mu g R)
 *   view     entering the bend, the line stays under the bar (entry.ts)
 *   control  a steering law exists that keeps the margins over the whole tolerance box
 *
 * Computed classes step down in radius by a constant factor from the straight to the tightest bend; one more
 * below it is the reserve that slows the vehicle when a bend asks for more curvature than it should.
 */
import { STANDARD_GRAVITY_MPS2 } from '../vehicle/gravity.js';
import type { Vehicle } from '../vehicle/vehicle.js';
import type { SpeedLimits } from './design.js';
import { entryHolds } from './entry.js';
import { designLaw, givenGains, lawExists } from './steering-gains.js';
import { keeps, worstMargins } from './tolerance-box.js';

/** A class before its speed is known. */
export interface ClassRange {
  name: string;
  minRadiusM: number;
  /** Speed set in the sheet, m/s. */
  speedMps?: number;
  /** Radius for which the law is designed, m; the tightest bend's for the reserve. */
  lawRadiusM: number;
}

/** Radii of the computed classes over the tightest bend, fastest first. */
const COMPUTED_CLASSES: readonly { name: string; radiusFactor: number }[] = [
  { name: 'straight', radiusFactor: 30 },
  { name: 'sweeping', radiusFactor: 8 },
  { name: 'wide', radiusFactor: 4 },
  { name: 'open', radiusFactor: 2.4 },
  { name: 'medium', radiusFactor: 1.5 },
  { name: 'tight', radiusFactor: 1 },
  { name: 'reserve', radiusFactor: 0.75 },
];

const BISECTIONS = 7;

/** The classes of a vehicle, largest radius first. */
export function classRanges(vehicle: Vehicle): ClassRange[] {
  const { classes } = vehicle.speeds;
  if (classes !== 'auto') {
    const given = classes.map((each) => ({ ...each, lawRadiusM: each.minRadiusM }));
    return given.sort((a, b) => b.minRadiusM - a.minRadiusM);
  }
  const tightest = vehicle.line.tightestRadiusM;
  return COMPUTED_CLASSES.map(({ name, radiusFactor }) => ({
    name,
    minRadiusM: radiusFactor * tightest,
    lawRadiusM: Math.max(1, radiusFactor) * tightest,
  }));
}

/** Largest speed, m/s, up to `high` for which `holds`; 0 if none is. */
function largestSpeed(high: number, holds: (speedMps: number) => boolean): number {
  if (holds(high)) return high;
  let low = 0;
  let top = high;
  for (let i = 0; i < BISECTIONS; i++) {
    const middle = (low + top) / 2;
    if (holds(middle)) low = middle;
    else top = middle;
  }
  return low;
}

/** Share of the wheel speed kept back, so that the outer wheel can still correct. */
const STEERING_RESERVE = 0.02;

/**
 * Motor limit, m/s. Speeds are commands at nominal voltage: an emptier battery slows both wheels alike, so
 * that the outer wheel keeps its proportion to the inner one.
 */
function motorLimit(vehicle: Vehicle, radiusM: number): number {
  const { topSpeedMps, trackM } = vehicle.drive;
  return ((1 - STEERING_RESERVE) * topSpeedMps) / (1 + trackM / (2 * radiusM));
}

/** Grip limit, m/s; what its tolerance asks for is left to the perturbed rehearsals. */
function gripLimit(vehicle: Vehicle, radiusM: number): number {
  return Math.sqrt(vehicle.drive.grip * STANDARD_GRAVITY_MPS2 * radiusM);
}

/** The four limits of one class, m/s. The view limit holds for the law that the other three allow. */
export function speedLimits(vehicle: Vehicle, range: ClassRange): SpeedLimits {
  const top = vehicle.drive.topSpeedMps;
  const motor = motorLimit(vehicle, range.minRadiusM);
  const grip = gripLimit(vehicle, range.minRadiusM);
  const radiusM = range.lawRadiusM;
  const given = givenGains(vehicle);
  const control = largestSpeed(top, (v) =>
    given ? keeps(worstMargins(vehicle, v, given)) : lawExists(vehicle, v, radiusM),
  );
  const gains = given ?? designLaw(vehicle, Math.min(motor, grip, control), radiusM)?.gains;
  const view = gains ? largestSpeed(top, (v) => entryHolds(vehicle, gains, v, radiusM)) : 0;
  return { motor, grip, view, control };
}

/** Name of the least limit. */
export function bindingLimit(limits: SpeedLimits): keyof SpeedLimits {
  const names: (keyof SpeedLimits)[] = ['motor', 'grip', 'view', 'control'];
  return names.reduce((least, name) => (limits[name] < limits[least] ? name : least));
}
