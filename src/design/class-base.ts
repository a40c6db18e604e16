/** Classes before their speeds are proven: limits and law of each, or the refusal that says which limit leaves none. */
import { EXIT, FairleadError, type Problem } from '../sheet/problem.js';
import { mToMm } from '../sheet/units.js';
import type { Vehicle } from '../vehicle/vehicle.js';
import { needsIntegral } from './bias.js';
import type { SpeedLimits } from './design.js';
import { type ClassRange, bindingLimit, classRanges, speedLimits } from './speed-classes.js';
import { designLaw, givenGains, lawExists } from './steering-gains.js';
import type { SteeringGains } from './steering-loop.js';

/** One class before its speed is proven. */
export interface ClassBase {
  range: ClassRange;
  limits: SpeedLimits;
  /** Speed that the limits or the sheet allow, m/s. */
  allowedMps: number;
  gains: SteeringGains;
}

const LIMIT_MEANS = {
  control: 'no steering law keeps the required margins over the whole tolerance box',
  view: 'the line leaves the bar while the vehicle turns into the bend',
} as const;

function mps(speedMps: number): string {
  return `${speedMps.toFixed(2)} m/s`;
}

/** The limit that leaves no law, or that the speed of the sheet exceeds. */
function refusal(range: ClassRange, limits: SpeedLimits): Problem {
  const limit = range.speedMps === undefined && limits.view < limits.control ? 'view' : 'control';
  const { speedMps } = range;
  const bend = `${Math.round(mToMm(range.lawRadiusM))} mm`;
  const at = speedMps === undefined || limits[limit] === 0 ? 'at any speed' : `at ${mps(speedMps)}`;
  return {
    pointer: speedMps === undefined ? '/line/tightestRadiusMm' : '/speeds/classes',
    message: `class ${range.name}, bends of ${bend} radius: ${at} ${LIMIT_MEANS[limit]}.`,
    got: speedMps === undefined ? `bends of ${bend} radius` : mps(speedMps),
    allowed: `${limit} limit ${mps(limits[limit])}`,
  };
}

/** The limits and the law of one class, or why there is none. */
function classBase(vehicle: Vehicle, range: ClassRange): ClassBase | Problem {
  const limits = speedLimits(vehicle, range);
  const given = givenGains(vehicle);
  if (given) {
    // gains by hand are judged, not refused: where they never keep the margins, motor and grip alone limit the speed
    const least = limits[bindingLimit(limits)];
    const allowedMps = range.speedMps ?? (least > 0 ? least : Math.min(limits.motor, limits.grip));
    return { range, limits, allowedMps, gains: given };
  }
  const allowedMps = range.speedMps ?? limits[bindingLimit(limits)];
  const law = allowedMps > 0 ? designLaw(vehicle, allowedMps, range.lawRadiusM) : undefined;
  return law === undefined ? refusal(range, limits) : { range, limits, allowedMps, gains: law.gains };
}

function isBase(found: ClassBase | Problem): found is ClassBase {
  return 'gains' in found;
}

/** The vehicle with an integral part in its laws. */
function withIntegral(vehicle: Vehicle): Vehicle {
  return { ...vehicle, control: { ...vehicle.control, integral: 'always' } };
}

/**
 * The limits and the laws of all classes, largest radius first; with an integral part where the sheet asks for it, or leaves it to
 * the design and unequal motors would hold the line too far beside the middle without one.
 *
 * @throws FairleadError with exit code 3 that names each class without a law and the limit that leaves none
 */
export function classBases(vehicle: Vehicle): ClassBase[] {
  const found = classRanges(vehicle).map((range) => classBase(vehicle, range));
  const { integral, kind, gains } = vehicle.control;
  if (integral === undefined && kind === 'pid' && gains === undefined) {
    const plain = found.filter(isBase);
    if (plain.length === found.length && needsIntegral({ vehicle, classes: plain })) {
      const integrating = withIntegral(vehicle);
      const better = classRanges(vehicle).map((range) => classBase(integrating, range));
      // what no integral part fits is driven without one, and told as a remark
      return neverSlowerWhenWider(better.every(isBase) ? better : plain);
    }
  }
  const problems = found.flatMap((each) => (isBase(each) ? [] : [each]));
  if (problems.length > 0)
    throw new FairleadError('No design meets the sheet.', { exitCode: EXIT.noDesign, problems });
  return neverSlowerWhenWider(found.filter(isBase));
}

/**
 * Computed classes, largest radius first, none slower than a tighter one: what holds a tight bend holds a wider one at that speed, so
 * where a class's own law allows less, it drives as the tighter one does. Its limits are then the better of both. Speeds of the sheet
 * stay.
 */
export function neverSlowerWhenWider(bases: readonly ClassBase[]): ClassBase[] {
  return bases.reduceRight<ClassBase[]>((tighter, base) => {
    const next = tighter[0];
    const given = base.range.speedMps !== undefined;
    if (given || next === undefined || next.allowedMps <= base.allowedMps) return [base, ...tighter];
    const better = (limit: keyof SpeedLimits) => Math.max(base.limits[limit], next.limits[limit]);
    const limits = {
      motor: better('motor'),
      grip: better('grip'),
      view: better('view'),
      control: better('control'),
    };
    return [{ range: base.range, limits, allowedMps: next.allowedMps, gains: next.gains }, ...tighter];
  }, []);
}

/** Whether every class has a law; quicker than the laws themselves. */
export function hasLaws(vehicle: Vehicle): boolean {
  if (givenGains(vehicle)) return true;
  // the tightest class fails first
  return classRanges(vehicle)
    .toReversed()
    .every((range) =>
      range.speedMps === undefined
        ? isBase(classBase(vehicle, range))
        : lawExists(vehicle, range.speedMps, range.lawRadiusM),
    );
}
