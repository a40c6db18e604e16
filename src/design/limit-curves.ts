/** The four speed limits over the radius of the bend, by the same functions that give a class its speed. */
import type { Vehicle } from '../vehicle/vehicle.js';
import type { SpeedLimits } from './design.js';
import { speedLimits } from './speed-classes.js';

/** The limits of a class that began at a radius. */
export interface LimitsAt {
  /** m */
  radiusM: number;
  limits: SpeedLimits;
}

/**
 * Limits at each radius.
 *
 * @param radiiM above 0, m. Bends tighter than the tightest of the sheet are judged with its law where the classes are
 * computed, as the reserve class is.
 */
export function limitCurves(vehicle: Vehicle, radiiM: readonly number[]): LimitsAt[] {
  const isComputed = vehicle.speeds.classes === 'auto';
  return radiiM.map((radiusM) => {
    const lawRadiusM = isComputed ? Math.max(radiusM, vehicle.line.tightestRadiusM) : radiusM;
    return { radiusM, limits: speedLimits(vehicle, { name: '', minRadiusM: radiusM, lawRadiusM }) };
  });
}
