/** From the design in SI units to the integers of the controller. Each rounding is to the nearest. */
import {
  COEFFICIENT_BITS,
  CURVATURE_PER_INV_M,
  type ClassConstants,
  type ControllerConstants,
  type DriveConstants,
  FILTER_BITS,
  FRACTION_BITS,
  FULL_DUTY,
  type MemoryConstants,
  OFFSET_PER_M,
  RULE_CURVATURE_BITS,
  SLOPE_BITS,
  SPEED_PER_MPS,
  SPEED_SLOPE_BITS,
  type SteeringConstants,
  type SweepConstants,
  TRACK_BITS,
} from '../controller/constants.js';
import { mToMm } from '../sheet/units.js';
import type { Vehicle } from '../vehicle/vehicle.js';
import { meanPitchM } from './bar-view.js';
import type { ClassSettings } from './design.js';
import * as choice from './drive-choices.js';
import type { SteeringGains } from './steering-loop.js';
import { runActions } from './rule-runs.js';
import { sensingConstants } from './sensing-constants.js';

const INT16_MAX = 32767;
const LARGEST_GAIN_BITS = 14;

/** First-order filter coefficient of a time constant, in 1/2^COEFFICIENT_BITS, 1 to 32767. */
function coefficient(timeS: number, samplePeriodS: number): number {
  const exact = -Math.expm1(-samplePeriodS / timeS) * (1 << COEFFICIENT_BITS);
  return Math.min(INT16_MAX, Math.max(1, Math.round(exact)));
}

/** A filter coefficient 0..1 in 1/2^COEFFICIENT_BITS. */
function coefficientOf(share: number): number {
  return Math.min(INT16_MAX, Math.max(1, Math.round(share * (1 << COEFFICIENT_BITS))));
}

const curvatureUnits = (perM: number) => Math.min(INT16_MAX, Math.round(perM * CURVATURE_PER_INV_M));
const speedUnits = (mps: number) => Math.round(mps * SPEED_PER_MPS);

/** Distance in sums of model speed over samples. */
function distanceUnits(distanceM: number, samplePeriodS: number): number {
  return Math.round((distanceM * SPEED_PER_MPS) / samplePeriodS);
}

/** Curvature per offset that the rule table holds, 1/m^2: that of the tightest bend. */
export function tableGainPerM2(vehicle: Vehicle, classes: readonly ClassSettings[]): number {
  const reach = vehicle.line.tightestRadiusM * (1 + 1e-9);
  const tightest = classes.find((designed) => designed.minRadiusM <= reach) ?? classes[classes.length - 1]!;
  return tightest.gains.proportionalPerM2;
}

/** Gains of one class as real numbers in the firmware's input and curvature units. */
function realGains(
  vehicle: Vehicle,
  designed: ClassSettings,
  tableGain: number,
): { proportional: number; derivative: number } {
  const { proportionalPerM2, derivativeTimeS, filterCoefficient } = designed.gains;
  // with rules the table's curvature is the input, and each class takes its share of it
  const perUnit =
    vehicle.control.kind === 'rules'
      ? proportionalPerM2 / tableGain
      : (proportionalPerM2 * CURVATURE_PER_INV_M) / OFFSET_PER_M;
  const ratio = (derivativeTimeS * filterCoefficient) / vehicle.board.samplePeriodS;
  return { proportional: perUnit, derivative: (perUnit * ratio) / (1 << FILTER_BITS) };
}

/** The gains that the firmware's integers of one class stand for. */
export function firmwareGains(
  vehicle: Vehicle,
  constants: ControllerConstants,
  index: number,
  tableGain: number,
): SteeringGains {
  const { proportional, derivative, derivativeFilter } = constants.classes[index]!;
  const one = 1 << constants.steering.gainBits;
  const perUnit = vehicle.control.kind === 'rules' ? tableGain : OFFSET_PER_M / CURVATURE_PER_INV_M;
  const filterCoefficient = derivativeFilter / (1 << COEFFICIENT_BITS);
  const ratio = (derivative * (1 << FILTER_BITS)) / proportional;
  return {
    proportionalPerM2: (proportional / one) * perUnit,
    derivativeTimeS: (ratio * vehicle.board.samplePeriodS) / filterCoefficient,
    filterCoefficient,
  };
}

/**
 * Largest number of bits with which the largest gains of both kinds together still fit a 16-bit integer: the sum of their
 * products with 16-bit inputs then fits the 31 bits that MicroPython keeps in a machine word.
 */
function gainBits(gains: readonly { proportional: number; derivative: number }[]): number {
  const proportional = Math.max(...gains.map((each) => each.proportional));
  const derivative = Math.max(...gains.map((each) => each.derivative));
  const bits = Math.floor(Math.log2(INT16_MAX / (proportional + derivative)));
  return Math.max(0, Math.min(LARGEST_GAIN_BITS, bits));
}

function classConstants(
  vehicle: Vehicle,
  classes: readonly ClassSettings[],
  tableGain: number,
  bits: number,
): ClassConstants[] {
  return classes.map((designed, i) => {
    const gains = realGains(vehicle, designed, tableGain);
    const curvature = curvatureUnits(1 / designed.minRadiusM);
    const speed = speedUnits(designed.speedMps);
    const wider = classes[i - 1];
    const stepped = wider === undefined || vehicle.speeds.classes !== 'auto';
    const slope = stepped
      ? 0
      : (speedUnits(wider.speedMps) - speed) / (curvature - curvatureUnits(1 / wider.minRadiusM));
    return {
      name: designed.name,
      curvature,
      speed,
      speedSlope: Math.round(slope * (1 << SPEED_SLOPE_BITS)),
      derivativeFilter: coefficientOf(designed.gains.filterCoefficient),
      proportional: Math.round(gains.proportional * (1 << bits)),
      derivative: Math.min(INT16_MAX, Math.round(gains.derivative * (1 << bits))),
    };
  });
}

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
