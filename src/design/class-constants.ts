/** The speed classes in the firmware's integers: gains, and speed against curvature. */
import {
  COEFFICIENT_BITS,
  CURVATURE_PER_INV_M,
  type ClassConstants,
  type ControllerConstants,
  FILTER_BITS,
  OFFSET_PER_M,
  SPEED_SLOPE_BITS,
} from '../controller/constants.js';
import type { Vehicle } from '../vehicle/vehicle.js';
import { classForBend } from './class-for-bend.js';
import type { ClassSettings } from './design.js';
import { INT16_MAX, coefficientOf, curvatureUnits, speedUnits } from './scales.js';
import type { SteeringGains } from './steering-loop.js';

const LARGEST_GAIN_BITS = 14;

/** Curvature per offset that the rule table holds, 1/m^2: that of the tightest bend. */
export function tableGainPerM2(vehicle: Vehicle, classes: readonly ClassSettings[]): number {
  return classForBend(classes, vehicle.line.tightestRadiusM).gains.proportionalPerM2;
}

/** Gains of one class as real numbers in the firmware's input and curvature units. */
export function realGains(
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
export function gainBits(gains: readonly { proportional: number; derivative: number }[]): number {
  const proportional = Math.max(...gains.map((each) => each.proportional));
  const derivative = Math.max(...gains.map((each) => each.derivative));
  const bits = Math.floor(Math.log2(INT16_MAX / (proportional + derivative)));
  return Math.max(0, Math.min(LARGEST_GAIN_BITS, bits));
}

export function classConstants(
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
    const range = wider === undefined ? 0 : curvature - curvatureUnits(1 / wider.minRadiusM);
    const stepped = wider === undefined || range === 0 || vehicle.speeds.classes !== 'auto';
    const slope = stepped ? 0 : (speedUnits(wider.speedMps) - speed) / range;
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
