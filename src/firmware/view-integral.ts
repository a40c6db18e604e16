/** Constants of the integral part of the steering law, with their comments. */
import {
  CURVATURE_PER_INV_M,
  INTEGRAL_BITS,
  INTEGRAL_SPEED_BITS,
  type IntegralConstants,
  LARGEST_CURVATURE,
} from '../controller/constants.js';
import { type Constant, constant } from './constant.js';
import { numberText } from './literals.js';

export function integralConstants({ gainBits, limit, tracking }: IntegralConstants): Constant[] {
  const limitPerM = numberText(limit / CURVATURE_PER_INV_M, 3);
  return [
    constant(
      'INTEGRAL_BITS',
      'uint8_t',
      INTEGRAL_BITS,
      'Bits of the integral part beyond those of a curvature.',
    ),
    constant(
      'INTEGRAL_SPEED_BITS',
      'uint8_t',
      INTEGRAL_SPEED_BITS,
      'Bits dropped from speed times integral gain.',
    ),
    constant('INTEGRAL_GAIN_BITS', 'uint8_t', gainBits, "Bits of the classes' integral gains."),
    constant(
      'INTEGRAL_LIMIT_PER_M_Q8',
      'int16_t',
      limit,
      `Largest integral part, and largest demand up to which it works; more is a bend: ${limitPerM} per m. From tolerances.motorGainPercent and drive.trackWidthMm.`,
    ),
    constant(
      'LARGEST_CURVATURE_Q8',
      'int16_t',
      LARGEST_CURVATURE,
      'Largest difference of curvatures that the integral part gives back for.',
    ),
    constant(
      'INTEGRAL_TRACKING_Q16',
      'int16_t',
      tracking,
      'Share of what the curvature limit cuts off that comes off the integral part in each sample.',
    ),
  ];
}
