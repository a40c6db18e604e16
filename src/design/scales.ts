/** From SI units to the firmware's scales (controller/constants.ts), rounded to the nearest. */
import { COEFFICIENT_BITS, CURVATURE_PER_INV_M, SPEED_PER_MPS } from '../controller/constants.js';

export const INT16_MAX = 32767;

/** First-order filter coefficient of a time constant, in 1/2^COEFFICIENT_BITS, 1 to 32767. */
export function coefficient(timeS: number, samplePeriodS: number): number {
  return coefficientOf(-Math.expm1(-samplePeriodS / timeS));
}

/** A filter coefficient 0..1 in 1/2^COEFFICIENT_BITS, 1 to 32767. */
export function coefficientOf(share: number): number {
  return Math.min(INT16_MAX, Math.max(1, Math.round(share * (1 << COEFFICIENT_BITS))));
}

/** Curvature units of a curvature in 1/m, at most 32767. */
export function curvatureUnits(curvaturePerM: number): number {
  return Math.min(INT16_MAX, Math.round(curvaturePerM * CURVATURE_PER_INV_M));
}

/** Model speed units of a speed in m/s. */
export function speedUnits(speedMps: number): number {
  return Math.round(speedMps * SPEED_PER_MPS);
}

/** Distance in m as a sum of model speeds over samples. */
export function distanceUnits(distanceM: number, samplePeriodS: number): number {
  return Math.round((distanceM * SPEED_PER_MPS) / samplePeriodS);
}
