/**
 * Interval analysis of the controller's arithmetic: the largest magnitude of each intermediate, from the
 * constants alone. Nothing may leave a signed 32-bit integer, and what the firmware keeps in 16 bits, or multiplies, not those; the
 * firmware repeats these bounds as static assertions. Magnitudes add and multiply; a shift to the right divides; a clamp caps.
 *
 * MicroPython keeps integers of 31 bits in the machine word and puts larger ones on the heap (py/smallint.h). What a control
 * step takes from the heap has to be collected one day, in the middle of a bend: there the limit is one bit less.
 */
import {
  CLASS_SPEED_BITS,
  COEFFICIENT_BITS,
  CURVATURE_BITS,
  type ControllerConstants,
  FILTER_BITS,
  FRACTION_BITS,
  FULL_SPEED,
  INTEGRAL_BITS,
  INTEGRAL_SPEED_BITS,
  LARGEST_CURVATURE,
  RULE_CURVATURE_BITS,
  SLOPE_BITS,
  SPEED_BITS,
  SPEED_MODEL_BITS,
  TRACK_BITS,
} from '../controller/constants.js';
import type { Vehicle } from '../vehicle/vehicle.js';
import { type Bound, largest } from './bound.js';
import { INT16_MAX } from './scales.js';
import { sensingBounds } from './sensing-bounds.js';
import { wheelLoopBounds } from './wheel-loop-bounds.js';

export const INT32_MAX = 2 ** 31 - 1;
const SMALL_INT_MAX = 2 ** 30 - 1;

function steeringBounds({ steering, classes, rules, integral }: ControllerConstants): Bound[] {
  const proportional = largest(classes.map((each) => each.proportional));
  const derivative = largest(classes.map((each) => each.derivative));
  const demanded = largest(classes.map((each) => each.curvature));
  const curvature = Math.max(steering.curvatureLimit, steering.searchCurvature, demanded);
  const asked =
    Math.ceil((INT16_MAX * (proportional + derivative)) / 2 ** steering.gainBits) + (integral?.limit ?? 0);
  const difference = rules ? largest(rules.right.map((right, i) => right - (rules.left[i] as number))) : 0;
  const tabled = difference * (rules?.curvatureFactor ?? 0);
  return [
    { name: 'proportional and derivative sum', magnitude: INT16_MAX * (proportional + derivative) },
    { name: 'filter product', magnitude: INT16_MAX * INT16_MAX },
    { name: 'filtered input', magnitude: (INT16_MAX << FILTER_BITS) * 2 },
    { name: 'curvature', magnitude: curvature, limit: INT16_MAX },
    { name: 'change of curvature', magnitude: 2 * curvature, limit: INT16_MAX },
    { name: 'filtered curvature', magnitude: curvature * 2 ** COEFFICIENT_BITS + 2 ** COEFFICIENT_BITS },
    { name: 'curvature asked for', magnitude: asked },
    { name: 'curvature cut off', magnitude: asked + steering.curvatureLimit },
    { name: 'difference of a rule', magnitude: difference, limit: INT16_MAX },
    { name: 'curvature of the rule table', magnitude: tabled },
    { name: 'curvature factor of the rule table', magnitude: rules?.curvatureFactor ?? 0, limit: INT16_MAX },
    { name: 'curvature of a rule', magnitude: tabled / 2 ** RULE_CURVATURE_BITS, limit: INT16_MAX },
  ];
}

function integralBounds({ integral, classes }: ControllerConstants): Bound[] {
  if (integral === undefined) return [];
  const gain = largest(classes.map((each) => each.integral ?? 0));
  const perSample = (FULL_SPEED * gain) / 2 ** INTEGRAL_SPEED_BITS;
  const product = INT16_MAX * perSample;
  const part = integral.limit * 2 ** INTEGRAL_BITS;
  const added = product / 2 ** integral.gainBits;
  return [
    { name: 'integral gain', magnitude: gain, limit: INT16_MAX },
    { name: 'speed times integral gain', magnitude: FULL_SPEED * gain },
    { name: 'offset times integral gain', magnitude: product },
    { name: 'integral part with an offset', magnitude: part + added },
    {
      name: 'integral part before its limit',
      magnitude: part + added + LARGEST_CURVATURE * integral.tracking,
    },
  ];
}

/** How much less curvature than a class's own there can be while it is in force. */
function bendBelow(classes: ControllerConstants['classes'], i: number): number {
  const wider = i === 0 ? 0 : classes[i - 1]!.curvature;
  return classes[i]!.curvature - wider;
}

