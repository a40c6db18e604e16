/** Constants of steering, drive and the memory of the line, with their comments. */
import {
  CLASS_SPEED_BITS,
  COEFFICIENT_BITS,
  CURVATURE_PER_INV_M,
  type ControllerConstants,
  FULL_DUTY,
  FULL_SPEED,
  OFFSET_PER_M,
  SPEED_BITS,
  fullSpeedMps,
} from '../controller/constants.js';
import { mToMm, sToMs } from '../sheet/units.js';
import type { Vehicle } from '../vehicle/vehicle.js';
import { numberText } from './literals.js';
import { type Constant, constant } from './constant.js';
import type { Features } from './features.js';
import { integralConstants } from './view-integral.js';

const perM = (units: number) => numberText(units / CURVATURE_PER_INV_M, 3);
const percent = (duty: number) => numberText((100 * duty) / FULL_DUTY, 3);

/** Time constant of a first-order filter in ms, from its coefficient. */
function filterMs(coefficient: number, periodUs: number): string {
  const share = coefficient / (1 << COEFFICIENT_BITS);
  return numberText(sToMs(-periodUs / 1e6 / Math.log1p(-share)), 2);
}

export function steeringConstants(controller: ControllerConstants, features: Features): Constant[] {
  const { steering, integral, rules, samplePeriodUs } = controller;
  const constants = [
    constant('GAIN_BITS', 'uint8_t', steering.gainBits, 'Bits of the gains of the speed classes.'),
    constant(
      'DEMAND_FILTER_Q15',
      'int16_t',
      steering.demandFilter,
      `Filter of the curvature demand that picks the speed class; time constant ${filterMs(steering.demandFilter, samplePeriodUs)} ms.`,
    ),
    constant(
      'HOLD_FILTER_Q15',
      'int16_t',
      steering.holdFilter,
      `Filter of the curvature that is held over gaps${features.crossings ? ' and crossings' : ''}; time constant ${filterMs(steering.holdFilter, samplePeriodUs)} ms.`,
    ),
    constant(
      'CURVATURE_LIMIT_PER_M_Q8',
      'int16_t',
      steering.curvatureLimit,
      `Largest curvature commanded: ${perM(steering.curvatureLimit)} per m. From drive.trackWidthMm.`,
    ),
    constant(
      'SEARCH_CURVATURE_PER_M_Q8',
      'int16_t',
      steering.searchCurvature,
      `Curvature of the search for a lost line: ${perM(steering.searchCurvature)} per m. From drive.trackWidthMm and line.tightestRadiusMm.`,
    ),
  ];
  if (integral !== undefined) constants.push(...integralConstants(integral));
  if (rules !== undefined)
    constants.push(
      constant(
        'CURVATURE_PER_DIFFERENCE_Q8',
        'int16_t',
        rules.curvatureFactor,
        "Curvature for each step of difference between the wheels' fractions. From drive.trackWidthMm.",
      ),
    );
  return constants;
}

