/** From the design in SI units to the integers of the controller. Each rounding is to the nearest. */
import {
  CURVATURE_BITS,
  CURVATURE_PER_INV_M,
  type ControllerConstants,
  type DriveConstants,
  FRACTION_BITS,
  FULL_DUTY,
  type MemoryConstants,
  OFFSET_PER_M,
  RULE_CURVATURE_BITS,
  SLOPE_BITS,
  SPEED_BITS,
  type SteeringConstants,
  type SweepConstants,
  TRACK_BITS,
} from '../controller/constants.js';
import type { Vehicle } from '../vehicle/vehicle.js';
import { meanPitchM } from './bar-view.js';
import { classConstants, gainBits, realGains, speedSlopeBits, tableGainPerM2 } from './class-constants.js';
import type { ClassSettings } from './design.js';
import * as choice from './drive-choices.js';
import { integralConstants } from './integral-constants.js';
import { runActions } from './rule-runs.js';
import {
  INT16_MAX,
  classSpeedUnits,
  coefficient,
  curvatureUnits,
  distanceUnits,
  speedUnits,
} from './scales.js';
import { sensingConstants } from './sensing-constants.js';
import { wheelLoopDesign } from './wheel-loop-design.js';

/** Half the track width, in m with TRACK_BITS. */
function halfTrack(vehicle: Vehicle): number {
  return Math.round((vehicle.drive.trackM / 2) * (1 << TRACK_BITS));
}

/** Curvature units of a command, cut to where half the wheels' difference for each speed fits 16 bits: it is 2 there. */
function commandUnits(vehicle: Vehicle, curvaturePerM: number): number {
  const largest = Math.floor((INT16_MAX << CURVATURE_BITS) / halfTrack(vehicle));
  return Math.min(curvatureUnits(curvaturePerM), largest);
}

function steeringConstants(vehicle: Vehicle, bits: number): SteeringConstants {
  const period = vehicle.board.samplePeriodS;
  return {
    gainBits: bits,
    demandFilter: coefficient(choice.demandFilterS(vehicle), period),
    holdFilter: coefficient(choice.HOLD_FILTER_S, period),
    curvatureLimit: commandUnits(vehicle, choice.curvatureLimitPerM(vehicle)),
    searchCurvature: commandUnits(vehicle, choice.searchCurvaturePerM(vehicle)),
  };
}

function driveConstants(vehicle: Vehicle, slopeBits: number): DriveConstants {
  const { drive, board } = vehicle;
  const top = drive.topSpeedMps;
  const slope = ((1 - drive.startDuty) * FULL_DUTY * (1 << SLOPE_BITS)) / (1 << SPEED_BITS);
  return {
    fullSpeedUmS: Math.round(top * 1e6),
    halfTrack: halfTrack(vehicle),
    wheelDead: Math.round((1 << SPEED_BITS) * choice.WHEEL_DEAD_SHARE),
    slopeBits,
    motorStep: coefficient(drive.lagS, board.samplePeriodS),
    leadUp: speedUnits(drive.lagS * choice.speedUpMps2(vehicle), top),
    leadDown: speedUnits(drive.lagS * choice.brakingMps2(vehicle), top),
    searchSpeed: classSpeedUnits(choice.searchSpeedMps(vehicle), top),
    startDutyLeft: Math.round(drive.startDuty * FULL_DUTY * drive.trimLeft),
    startDutyRight: Math.round(drive.startDuty * FULL_DUTY * drive.trimRight),
    slopeLeft: Math.round(slope * drive.trimLeft),
    slopeRight: Math.round(slope * drive.trimRight),
  };
}

function memoryConstants(vehicle: Vehicle): MemoryConstants {
  const period = vehicle.board.samplePeriodS;
  const units = (m: number) => distanceUnits(m, vehicle.drive.topSpeedMps, period);
  const { positionsM } = vehicle.bar;
  // the nearer end of a lopsided bar
  const outermost = Math.min(positionsM[0] as number, -(positionsM.at(-1) as number));
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
    start + ((speedUnits(wheelSpeedMps, vehicle.drive.topSpeedMps) * slope) >> SLOPE_BITS);
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
  const integral = integralConstants(vehicle, classes);
  const bits = {
    gainBits: gainBits(classes.map((designed) => realGains(vehicle, designed, tableGain))),
    slopeBits: speedSlopeBits(vehicle, classes),
    integral,
  };
  const sensing = sensingConstants(vehicle);
  const drive = driveConstants(vehicle, bits.slopeBits);
  const period = vehicle.board.samplePeriodS;
  const constants: ControllerConstants = {
    kind: vehicle.control.kind,
    samplePeriodUs: Math.round(period * 1e6),
    countdownSamples: Math.round(vehicle.start.countdownS / period),
    runLimitSamples: Math.round(vehicle.start.runLimitS / period),
    sensing,
    steering: steeringConstants(vehicle, bits.gainBits),
    drive,
    memory: memoryConstants(vehicle),
    classes: classConstants(vehicle, classes, tableGain, bits),
    ...(integral && { integral }),
  };
  const wheelLoop = wheelLoopDesign(vehicle)?.constants;
  if (wheelLoop) constants.wheelLoop = wheelLoop;
  if (vehicle.bar.calibration.mode === 'sweep' && vehicle.bar.kind !== 'digital') {
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
