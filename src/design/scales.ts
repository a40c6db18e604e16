/** From SI units to the firmware's scales (controller/constants.ts), rounded to the nearest. */
import {
  CLASS_SPEED_BITS,
  COEFFICIENT_BITS,
  CURVATURE_PER_INV_M,
  FULL_SPEED,
  LARGEST_CURVATURE,
  SPEED_BITS,
} from '../controller/constants.js';

export const INT16_MAX = 32767;

/** First-order filter coefficient of a time constant, in 1/2^COEFFICIENT_BITS, 1 to 32767. */
export function coefficient(timeS: number, samplePeriodS: number): number {
  return coefficientOf(-Math.expm1(-samplePeriodS / timeS));
}

/** A filter coefficient 0..1 in 1/2^COEFFICIENT_BITS, 1 to 32767. */
export function coefficientOf(share: number): number {
  return Math.min(INT16_MAX, Math.max(1, Math.round(share * (1 << COEFFICIENT_BITS))));
}

/** Curvature units of a curvature in 1/m, at most LARGEST_CURVATURE. */
export function curvatureUnits(curvaturePerM: number): number {
  return Math.min(LARGEST_CURVATURE, Math.round(curvaturePerM * CURVATURE_PER_INV_M));
}

/** Speed units of a speed, at most FULL_SPEED. */
export function speedUnits(speedMps: number, fullSpeedMps: number): number {
  return Math.min(FULL_SPEED, Math.round((speedMps / fullSpeedMps) * (1 << SPEED_BITS)));
}

/** Class speed units of a speed, at most 32767. */
export function classSpeedUnits(speedMps: number, fullSpeedMps: number): number {
  return Math.min(INT16_MAX, Math.round((speedMps / fullSpeedMps) * (1 << CLASS_SPEED_BITS)));
}

/** Distance in m as a sum of speeds over samples. */
export function distanceUnits(distanceM: number, fullSpeedMps: number, samplePeriodS: number): number {
  return Math.round((distanceM / (fullSpeedMps * samplePeriodS)) * (1 << SPEED_BITS));
}