export function driveConstants(vehicle: Vehicle, controller: ControllerConstants): Constant[] {
  const { drive } = controller;
  const fullMps = fullSpeedMps(controller);
  const { trackM, lagS } = vehicle.drive;
  const mps = (units: number, bits: number) => numberText((units / (1 << bits)) * fullMps, 3);
  const full = numberText(fullMps, 3);
  return [
    constant(
      'HALF_TRACK_M_Q14',
      'int16_t',
      drive.halfTrack,
      `Half the track width: ${numberText(mToMm(trackM / 2))} mm. From drive.trackWidthMm.`,
    ),
    constant(
      'FULL_SPEED_Q13',
      'int16_t',
      FULL_SPEED,
      `Wheel speed at full duty, of which all speeds are shares: ${full} m/s. From drive.motor, drive.wheelDiameterMm and power.nominalV.`,
    ),
    constant(
      'WHEEL_DEAD_SPEED_Q13',
      'int16_t',
      drive.wheelDead,
      `Wheel speed up to which a wheel is left without duty: ${mps(drive.wheelDead, SPEED_BITS)} m/s.`,
    ),
    constant(
      'MOTOR_STEP_Q15',
      'int16_t',
      drive.motorStep,
      `Share of a speed difference that the motors make up in one sample; time constant ${numberText(sToMs(lagS))} ms. From drive.motor.timeConstantMs.`,
    ),
    constant(
      'LEAD_UP_SPEED_Q13',
      'int16_t',
      drive.leadUp,
      `Speed command above the present speed when speeding up: ${mps(drive.leadUp, SPEED_BITS)} m/s. From drive.gripCoefficient.`,
    ),
    constant(
      'LEAD_DOWN_SPEED_Q13',
      'int16_t',
      drive.leadDown,
      `Speed command below the present speed when braking: ${mps(drive.leadDown, SPEED_BITS)} m/s. From drive.gripCoefficient.`,
    ),
    constant(
      'SEARCH_SPEED_Q15',
      'int16_t',
      drive.searchSpeed,
      `Speed of the search for a lost line: ${mps(drive.searchSpeed, CLASS_SPEED_BITS)} m/s. From drive.gripCoefficient.`,
    ),
    constant(
      'START_DUTY_LEFT_Q12',
      'int16_t',
      drive.startDutyLeft,
      `Duty at which the left wheel begins to turn: ${percent(drive.startDutyLeft)} %. From drive.motor.startDutyPercent and trim.`,
    ),
    constant(
      'START_DUTY_RIGHT_Q12',
      'int16_t',
      drive.startDutyRight,
      `Duty at which the right wheel begins to turn: ${percent(drive.startDutyRight)} %. From drive.motor.startDutyPercent and trim.`,
    ),
    constant(
      'DUTY_LEFT_PER_SPEED_Q14',
      'int16_t',
      drive.slopeLeft,
      'Duty of the left wheel for each speed beyond that, both as shares. From drive.motor and trim.',
    ),
    constant(
      'DUTY_RIGHT_PER_SPEED_Q14',
      'int16_t',
      drive.slopeRight,
      'Duty of the right wheel for each speed beyond that, both as shares. From drive.motor and trim.',
    ),
  ];
}

export function memoryConstants(controller: ControllerConstants, features: Features): Constant[] {
  const { memory, samplePeriodUs } = controller;
  const distanceMm = (sum: number) =>
    numberText(mToMm(((sum / (1 << SPEED_BITS)) * fullSpeedMps(controller) * samplePeriodUs) / 1e6), 3);
  const searchS = numberText((memory.searchSamples * samplePeriodUs) / 1e6, 3);
  const constants = [
    constant(
      'SIDE_OFFSET_MM_Q6',
      'int16_t',
      memory.sideOffset,
      `Offset beyond which a vanished line has left by that side: ${numberText(mToMm(memory.sideOffset / OFFSET_PER_M))} mm. From sensors and line.widthMm.`,
    ),
    constant(
      'GAP_SPEED_Q13_SAMPLES',
      'int32_t',
      memory.gapDistance,
      `Way over which a vanished line is taken for a gap: ${distanceMm(memory.gapDistance)} mm, as a sum of speeds over samples. From line.longestGapMm.`,
    ),
  ];
  if (features.crossings)
    constants.push(
      constant(
        'CROSSING_SPEED_Q13_SAMPLES',
        'int32_t',
        memory.crossingDistance,
        `Way over which a crossing may last: ${distanceMm(memory.crossingDistance)} mm. From line.widthMm.`,
      ),
    );
  constants.push(
    constant(
      'CORNER_SPEED_Q13_SAMPLES',
      'int32_t',
      memory.cornerDistance,
      `Way after a corner on which a vanished line is looked for on its side: ${distanceMm(memory.cornerDistance)} mm. From line.widthMm.`,
    ),
    constant(
      'RELEASE_SPEED_Q13_SAMPLES',
      'int32_t',
      memory.releaseDistance,
      `Way out of a bend before a faster class is taken: ${distanceMm(memory.releaseDistance)} mm. From sensors.aheadOfAxleMm.`,
    ),
    constant(
      'SEARCH_SAMPLES',
      'uint16_t',
      memory.searchSamples,
      `Longest search for a lost line: ${searchS} s; then the vehicle stops. From drive and line.tightestRadiusMm.`,
    ),
  );
  return constants;
}
