/**
 * Interval analysis of the controller's arithmetic: the largest magnitude of each intermediate, from the
 * constants alone. Nothing may leave a signed 32-bit integer, and what the firmware keeps in 16 bits, or multiplies, not those; the
 * firmware repeats these bounds as static assertions. Magnitudes add and multiply; a shift to the right divides; a clamp caps.
 *
 * MicroPython keeps integers of 31 bits in the machine word and puts larger ones on the heap (py/smallint.h). What a control
 * step takes from the heap has to be collected one day, in the middle of a bend: there the limit is one bit less.
 */
import {
  CALIBRATION_BITS,
  COEFFICIENT_BITS,
  CURVATURE_BITS,
  type ControllerConstants,
  EDGE_BITS,
  FILTER_BITS,
  FRACTION_BITS,
  FULL_COVERAGE,
  FULL_SPEED,
  GAP_HALF_BITS,
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
import { wheelLoopBounds } from './wheel-loop-bounds.js';

export const INT32_MAX = 2 ** 31 - 1;
const SMALL_INT_MAX = 2 ** 30 - 1;
const INT16_MAX = 2 ** 15 - 1;

/** Largest magnitude of one intermediate. */
export interface Bound {
  name: string;
  magnitude: number;
  /** Largest magnitude allowed where it is less than the machine's integers, for what C++ stores in 16 bits. */
  limit?: number;
}

const largest = (values: readonly number[]) => Math.max(0, ...values.map(Math.abs));

/** Largest place of an edge beside the middle of its gap, offset units. */
function shiftBound({ sensing }: ControllerConstants): number {
  return (largest(sensing.gapHalf) * largest(sensing.edgeTable)) / 2 ** (EDGE_BITS + GAP_HALF_BITS);
}

/** Largest offset that sensing can report, offset units. */
function offsetBound(constants: ControllerConstants): number {
  const { sensing } = constants;
  return Math.ceil(largest(sensing.gapMiddle) + shiftBound(constants) + sensing.halfLine);
}

function sensingBounds(constants: ControllerConstants, adcMaxCount: number): Bound[] {
  const { sensing } = constants;
  const gain = sensing.digital ? 0 : largest(sensing.gain);
  const steps = sensing.edgeTable.slice(1).map((value, i) => value - (sensing.edgeTable[i] as number));
  return [
    { name: 'calibration gain', magnitude: gain, limit: INT16_MAX },
    { name: 'reading times calibration gain', magnitude: adcMaxCount * gain },
    {
      name: 'coverage before its limits',
      magnitude: (adcMaxCount * gain) >> CALIBRATION_BITS,
      limit: INT16_MAX,
    },
    { name: 'half gap', magnitude: largest(sensing.gapHalf), limit: INT16_MAX },
    { name: 'step of the edge table', magnitude: largest(steps), limit: INT16_MAX },
    { name: 'half gap times edge table', magnitude: largest(sensing.gapHalf) * largest(sensing.edgeTable) },
    { name: 'offset', magnitude: offsetBound(constants), limit: INT16_MAX },
    { name: 'sum of coverages', magnitude: sensing.sensorCount * FULL_COVERAGE, limit: INT16_MAX },
  ];
}

function steeringBounds({ steering, classes, rules }: ControllerConstants): Bound[] {
  const proportional = largest(classes.map((each) => each.proportional));
  const derivative = largest(classes.map((each) => each.derivative));
  const demanded = largest(classes.map((each) => each.curvature));
  const curvature = Math.max(steering.curvatureLimit, steering.searchCurvature, demanded);
  const difference = rules ? largest(rules.right.map((right, i) => right - (rules.left[i] as number))) : 0;
  const tabled = difference * (rules?.curvatureFactor ?? 0);
  return [
    { name: 'proportional and derivative sum', magnitude: INT16_MAX * proportional + INT16_MAX * derivative },
    { name: 'filter product', magnitude: INT16_MAX * INT16_MAX },
    { name: 'filtered input', magnitude: (INT16_MAX << FILTER_BITS) * 2 },
    { name: 'curvature', magnitude: curvature, limit: INT16_MAX },
    { name: 'change of curvature', magnitude: 2 * curvature, limit: INT16_MAX },
    { name: 'filtered curvature', magnitude: curvature * 2 ** COEFFICIENT_BITS + 2 ** COEFFICIENT_BITS },
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
  const perSpeed = (curvature * drive.halfTrack) / 2 ** CURVATURE_BITS;
  const half = (FULL_SPEED * perSpeed) / 2 ** TRACK_BITS;
  const duty = Math.max(drive.slopeLeft, drive.slopeRight);
  return [
    { name: 'speed of a class', magnitude: target, limit: INT16_MAX },
    { name: 'speed slope', magnitude: slope, limit: INT16_MAX },
    { name: 'speed slope product', magnitude: demanded * slope },
    { name: 'lead', magnitude: Math.max(drive.leadUp, drive.leadDown), limit: INT16_MAX },
    { name: 'speed times rule', magnitude: ahead * sums },
    { name: 'curvature times half track', magnitude: curvature * drive.halfTrack },
    { name: 'turn for each speed', magnitude: Math.floor(perSpeed), limit: INT16_MAX },
    { name: 'half track', magnitude: drive.halfTrack, limit: INT16_MAX },
    { name: 'wheel speed before its limits', magnitude: base + half, limit: INT16_MAX },
    { name: 'change of speed', magnitude: 4 * FULL_SPEED, limit: INT16_MAX },
    { name: 'change of speed times motor step', magnitude: 4 * FULL_SPEED * drive.motorStep },
    { name: 'modelled speed', magnitude: 2 ** SPEED_MODEL_BITS },
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