function driveBounds({ steering, drive, classes, rules }: ControllerConstants): Bound[] {
  const curvature = Math.max(steering.curvatureLimit, steering.searchCurvature);
  const target = Math.max(drive.searchSpeed, largest(classes.map((each) => each.speed)));
  const slope = largest(classes.map((each) => each.speedSlope));
  const demanded = largest(classes.map((each) => each.curvature));
  const ahead = FULL_SPEED + Math.max(drive.leadUp, drive.leadDown);
  const sums = rules ? largest(rules.left.map((left, i) => left + (rules.right[i] as number))) : 0;
  const base = rules
    ? Math.max(ahead, Math.min(2 * FULL_SPEED, (ahead * sums) >> (FRACTION_BITS + 1)))
    : ahead;
  // a shift to the right rounds down, so that what is negative may grow by one
  const perSpeed = Math.ceil((curvature * drive.halfTrack) / 2 ** CURVATURE_BITS);
  const half = Math.ceil((FULL_SPEED * perSpeed) / 2 ** TRACK_BITS);
  const gained = largest(
    classes.map(
      (each, i) => each.speed + Math.floor((bendBelow(classes, i) * each.speedSlope) / 2 ** drive.slopeBits),
    ),
  );
  const duty = Math.max(drive.slopeLeft, drive.slopeRight);
  return [
    { name: 'speed of a class', magnitude: target, limit: INT16_MAX },
    { name: 'speed slope', magnitude: slope, limit: INT16_MAX },
    { name: 'speed slope product', magnitude: demanded * slope },
    { name: 'speed of a class with what its slope gains', magnitude: gained, limit: INT16_MAX },
    {
      name: 'lead before its limits',
      magnitude: Math.max(target, gained, 2 ** CLASS_SPEED_BITS - 1),
      limit: INT16_MAX,
    },
    { name: 'lead', magnitude: Math.max(drive.leadUp, drive.leadDown), limit: INT16_MAX },
    { name: 'sum of a rule', magnitude: sums, limit: INT16_MAX },
    { name: 'speed times rule', magnitude: ahead * sums },
    { name: 'curvature times half track', magnitude: curvature * drive.halfTrack },
    { name: 'turn for each speed', magnitude: perSpeed, limit: INT16_MAX },
    { name: 'speed times turn', magnitude: FULL_SPEED * perSpeed },
    { name: 'inner wheel behind the outer one', magnitude: Math.max(FULL_SPEED, 2 * half), limit: INT16_MAX },
    { name: 'half track', magnitude: drive.halfTrack, limit: INT16_MAX },
    { name: 'wheel speed before its limits', magnitude: base + half, limit: INT16_MAX },
    { name: 'change of speed', magnitude: 4 * FULL_SPEED, limit: INT16_MAX },
    { name: 'change of speed times motor step', magnitude: 4 * FULL_SPEED * drive.motorStep },
    // the last step before full speed ends short of it: what is missing is multiplied by less than one
    { name: 'modelled speed', magnitude: 2 ** SPEED_MODEL_BITS - 1 },
    { name: 'duty slope', magnitude: duty, limit: INT16_MAX },
    { name: 'duty product', magnitude: FULL_SPEED * duty },
    {
      name: 'duty before its limit',
      magnitude: Math.max(drive.startDutyLeft, drive.startDutyRight) + (FULL_SPEED * duty) / 2 ** SLOPE_BITS,
      limit: INT16_MAX,
    },
  ];
}

/**
 * Bounds of all intermediates that could be large.
 *
 * @param adcMaxCount largest reading, counts
 */
export function intermediateBounds(constants: ControllerConstants, adcMaxCount: number): Bound[] {
  const { memory } = constants;
  const speed = 1 << SPEED_BITS;
  const distances = [
    memory.gapDistance,
    memory.crossingDistance,
    memory.releaseDistance,
    memory.cornerDistance,
  ];
  return [
    ...sensingBounds(constants, adcMaxCount),
    ...steeringBounds(constants),
    ...integralBounds(constants),
    ...driveBounds(constants),
    ...wheelLoopBounds(constants),
    { name: 'distance', magnitude: largest(distances) + speed },
    { name: 'search distance', magnitude: memory.searchSamples * speed },
  ];
}

/** The bounds that the integers of the language cannot hold, each with its limit. */
export function overflows(
  constants: ControllerConstants,
  adcMaxCount: number,
  language: Vehicle['language'],
): Required<Bound>[] {
  const word = language === 'micropython' ? SMALL_INT_MAX : INT32_MAX;
  return intermediateBounds(constants, adcMaxCount)
    .map((bound) => ({ ...bound, limit: bound.limit ?? word }))
    .filter(({ magnitude, limit }) => magnitude > limit);
}
