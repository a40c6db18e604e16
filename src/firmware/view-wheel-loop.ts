/** Constants of the wheel loops, with their comments; for vehicles with encoders. */
import { FULL_SPEED, type ControllerConstants, fullSpeedMps } from '../controller/constants.js';
import { sToMs } from '../sheet/units.js';
import { type Constant, constant } from './constant.js';
import { numberText } from './literals.js';

/** None without encoders. */
export function wheelLoopConstants(controller: ControllerConstants): Constant[] {
  const { wheelLoop, samplePeriodUs } = controller;
  if (wheelLoop === undefined) return [];
  const ms = (samples: number) => numberText(sToMs((samples * samplePeriodUs) / 1e6), 3);
  const mps = (speed: number) => numberText((speed / (FULL_SPEED + 1)) * fullSpeedMps(controller), 3);
  return [
    constant(
      'WHEEL_WINDOW_BITS',
      'uint8_t',
      wheelLoop.windowBits,
      `Edges are counted over 2 to the power of this many samples: ${ms(2 ** wheelLoop.windowBits)} ms. From encoders.linesPerTurn.`,
    ),
    constant(
      'EDGE_LIMIT',
      'int16_t',
      wheelLoop.edgeLimit,
      'Most edges that one sample can hold; more are a fault of the signal.',
    ),
    constant(
      'SPEED_PER_EDGE',
      'int16_t',
      wheelLoop.speedPerEdge,
      'Speed that one edge in the window stands for, EDGE_SPEED_BITS more bits than a wheel speed. From encoders.linesPerTurn and drive.wheelDiameterMm.',
    ),
    constant('EDGE_SPEED_BITS', 'uint8_t', wheelLoop.edgeBits, 'Bits of that beyond a wheel speed.'),
    constant(
      'WHEEL_PROPORTIONAL_Q11',
      'int16_t',
      wheelLoop.proportional,
      'Correction for each speed of difference. From drive.motor.timeConstantMs and the tolerances.',
    ),
    constant(
      'WHEEL_INTEGRAL_Q15',
      'int16_t',
      wheelLoop.integral,
      'What the held correction gains in a sample for each speed of difference.',
    ),
    constant(
      'WHEEL_TRACKING_Q15',
      'int16_t',
      wheelLoop.tracking,
      'What it loses in a sample for each speed that the wheel cannot be given.',
    ),
    constant(
      'WHEEL_CORRECTION_LIMIT_SPEED_Q13',
      'int16_t',
      wheelLoop.correctionLimit,
      `Largest correction: ${mps(wheelLoop.correctionLimit)} m/s.`,
    ),
    constant(
      'WHEEL_BLOCKED_SPEED_Q13',
      'int16_t',
      wheelLoop.blockedSpeed,
      `Speed above which a wheel has to turn: ${mps(wheelLoop.blockedSpeed)} m/s.`,
    ),
    constant(
      'WHEEL_BLOCKED_SAMPLES',
      'uint16_t',
      wheelLoop.blockedSamples,
      `Time without an edge after which a driven wheel counts as blocked: ${ms(wheelLoop.blockedSamples)} ms.`,
    ),
  ];
}
