/**
 * Interval analysis of the controller's arithmetic: the largest magnitude of each intermediate, from the
 * constants alone. Nothing may leave a signed 32-bit integer; the firmware repeats these bounds as static
 * assertions. Magnitudes add and multiply; a shift to the right divides; a clamp caps.
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

export const INT32_MAX = 2 ** 31 - 1;
const INT16_MAX = 2 ** 15 - 1;

/** Largest magnitude of one intermediate. */
export interface Bound {
  name: string;
  magnitude: number;
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
    { name: 'offset, in 16 bits', magnitude: offsetBound(constants) * 65536 },
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
    { name: 'curvature, in 16 bits', magnitude: steering.curvatureLimit * 65536 },
  ];
}

/** The bounds that a 32-bit integer cannot hold. */
export function overflows(constants: ControllerConstants, adcMaxCount: number): Bound[] {
  return intermediateBounds(constants, adcMaxCount).filter(({ magnitude }) => magnitude > INT32_MAX);
}
