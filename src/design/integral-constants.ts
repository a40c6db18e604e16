/**
 * The integral part of the steering law in the firmware's integers.
 *
 * Each sample adds kp h w / D times the offset, w the modelled speed: the gain of a class is what full speed adds, in curvature
 * units with INTEGRAL_BITS more, the modelled speed takes its share of it.
 */
import {
  CURVATURE_PER_INV_M,
  INTEGRAL_BITS,
  INTEGRAL_SPEED_BITS,
  type IntegralConstants,
  OFFSET_PER_M,
  SPEED_BITS,
} from '../controller/constants.js';
import type { Vehicle } from '../vehicle/vehicle.js';
import { integralLimitPerM } from './bias.js';
import type { ClassSettings } from './design.js';
import { INT16_MAX, curvatureUnits } from './scales.js';
import type { SteeringGains } from './steering-loop.js';

const LARGEST_INTEGRAL_BITS = 14;
/** Largest integral part, curvature units: with what one sample adds it fits the 31 bits of MicroPython's machine word. */
const LARGEST_PART = 4096;

/** What one sample adds at full speed, for each offset unit, times the integral distance over kp; m^3. */
function perSampleM3({ board, drive }: Vehicle): number {
  const perUnit = (CURVATURE_PER_INV_M / OFFSET_PER_M) * 2 ** INTEGRAL_BITS;
  return perUnit * board.samplePeriodS * drive.topSpeedMps * 2 ** (INTEGRAL_SPEED_BITS - SPEED_BITS);
}

/** Gain of a class as a real number; 0 without an integral part. */
function realGain(vehicle: Vehicle, { proportionalPerM2, integralDistanceM }: SteeringGains): number {
  return integralDistanceM === undefined ? 0 : (proportionalPerM2 * perSampleM3(vehicle)) / integralDistanceM;
}

/** What all classes share of the integral part; undefined where no class has one. */
export function integralConstants(
  vehicle: Vehicle,
  classes: readonly ClassSettings[],
): IntegralConstants | undefined {
  const largest = Math.max(...classes.map(({ gains }) => realGain(vehicle, gains)));
  if (largest === 0) return undefined;
  // tracking time of the back-calculation: the slowest integral time, so that a short saturation leaves the integral part alone
  const slowestS = Math.max(
    ...classes.map(({ gains, speedMps }) => (gains.integralDistanceM ?? 0) / speedMps),
  );
  const tracking = Math.round((2 ** INTEGRAL_BITS * vehicle.board.samplePeriodS) / slowestS);
  return {
    gainBits: Math.max(0, Math.min(LARGEST_INTEGRAL_BITS, Math.floor(Math.log2(INT16_MAX / largest)))),
    limit: Math.min(LARGEST_PART, curvatureUnits(integralLimitPerM(vehicle))),
    tracking: Math.min(INT16_MAX, Math.max(1, tracking)),
  };
}

/** Gain of a class as an integer with gainBits. */
export function integralGain(vehicle: Vehicle, gains: SteeringGains, gainBits: number): number {
  return Math.min(INT16_MAX, Math.max(1, Math.round(realGain(vehicle, gains) * 2 ** gainBits)));
}

/** Integral distance that the firmware's integers stand for, m. */
export function heldDistanceM(
  vehicle: Vehicle,
  proportionalPerM2: number,
  gain: number,
  gainBits: number,
): number {
  return (proportionalPerM2 * perSampleM3(vehicle) * 2 ** gainBits) / gain;
}
