/** From the design in SI units to the integers of the controller. Each rounding is to the nearest. */
import {
  CURVATURE_PER_INV_M,
  type ControllerConstants,
  type DriveConstants,
  FRACTION_BITS,
  FULL_DUTY,
  type MemoryConstants,
  OFFSET_PER_M,
  RULE_CURVATURE_BITS,
  SLOPE_BITS,
  type SteeringConstants,
  type SweepConstants,
  TRACK_BITS,
} from '../controller/constants.js';
import { mToMm } from '../sheet/units.js';
import type { Vehicle } from '../vehicle/vehicle.js';
import { meanPitchM } from './bar-view.js';
import { classConstants, gainBits, realGains, tableGainPerM2 } from './class-constants.js';
import type { ClassSettings } from './design.js';
import * as choice from './drive-choices.js';
import { runActions } from './rule-runs.js';
import { coefficient, curvatureUnits, distanceUnits, speedUnits } from './scales.js';
import { sensingConstants } from './sensing-constants.js';

function steeringConstants(vehicle: Vehicle, bits: number): SteeringConstants {
  const period = vehicle.board.samplePeriodS;
  return {
    gainBits: bits,
    demandFilter: coefficient(choice.demandFilterS(vehicle), period),
    holdFilter: coefficient(choice.HOLD_FILTER_S, period),
    curvatureLimit: curvatureUnits(choice.curvatureLimitPerM(vehicle)),
    searchCurvature: curvatureUnits(choice.searchCurvaturePerM(vehicle)),
  };
}

function driveConstants(vehicle: Vehicle): DriveConstants {
  const { drive, board } = vehicle;
  const wheelLimit = Math.round(mToMm(drive.topSpeedMps));
  const slope = ((1 - drive.startDuty) * FULL_DUTY * (1 << SLOPE_BITS)) / wheelLimit;
  return {
    halfTrack: Math.round((drive.trackM / 2) * (1 << TRACK_BITS)),
    turnLimit: Math.round((2.2 * drive.topSpeedMps * 1000) / drive.trackM),
    wheelLimit,
    wheelDead: Math.round(wheelLimit * choice.WHEEL_DEAD_SHARE),
    motorStep: coefficient(drive.lagS, board.samplePeriodS),
    leadUp: speedUnits(drive.lagS * choice.speedUpMps2(vehicle)),
    leadDown: speedUnits(drive.lagS * choice.brakingMps2(vehicle)),
    searchSpeed: speedUnits(choice.searchSpeedMps(vehicle)),
    startDutyLeft: Math.round(drive.startDuty * FULL_DUTY * drive.trimLeft),
    startDutyRight: Math.round(drive.startDuty * FULL_DUTY * drive.trimRight),
    slopeLeft: Math.round(slope * drive.trimLeft),
    slopeRight: Math.round(slope * drive.trimRight),
  };
}

function memoryConstants(vehicle: Vehicle): MemoryConstants {
  const period = vehicle.board.samplePeriodS;
  const units = (m: number) => distanceUnits(m, period);
  const outermost = vehicle.bar.positionsM[0] as number;
  const pitch = meanPitchM(vehicle.bar.positionsM);
  const side = Math.max(outermost - pitch / 2 + vehicle.line.widthM / 4, outermost / 2);
  return {
    sideOffset: Math.round(side * OFFSET_PER_M),
    gapDistance: units(choice.gapDistanceM(vehicle)),
    crossingDistance: units(choice.crossingDistanceM(vehicle)),
    searchSamples: Math.ceil(choice.searchTimeS(vehicle) / period),
    cornerDistance: units(choice.cornerDistanceM(vehicle)),
    releaseDistance: units(choice.releaseDistanceM(vehicle)),
  };
}

function sweepConstants(vehicle: Vehicle, drive: DriveConstants): SweepConstants {
  const period = vehicle.board.samplePeriodS;
  const { turnTimeS, wheelSpeedMps } = choice.sweepTurn(vehicle);
  const duty = (start: number, slope: number) =>
    start + ((Math.round(mToMm(wheelSpeedMps)) * slope) >> SLOPE_BITS);
  return {
    dutyLeft: duty(drive.startDutyLeft, drive.slopeLeft),
    dutyRight: duty(drive.startDutyRight, drive.slopeRight),
    turnSamples: Math.ceil(turnTimeS / period),
    returnSamples: Math.ceil((3 * turnTimeS) / period),
    centreOffset: Math.round((meanPitchM(vehicle.bar.positionsM) / 2) * OFFSET_PER_M),
    minSpan: Math.round(choice.LEAST_CONTRAST_SHARE * vehicle.board.adcMaxCount),
  };
}

/** The controller of a design. */
export function controllerConstants(
  vehicle: Vehicle,
  classes: readonly ClassSettings[],
): ControllerConstants {
  const tableGain = tableGainPerM2(vehicle, classes);
  const bits = gainBits(classes.map((designed) => realGains(vehicle, designed, tableGain)));
  const sensing = sensingConstants(vehicle);
  const drive = driveConstants(vehicle);
  const period = vehicle.board.samplePeriodS;
  const constants: ControllerConstants = {
    kind: vehicle.control.kind,
    samplePeriodUs: Math.round(period * 1e6),
    countdownSamples: Math.round(vehicle.start.countdownS / period),
    runLimitSamples: Math.round(vehicle.start.runLimitS / period),
    sensing,
    steering: steeringConstants(vehicle, bits),
    drive,
    memory: memoryConstants(vehicle),
    classes: classConstants(vehicle, classes, tableGain, bits),
  };
  if (vehicle.bar.calibration.mode === 'sweep' && vehicle.bar.kind === 'analog') {
    constants.sweep = sweepConstants(vehicle, drive);
  }
  if (vehicle.control.kind === 'rules') {
    const actions = runActions(vehicle, tableGain);
    const perDifference = CURVATURE_PER_INV_M / (vehicle.drive.trackM * (1 << FRACTION_BITS));
    constants.rules = {
      curvatureFactor: Math.round(perDifference * (1 << RULE_CURVATURE_BITS)),
      left: actions.map((action) => action.left),
      right: actions.map((action) => action.right),
    };
  }
  return constants;
}
