/**
 * The scales of the controller's integers.
 *
 * Scales (a value of 1 stands for):
 *   offset        1/64 mm      left of the bar's centre is positive
 *   coverage      1/255        255 = the sensor's spot lies wholly on the line; it fills one byte
 *   curvature     1/256 per m  left turns are positive
 *   speed         1/8192       of the speed at full duty
 *   class speed   1/32768      of the speed at full duty
 *   duty          1/4096       4096 = full
 *   distance      sum of speeds over samples: 1/8192 of the speed at full duty times one sample period
 *
 * The scales are such that on an 8-bit chip every value fits 16 bits, every product comes from two of them, and
 * nearly every shift moves whole bytes.
 */

/** Offset units in one metre. */
export const OFFSET_PER_M = 64_000;
/** Coverage of a sensor that lies wholly on the line. */
export const FULL_COVERAGE = 255;
/** Bits of a curvature beyond 1/m, and curvature units in 1/m. */
export const CURVATURE_BITS = 8;
export const CURVATURE_PER_INV_M = 1 << CURVATURE_BITS;
/** Bits of a speed: 1 << SPEED_BITS is the speed at full duty. */
export const SPEED_BITS = 13;
/** Largest wheel speed commanded. */
export const FULL_SPEED = (1 << SPEED_BITS) - 1;
/** Bits of a class's speed. The bits beyond SPEED_BITS are how much faster than the motors a speed error is closed: 4 times. */
export const CLASS_SPEED_BITS = 15;
/** Bits of the modelled speed: SPEED_BITS, and 16 that keep what one sample adds. */
export const SPEED_MODEL_BITS = 29;
/** Largest curvature: the difference of two still fits 16 bits. */
export const LARGEST_CURVATURE = 16_383;
/** Bits of a wheel's modelled speed: SPEED_BITS, and those of the motor step. */
export const WHEEL_MODEL_BITS = 28;
/** Bits of the wheel loop's proportional gain. */
export const WHEEL_GAIN_BITS = 11;
/** Duty of a motor at full voltage. */
export const FULL_DUTY = 4096;
/** Extra bits of the derivative's filtered input over the input. */
export const FILTER_BITS = 4;
/** Bits of the filter and model coefficients. */
export const COEFFICIENT_BITS = 15;
/** Bits of the integral part beyond curvature units: what one sample adds is far below one of them. */
export const INTEGRAL_BITS = 16;
/** Bits dropped from the product of speed and integral gain. */
export const INTEGRAL_SPEED_BITS = 14;
/** Bits of the calibration gain. */
export const CALIBRATION_BITS = 12;
/** Bits of the half track width, and of the wheel-speed difference for each speed. */
export const TRACK_BITS = 14;
/** Bits of the duty slope. */
export const SLOPE_BITS = 15;
/** Bits of a rule table's wheel-speed fractions: 64 = base speed. */
export const FRACTION_BITS = 6;
/** Bits of the rule table's curvature factor. */
export const RULE_CURVATURE_BITS = 8;
/** Bits of the edge table's values: 4096 = half the distance between two sensors. */
export const EDGE_BITS = 12;
/** Bits of a gap's half width beyond offset units. */
export const GAP_HALF_BITS = 3;
/** Bits of coverage between two entries of the edge table; the table has (511 >> 5) + 2 entries. */
export const EDGE_STEP_BITS = 5;
/** Entries of the edge table. */
export const EDGE_ENTRIES = 17;
