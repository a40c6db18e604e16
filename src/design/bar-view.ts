/**
 * What the sensor bar sees: how far to the side the line is still measured, and what a bend asks for.
 *
 * Geometry of steady driving on a circle of radius R with the bar L ahead of the axle: if the line lies y to
 * the inner side at the bar, the axle runs on a circle of radius rho = y + sqrt(R^2 - L^2). With the axle on
 * the line itself (rho = R), y = R - sqrt(R^2 - L^2).
 */
import { FULL_COVERAGE } from '../controller/constants.js';
import type { Vehicle } from '../vehicle/vehicle.js';
import { coveredShare, seeingReach } from '../vehicle/sensor-bar.js';

/** Distance between neighbouring sensors, mean, m. */
export function meanPitchM(positionsM: readonly number[]): number {
  const first = positionsM[0] as number;
  const last = positionsM[positionsM.length - 1] as number;
  return (first - last) / (positionsM.length - 1);
}

/** Least of the largest coverage of any sensor, wherever between the end sensors the line lies, 0..1. */
export function weakestPeak(vehicle: Vehicle): number {
  const { positionsM, spotRadiusM } = vehicle.bar;
  let weakest = 1;
  for (let i = 1; i < positionsM.length; i++) {
    const half = ((positionsM[i - 1] as number) - (positionsM[i] as number)) / 2;
    weakest = Math.min(weakest, coveredShare(half, vehicle.line.widthM, spotRadiusM));
  }
  return weakest;
}

/**
 * Coverage 0..255 from which a sensor counts as on the line: half, or less where the line can slip between two analog ones. A digital
 * sensor switches at half; in a mixed bar the analog ones do as it does, so that every sensor sees as far.
 */
export function highCoverage(vehicle: Vehicle): number {
  if (vehicle.bar.kind !== 'analog') return (FULL_COVERAGE + 1) >> 1;
  const weakest = Math.round(weakestPeak(vehicle) * FULL_COVERAGE);
  return Math.max(16, (weakest + 1) >> 1);
}

/** Distance from a sensor to the line's middle at which the sensor just counts as on the line, m. */
export function switchingDistanceM(vehicle: Vehicle): number {
  // a coverage stands for a step of shares; its middle makes half of full coverage one half
  const share = (highCoverage(vehicle) - 0.5) / FULL_COVERAGE;
  return seeingReach(vehicle.line.widthM, vehicle.bar.spotRadiusM, share) ?? 0;
}

/** Largest offset of the line's middle that is still measured on both sides, m. */
export function viewM(vehicle: Vehicle): number {
  const { positionsM } = vehicle.bar;
  const outermost = Math.min(positionsM[0] as number, -(positionsM[positionsM.length - 1] as number));
  return outermost + switchingDistanceM(vehicle);
}

/** Offset of the line at the bar with the axle on a bend of radius R, m; NaN if the bar reaches beyond it. */
export function bendOffsetM(radiusM: number, aheadM: number): number {
  return radiusM - Math.sqrt(radiusM * radiusM - aheadM * aheadM);
}

/** Curvature of the axle's path, 1/m, while the line of a bend of radius R lies `offsetM` to the inner side at the bar. */
export function axleCurvaturePerM(radiusM: number, aheadM: number, offsetM: number): number {
  return 1 / (offsetM + Math.sqrt(radiusM * radiusM - aheadM * aheadM));
}
