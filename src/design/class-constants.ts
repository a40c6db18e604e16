/** The speed classes in the firmware's integers: gains, and speed against curvature. */
import {
  COEFFICIENT_BITS,
  CURVATURE_PER_INV_M,
  type ClassConstants,
  type ControllerConstants,
  FILTER_BITS,
  type IntegralConstants,
  OFFSET_PER_M,
} from '../controller/constants.js';
import type { Vehicle } from '../vehicle/vehicle.js';
import { classForBend } from './class-for-bend.js';
import type { ClassSettings } from './design.js';
import { heldDistanceM, integralGain } from './integral-constants.js';
import { INT16_MAX, classSpeedUnits, coefficientOf, curvatureUnits } from './scales.js';
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
  const proportionalPerM2 = (proportional / one) * perUnit;
  const { integral } = constants;
  return {
    proportionalPerM2,
    derivativeTimeS: (ratio * vehicle.board.samplePeriodS) / filterCoefficient,
    filterCoefficient,
    ...(integral && {
      integralDistanceM: heldDistanceM(
        vehicle,
        proportionalPerM2,
        constants.classes[index]!.integral!,
        integral.gainBits,
      ),
    }),
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

/** Bits that a speed slope may have: whole bytes where the slopes are gentle. */
const SLOPE_BITS_TRIED = [8, 4, 0];

/** Class speed units gained for each curvature unit below the class's own; 0 where one speed serves the whole class. */
function speedSlope(vehicle: Vehicle, classes: readonly ClassSettings[], index: number): number {
  const [own, wider] = [classes[index]!, classes[index - 1]];
  if (wider === undefined || vehicle.speeds.classes !== 'auto') return 0;
  const range = curvatureUnits(1 / own.minRadiusM) - curvatureUnits(1 / wider.minRadiusM);
  const { topSpeedMps } = vehicle.drive;
  const gained = classSpeedUnits(wider.speedMps, topSpeedMps) - classSpeedUnits(own.speedMps, topSpeedMps);
  return range === 0 ? 0 : gained / range;
}

/** The most bits with which every speed slope fits a 16-bit integer. */
export function speedSlopeBits(vehicle: Vehicle, classes: readonly ClassSettings[]): number {
  const steepest = Math.max(...classes.map((_, i) => Math.abs(speedSlope(vehicle, classes, i))));
  return SLOPE_BITS_TRIED.find((bits) => steepest * (1 << bits) <= INT16_MAX) ?? 0;
}

export function classConstants(
  vehicle: Vehicle,
  classes: readonly ClassSettings[],
  tableGain: number,
  bits: { gainBits: number; slopeBits: number; integral?: IntegralConstants | undefined },
): ClassConstants[] {
  return classes.map((designed, i) => {
    const gains = realGains(vehicle, designed, tableGain);
    return {
      name: designed.name,
      curvature: curvatureUnits(1 / designed.minRadiusM),
      speed: classSpeedUnits(designed.speedMps, vehicle.drive.topSpeedMps),
      // down, so that the speed never passes that of the wider class
      speedSlope: Math.min(INT16_MAX, Math.floor(speedSlope(vehicle, classes, i) * (1 << bits.slopeBits))),
      derivativeFilter: coefficientOf(designed.gains.filterCoefficient),
      proportional: Math.round(gains.proportional * (1 << bits.gainBits)),
      derivative: Math.min(INT16_MAX, Math.round(gains.derivative * (1 << bits.gainBits))),
      ...(bits.integral && { integral: integralGain(vehicle, designed.gains, bits.integral.gainBits) }),
    };
  });
}
