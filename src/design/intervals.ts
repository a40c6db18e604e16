/**
 * Interval analysis of the controller's arithmetic: the largest magnitude of each intermediate, from the
 * constants alone. Nothing may leave a signed 32-bit integer; the firmware repeats these bounds as static
 * assertions. Magnitudes add and multiply; a shift to the right divides; a clamp caps.
 *
 * MicroPython keeps integers of 31 bits in the machine word and puts larger ones on the heap (py/smallint.h). What a control
 * step takes from the heap has to be collected one day, in the middle of a bend: there the limit is one bit less.
 */
import {
  type ControllerConstants,
  FILTER_BITS,
  FULL_COVERAGE,
  FULL_DUTY,
  SLOPE_BITS,
  SPEED_GAIN_BITS,
  SPEED_MODEL_BITS,
} from '../controller/constants.js';
import type { Vehicle } from '../vehicle/vehicle.js';

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

/** Largest offset that sensing can report, offset units. */
function offsetBound({ sensing }: ControllerConstants): number {
  const shift = (largest(sensing.gapHalf) * largest(sensing.edgeTable)) / 1024;
  return Math.ceil(largest(sensing.gapMiddle) + shift + sensing.halfLine);
}

/**
 * Bounds of all intermediates that could be large.
 *
 * @param adcMaxCount largest reading, counts
 */
export function intermediateBounds(constants: ControllerConstants, adcMaxCount: number): Bound[] {
  const { sensing, steering, drive, memory, classes } = constants;
  const proportional = largest(classes.map((each) => each.proportional));
  const derivative = largest(classes.map((each) => each.derivative));
  const speed = drive.wheelLimit * 64;
  const curvature = largest(classes.map((each) => each.curvature));
  const target =
    Math.max(drive.searchSpeed, largest(classes.map((each) => each.speed))) +
    (curvature * largest(classes.map((each) => each.speedSlope))) / 16;
  const wheel = drive.wheelLimit * 2 + (drive.turnLimit * drive.halfTrack) / 65536;
  return [
    {
      name: 'reading times calibration gain',
      magnitude: sensing.digital ? 0 : adcMaxCount * largest(sensing.gain),
    },
    { name: 'half gap times edge table', magnitude: largest(sensing.gapHalf) * largest(sensing.edgeTable) },
    { name: 'offset', magnitude: offsetBound(constants), limit: INT16_MAX },
    { name: 'sum of coverages', magnitude: sensing.sensorCount * FULL_COVERAGE },
    { name: 'proportional and derivative sum', magnitude: INT16_MAX * proportional + INT16_MAX * derivative },
    { name: 'filter product', magnitude: INT16_MAX * INT16_MAX },
    { name: 'filtered input', magnitude: (INT16_MAX << FILTER_BITS) * 2 },
    { name: 'speed times curvature', magnitude: drive.wheelLimit * INT16_MAX },
    { name: 'turn rate times half track', magnitude: drive.turnLimit * drive.halfTrack },
    { name: 'speed error', magnitude: (target + speed) * (1 << SPEED_GAIN_BITS) },
    { name: 'speed slope product', magnitude: curvature * largest(classes.map((each) => each.speedSlope)) },
    { name: 'motor model product', magnitude: ((2 * speed) / (1 << SPEED_MODEL_BITS)) * drive.motorStep },
    {
      name: 'duty product',
      magnitude: wheel * Math.max(drive.slopeLeft, drive.slopeRight) + FULL_DUTY * (1 << SLOPE_BITS),
    },
    {
      name: 'distance',
      magnitude:
        Math.max(memory.gapDistance, memory.crossingDistance, memory.releaseDistance, memory.cornerDistance) +
        speed,
    },
    { name: 'search distance', magnitude: memory.searchSamples * speed },
    { name: 'curvature', magnitude: steering.curvatureLimit, limit: INT16_MAX },
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
