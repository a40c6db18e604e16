/** Largest magnitudes in the wheel loop's arithmetic; see intervals.ts. */
import {
  COEFFICIENT_BITS,
  FULL_SPEED,
  WHEEL_MODEL_BITS,
  type ControllerConstants,
} from '../controller/constants.js';
import type { Bound } from './bound.js';
import { INT16_MAX } from './scales.js';

/** None without encoders. */
export function wheelLoopBounds({ wheelLoop, drive }: ControllerConstants): Bound[] {
  if (wheelLoop === undefined) return [];
  const { edgeLimit, windowBits, speedPerEdge, proportional, integral, tracking, correctionLimit } =
    wheelLoop;
  const edges = edgeLimit * 2 ** windowBits;
  // the measured speed is cut at twice full speed, and so is the proportional part
  const error = 3 * FULL_SPEED;
  const part = 2 * FULL_SPEED;
  const beyond = part + correctionLimit;
  return [
    { name: 'edges in the window', magnitude: edges, limit: INT16_MAX },
    { name: 'edges in the window before one leaves it', magnitude: edges + edgeLimit, limit: INT16_MAX },
    { name: 'edges times speed', magnitude: edges * speedPerEdge },
    { name: 'wanted speeds in the window', magnitude: FULL_SPEED * 2 ** windowBits },
    { name: 'modelled wheel speed', magnitude: 2 ** WHEEL_MODEL_BITS },
    { name: 'change of modelled wheel speed', magnitude: 2 * FULL_SPEED * drive.motorStep },
    { name: 'wheel speed difference', magnitude: error, limit: INT16_MAX },
    { name: 'difference times proportional gain', magnitude: error * proportional },
    {
      name: 'wheel speed asked for',
      magnitude: FULL_SPEED + part + correctionLimit,
      limit: INT16_MAX,
    },
    {
      name: 'held correction',
      magnitude: correctionLimit * 2 ** COEFFICIENT_BITS + error * integral + beyond * tracking,
    },
  ];
}
