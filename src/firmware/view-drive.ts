/** Constants of steering, drive and the memory of the line, with their comments. */
import {
  COEFFICIENT_BITS,
  CURVATURE_PER_INV_M,
  type ControllerConstants,
  type DriveConstants,
  FULL_DUTY,
  OFFSET_PER_M,
  SPEED_PER_MPS,
} from '../controller/constants.js';
import { mToMm, sToMs } from '../sheet/units.js';
import type { Vehicle } from '../vehicle/vehicle.js';
import { numberText, signedTypeOf } from './literals.js';
import { type Constant, constant } from './constant.js';
import type { Features } from './features.js';

const mps = (units: number) => numberText(units / SPEED_PER_MPS, 3);
const perM = (units: number) => numberText(units / CURVATURE_PER_INV_M, 3);
const percent = (duty: number) => numberText((100 * duty) / FULL_DUTY, 3);

/** Time constant of a first-order filter in ms, from its coefficient. */
function filterMs(coefficient: number, periodUs: number): string {
  const share = coefficient / (1 << COEFFICIENT_BITS);
  return numberText(sToMs(-periodUs / 1e6 / Math.log1p(-share)), 2);
}

export function steeringConstants(controller: ControllerConstants, features: Features): Constant[] {
  const { steering, rules, samplePeriodUs } = controller;
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
  if (rules !== undefined)
    constants.push(
      constant(
        'CURVATURE_PER_DIFFERENCE_Q4',
        'int16_t',
        rules.curvatureFactor,
        "Curvature for each step of difference between the wheels' fractions. From drive.trackWidthMm.",
      ),
    );
  return constants;
}

export function driveConstants(vehicle: Vehicle, drive: DriveConstants): Constant[] {
  const { trackM, lagS } = vehicle.drive;
  const wheelType = signedTypeOf([drive.wheelLimit, drive.slopeLeft, drive.slopeRight]);
  return [
    constant(
      'HALF_TRACK_M_Q16',
      signedTypeOf([drive.halfTrack]),
      drive.halfTrack,
      `Half the track width: ${numberText(mToMm(trackM / 2))} mm. From drive.trackWidthMm.`,
    ),
    constant(
      'TURN_LIMIT_MRAD_S',
      'int32_t',
      drive.turnLimit,
      'Largest turn rate commanded, mrad/s. From drive.motor and drive.trackWidthMm.',
    ),
    constant(
      'WHEEL_LIMIT_MM_S',
      wheelType,
      drive.wheelLimit,
      'Wheel speed at full duty, mm/s. From drive.motor, drive.wheelDiameterMm and power.nominalV.',
    ),
    constant(
      'WHEEL_DEAD_MM_S',
      'int16_t',
      drive.wheelDead,
      'Wheel speed up to which a wheel is left without duty, mm/s.',
    ),
    constant(
      'MOTOR_STEP_Q15',
      'int16_t',
      drive.motorStep,
      `Share of a speed difference that the motors make up in one sample; time constant ${numberText(sToMs(lagS))} ms. From drive.motor.timeConstantMs.`,
    ),
    constant(
      'LEAD_UP_MM_S_Q6',
      'int32_t',
      drive.leadUp,
      `Speed command above the present speed when speeding up: ${mps(drive.leadUp)} m/s. From drive.gripCoefficient.`,
    ),
    constant(
      'LEAD_DOWN_MM_S_Q6',
      'int32_t',
      drive.leadDown,
      `Speed command below the present speed when braking: ${mps(drive.leadDown)} m/s. From drive.gripCoefficient.`,
    ),
    constant(
      'SEARCH_SPEED_MM_S_Q6',
      'int32_t',
      drive.searchSpeed,
      `Speed of the search for a lost line: ${mps(drive.searchSpeed)} m/s. From drive.gripCoefficient.`,
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
      'DUTY_LEFT_PER_MM_S_Q24',
      wheelType,
      drive.slopeLeft,
      'Duty of the left wheel for each mm/s beyond that. From drive.motor, drive.wheelDiameterMm and trim.',
    ),
    constant(
      'DUTY_RIGHT_PER_MM_S_Q24',
      wheelType,
      drive.slopeRight,
      'Duty of the right wheel for each mm/s beyond that. From drive.motor, drive.wheelDiameterMm and trim.',
    ),
  ];
}

export function memoryConstants(controller: ControllerConstants, features: Features): Constant[] {
  const { memory, samplePeriodUs } = controller;
  const distanceMm = (sum: number) => numberText(mToMm(((sum / SPEED_PER_MPS) * samplePeriodUs) / 1e6), 3);
  const searchS = numberText((memory.searchSamples * samplePeriodUs) / 1e6, 3);
  const constants = [
    constant(
      'SIDE_OFFSET_MM_Q6',
      'int16_t',
      memory.sideOffset,
      `Offset beyond which a vanished line has left by that side: ${numberText(mToMm(memory.sideOffset / OFFSET_PER_M))} mm. From sensors and line.widthMm.`,
    ),
    constant(
      'GAP_MM_S_Q6_SAMPLES',
      'int32_t',
      memory.gapDistance,
      `Way over which a vanished line is taken for a gap: ${distanceMm(memory.gapDistance)} mm, as a sum of speeds over samples. From line.longestGapMm.`,
    ),
  ];
  if (features.crossings)
    constants.push(
      constant(
        'CROSSING_MM_S_Q6_SAMPLES',
        'int32_t',
        memory.crossingDistance,
        `Way over which a crossing may last: ${distanceMm(memory.crossingDistance)} mm. From line.widthMm.`,
      ),
    );
  constants.push(
    constant(
      'CORNER_MM_S_Q6_SAMPLES',
      'int32_t',
      memory.cornerDistance,
      `Way after a corner on which a vanished line is looked for on its side: ${distanceMm(memory.cornerDistance)} mm. From line.widthMm.`,
    ),
    constant(
      'RELEASE_MM_S_Q6_SAMPLES',
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
